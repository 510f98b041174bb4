import type { Arrival, Counter, Parcel } from '@shared/contract';
import { isoWeekday } from '@shared/calendar/iso-weekday';
import { localInstant } from '@shared/calendar/local-instant';

/** Minutes a buyer is expected to take after the parcel is ready. Assumption. */
const collectMinutes = 120;
/** An overnight parcel to a door comes by noon. Assumption. */
const doorByMinute = 720;

type Weekday = keyof Counter['openingHours'];

export interface CollectTimes {
  readonly from: string | null;
  readonly by: string | null;
  /** The counter's hours that day, as a sentence; null for a door or without a day. */
  readonly hours: string | null;
}

/**
 * When the buyer can have the parcel. At a counter: from the commit time (or opening, if later) for two hours, or until it
 * closes if that is sooner; `by` is null when the counter has no hours that day. At a door: by noon.
 */
export function collectTimes(parcel: Parcel, counter: Counter | null): CollectTimes {
  const { arrivalDate, destination } = parcel;
  if (arrivalDate === null) return { from: null, by: null, hours: null };
  const at = (minute: number) => new Date(localInstant(arrivalDate, minute, destination.zone)).toISOString();
  if (!counter) return { from: null, by: at(doorByMinute), hours: null };
  const hours = counter.openingHours[String(isoWeekday(arrivalDate)) as Weekday];
  if (!hours) return { from: at(counter.commitMinute), by: null, hours: 'Closed that day.' };
  const from = Math.max(counter.commitMinute, hours.openMinute);
  return {
    from: at(from),
    by: at(Math.min(from + collectMinutes, hours.closeMinute)),
    hours: `Open ${clockText(hours.openMinute)} to ${clockText(hours.closeMinute)}`,
  };
}

/** Minutes after midnight on a 12-hour clock: `clockText(1080)` is "6:00 pm". */
export function clockText(minute: number): string {
  const hour = Math.floor(minute / 60) % 24;
  return `${hour % 12 || 12}:${String(minute % 60).padStart(2, '0')} ${hour < 12 ? 'am' : 'pm'}`;
}

/** What the buyer should have with them, in plain words. */
export function thingsToBring(parcel: Parcel): string[] {
  if (parcel.service === 'door')
    return [
      'Somebody at home to take the box in at once: it must not stand outside.',
      `The parcel's code, ${parcel.code}.`,
      'A warm (or cool), quiet room to open the box in.',
    ];
  return [
    `A photo ID in the name of ${parcel.buyer.name}.`,
    `The parcel's code, ${parcel.code}.`,
    'A car at room temperature: run the heat or the air conditioning before you carry the box out.',
    'An insulated bag or a second box for the way home; leave the box shut until you are there.',
  ];
}

/** How far the parcel is, in the buyer's words. */
export function arrivalStatus(parcel: Parcel): Arrival['status'] {
  switch (parcel.state) {
    case 'draft':
    case 'seeking':
      return 'open';
    case 'on-hold':
      return 'on-hold';
    case 'arrived':
    case 'closed':
      return 'arrived';
    case 'cancelled':
      return 'cancelled';
    default:
      return 'planned';
  }
}
