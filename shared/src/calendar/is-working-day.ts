import { blackoutsOn, type BlackoutCalendar, type BlackoutRule } from './blackout-calendar';
import { isoWeekday } from './iso-weekday';

/** A place whose days count: a counter, or a buyer's door (no counter of its own). */
export interface WorkPlace {
  /** ISO weekdays, 1 = Monday. */
  readonly workingDays: readonly number[];
  readonly carrierId: number;
  readonly state: string;
  readonly counterId: number | null;
}

/** Why a place does not work on a date: its weekday, or a blackout by its title. */
export type DayOff = { readonly why: 'weekday' } | { readonly why: 'blackout'; readonly title: string };

/** Why the place does not work on the date, or null when it does (design 5.1). The blackout is named rather than the weekday. */
export function dayOff(place: WorkPlace, date: string, calendar: BlackoutCalendar): DayOff | null {
  const blackout = blackoutsOn(calendar, date).find((one) => concerns(one, place));
  if (blackout) return { why: 'blackout', title: blackout.title };
  return place.workingDays.includes(isoWeekday(date)) ? null : { why: 'weekday' };
}

/** Whether a place works on a date: its weekday is in its working days and no blackout that concerns it covers the date. */
export const isWorkingDay = (place: WorkPlace, date: string, calendar: BlackoutCalendar): boolean =>
  dayOff(place, date, calendar) === null;

function concerns(blackout: BlackoutRule, place: WorkPlace): boolean {
  switch (blackout.scope) {
    case 'everywhere':
      return true;
    case 'carrier':
      return blackout.carrierId === place.carrierId;
    case 'state':
      return blackout.state === place.state;
    case 'counter':
      return place.counterId !== null && blackout.counterId === place.counterId;
  }
}
