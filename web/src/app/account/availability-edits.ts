import type { Availability, DaysAway } from '@shared/contract';
import { dayLabel } from '../core/dates';

/** With one more span away, in order of time. */
export function withAway(availability: Availability, span: DaysAway): Availability {
  const added = { ...span, note: span.note.trim() };
  const daysAway = [...availability.daysAway, added].toSorted((a, b) => a.from.localeCompare(b.from));
  return { ...availability, daysAway };
}

/** Without the first span that is the same. */
export function withoutAway(availability: Availability, span: DaysAway): Availability {
  const same = (one: DaysAway) => one.from === span.from && one.to === span.to && one.note === span.note;
  const index = availability.daysAway.findIndex(same);
  return { ...availability, daysAway: availability.daysAway.filter((_one, at) => at !== index) };
}

/** With a single driving day; what was said of that day before is replaced. */
export function withDrivingDay(
  availability: Availability,
  day: Availability['drivingDays'][number],
): Availability {
  const others = availability.drivingDays.filter((one) => one.date !== day.date);
  return { ...availability, drivingDays: [...others, day].toSorted((a, b) => a.date.localeCompare(b.date)) };
}

/** The day is as in the week again. */
export function withoutDrivingDay(availability: Availability, date: string): Availability {
  return { ...availability, drivingDays: availability.drivingDays.filter((one) => one.date !== date) };
}

/** `Mon, Dec 7 to Wed, Dec 9`, or the one day. */
export const spanText = ({ from, to }: Pick<DaysAway, 'from' | 'to'>): string =>
  from === to ? dayLabel(from, 'medium') : `${dayLabel(from, 'medium')} to ${dayLabel(to, 'medium')}`;
