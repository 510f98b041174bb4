import { addDays } from './add-days';
import type { BlackoutCalendar } from './blackout-calendar';
import { isWorkingDay, type WorkPlace } from './is-working-day';

/** The first working day after `date` that the calendar's window holds; null when there is none in it. */
export function nextWorkingDay(place: WorkPlace, date: string, calendar: BlackoutCalendar): string | null {
  for (let next = addDays(date, 1); next <= calendar.to; next = addDays(next, 1))
    if (isWorkingDay(place, next, calendar)) return next;
  return null;
}
