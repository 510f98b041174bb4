import type { DayVerdict, Parcel } from '@shared/contract';
import { dayLabel } from '../../core/dates';
import { addDays } from '../../ui/plain-dates';

/** What the foot of the strip offers for the chosen day. */
export interface DayOffer {
  readonly kind: 'book' | 'pack' | 'none';
  readonly label: string;
  /** The day is booked only with an acceptance in words. */
  /** It is the next thing to do; otherwise it is offered quietly. */
  readonly isNext: boolean;
  readonly needsWords: boolean;
  readonly why: string;
}

/**
 * The one next thing for a chosen day: packing, where it is booked on that very day; else booking, in words where the
 * day is not open; nothing on a shut day. Packing is pressing from the day before; `today` at the drop-off counter.
 */
export function dayOffer(
  parcel: Pick<Parcel, 'state' | 'shipDate'>,
  day: DayVerdict,
  today: string,
): DayOffer {
  const name = dayLabel(day.date, 'medium');
  if (parcel.state === 'booked' && parcel.shipDate === day.date)
    return {
      kind: 'pack',
      label: 'Mark as packed',
      isNext: day.date <= addDays(today, 1),
      needsWords: false,
      why: '',
    };
  if (day.verdict === 'shut')
    return { kind: 'none', label: `${name} is shut`, isNext: true, needsWords: false, why: '' };
  const label = parcel.state === 'booked' ? `Move to ${name}` : `Book ${name}`;
  return { kind: 'book', label, isNext: true, needsWords: day.verdict !== 'open', why: acceptanceText(day) };
}

function acceptanceText({ verdict }: DayVerdict): string {
  if (verdict === 'tight')
    return 'This day is tight: safe by the limits, with little room. Say in your own words that you accept it.';
  if (verdict === 'far')
    return 'No forecast reaches this day yet. Say in your own words that you accept that; it is looked at again as the day comes near.';
  return '';
}
