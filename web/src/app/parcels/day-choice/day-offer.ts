import type { DayVerdict, Parcel } from '@shared/contract';
import { dayLabel } from '../../core/dates';

/** What the foot of the strip offers for the chosen day. */
export interface DayOffer {
  readonly kind: 'book' | 'pack' | 'none';
  readonly label: string;
  /** The day is booked only with an acceptance in words. */
  readonly needsWords: boolean;
  readonly why: string;
}

/**
 * The one next thing for a chosen day: packing, where it is booked on that very day; else booking, in words where the
 * day is not open; nothing on a shut day.
 */
export function dayOffer(parcel: Pick<Parcel, 'state' | 'shipDate'>, day: DayVerdict): DayOffer {
  const name = dayLabel(day.date, 'medium');
  if (parcel.state === 'booked' && parcel.shipDate === day.date)
    return { kind: 'pack', label: 'Mark as packed', needsWords: false, why: '' };
  if (day.verdict === 'shut') return { kind: 'none', label: `${name} is shut`, needsWords: false, why: '' };
  const label = parcel.state === 'booked' ? `Move to ${name}` : `Book ${name}`;
  return { kind: 'book', label, needsWords: day.verdict !== 'open', why: acceptanceText(day) };
}

function acceptanceText({ verdict }: DayVerdict): string {
  if (verdict === 'tight')
    return 'This day is tight: safe by the limits, with little room. Say in your own words that you accept it.';
  if (verdict === 'far')
    return 'No forecast reaches this day yet. Say in your own words that you accept that; it is looked at again as the day comes near.';
  return '';
}
