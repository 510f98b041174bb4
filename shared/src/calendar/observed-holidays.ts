import { addDays } from './add-days';
import { isoWeekday } from './iso-weekday';

export interface FederalHoliday {
  readonly title: string;
  /** The date the statute names. */
  readonly nominal: string;
  /** The weekday on which it is kept: the Friday before a Saturday, the Monday after a Sunday. */
  readonly observed: string;
}

const two = (value: number) => String(value).padStart(2, '0');
const fixed = (month: number, day: number) => (year: number) => `${year}-${two(month)}-${two(day)}`;

/** The nth Monday (1) … Sunday (7) of a month. */
const nth = (n: number, weekday: number, month: number) => (year: number) => {
  const first = `${year}-${two(month)}-01`;
  return addDays(first, ((weekday - isoWeekday(first) + 7) % 7) + 7 * (n - 1));
};

const lastMondayOfMay = (year: number) => addDays(`${year}-05-31`, -(isoWeekday(`${year}-05-31`) - 1));

/** 5 U.S.C. 6103(a), as amended in 2021. Inauguration Day (6103(c)) is kept in the Washington area only and left out. */
const statute: readonly (readonly [string, (year: number) => string])[] = [
  ["New Year's Day", fixed(1, 1)],
  ['Birthday of Martin Luther King, Jr.', nth(3, 1, 1)],
  ["Washington's Birthday", nth(3, 1, 2)],
  ['Memorial Day', lastMondayOfMay],
  ['Juneteenth National Independence Day', fixed(6, 19)],
  ['Independence Day', fixed(7, 4)],
  ['Labor Day', nth(1, 1, 9)],
  ['Columbus Day', nth(2, 1, 10)],
  ['Veterans Day', fixed(11, 11)],
  ['Thanksgiving Day', nth(4, 4, 11)],
  ['Christmas Day', fixed(12, 25)],
];

/** Saturday → the Friday before (5 U.S.C. 6103(b)(1)); Sunday → the Monday after (E.O. 11582 sec. 3(a), from memory). */
const observedDate = (nominal: string): string => {
  const weekday = isoWeekday(nominal);
  if (weekday === 6) return addDays(nominal, -1);
  return weekday === 7 ? addDays(nominal, 1) : nominal;
};

/**
 * The federal holidays of a year by date: every one whose nominal or observed date lies in it, so that a year before a
 * Saturday January 1 ends with an observed December 31. Example: in 2027 Independence Day (Sunday July 4) is observed on July 5.
 */
export function observedHolidays(year: number): FederalHoliday[] {
  const inYear = (date: string) => Number(date.slice(0, 4)) === year;
  return [year, year + 1]
    .flatMap((ofYear) => statute.map(([title, nominalIn]) => ({ title, nominal: nominalIn(ofYear) })))
    .map((holiday) => ({ ...holiday, observed: observedDate(holiday.nominal) }))
    .filter((holiday) => inYear(holiday.nominal) || inYear(holiday.observed))
    .toSorted((a, b) => a.observed.localeCompare(b.observed));
}
