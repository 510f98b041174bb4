import { DateTime } from 'luxon';
import type { Availability, Person } from '@shared/contract';

/**
 * Whether a coordinator is free to drive on a plain date. A day away always counts; then a single day that differs
 * from the week; then the weekly pattern. Somebody without the role, a profile or an active account never drives.
 */
export function canDrive(person: Person, availability: Availability, date: string): boolean {
  if (!person.active || !person.roles.includes('coordinator') || !person.coordinator) return false;
  if (availability.daysAway.some((span) => span.from <= date && date <= span.to)) return false;
  const single = availability.drivingDays.find((day) => day.date === date);
  if (single) return single.free;
  return person.coordinator.freeWeekdays.includes(DateTime.fromISO(date, { zone: 'utc' }).weekday);
}
