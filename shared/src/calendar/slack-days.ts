import { addDays } from './add-days';
import type { BlackoutCalendar } from './blackout-calendar';
import { isWorkingDay, type WorkPlace } from './is-working-day';

/** Slack is counted this far: more would not change a verdict. */
export const slackCountedDays = 2;

/**
 * The working days directly after the arrival on which a late parcel could still be collected, 0 to 2.
 * Example: an arrival on a Thursday at a Monday-to-Friday counter has one, on a Friday none.
 */
export function slackDays(place: WorkPlace, arrivalDate: string, calendar: BlackoutCalendar): number {
  let count = 0;
  while (count < slackCountedDays && isWorkingDay(place, addDays(arrivalDate, count + 1), calendar))
    count += 1;
  return count;
}
