import type { Counter } from '@shared/contract';
import { minuteText } from '../core/dates';
import { weekdaysText, weekText } from '../ui/weekdays';

type WeekdayKey = keyof Counter['cutOffMinutes'];
const keyOf = (iso: number): WeekdayKey => String(iso) as WeekdayKey;

/** The latest hand-over by weekday: `Mon–Fri 4:30 PM, Sat 12:00 PM`; empty for a counter that takes nothing in. */
export const cutOffText = (counter: Pick<Counter, 'cutOffMinutes'>): string =>
  weekText((iso) => {
    const minute = counter.cutOffMinutes[keyOf(iso)];
    return minute === undefined ? null : minuteText(minute);
  });

/** The opening hours: `Mon–Fri 8:00 AM to 6:00 PM`. */
export const hoursText = (counter: Pick<Counter, 'openingHours'>): string =>
  weekText((iso) => {
    const hours = counter.openingHours[keyOf(iso)];
    return hours ? `${minuteText(hours.openMinute)} to ${minuteText(hours.closeMinute)}` : null;
  });

/** The days it works for the circle: `Mon–Fri`. */
export const workText = (counter: Pick<Counter, 'workingDays'>): string => weekdaysText(counter.workingDays);

/** What one looks for in the list of counters; empty texts look for all. */
export interface CounterSearch {
  readonly text: string;
  readonly state: string;
  readonly does: 'all' | 'drop-off' | 'hold' | 'off';
}

/** The counters that a search finds: by name, place or ZIP code, state, and what they do. */
export function foundCounters(counters: readonly Counter[], search: CounterSearch): Counter[] {
  const words = search.text.trim().toLowerCase();
  return counters.filter((counter) => {
    const place = `${counter.name} ${counter.street} ${counter.city} ${counter.postalCode}`.toLowerCase();
    if (!place.includes(words) || (search.state !== '' && counter.state !== search.state)) return false;
    if (search.does === 'drop-off') return counter.active && counter.canDropOff;
    if (search.does === 'hold') return counter.active && counter.canHold;
    return search.does === 'all' || !counter.active;
  });
}
