import { DateTime } from 'luxon';
import { blackoutDates } from './blackout-dates';
import { federalHolidayRules } from './federal-holiday-rules';
import { observedHolidays } from './observed-holidays';

// Five cycles of 28 years, after which dates and weekdays come round again, and the missing leap year of 2100.
const years = Array.from({ length: 140 }, (_, index) => 1990 + index);
const weekdayOf = (date: string) => DateTime.fromISO(date, { zone: 'utc' }).weekday;
const shift = (date: string, days: number) =>
  DateTime.fromISO(date, { zone: 'utc' }).plus({ days }).toISODate();

describe('a federal holiday', () => {
  it('is kept on its day, on the Friday before a Saturday, or on the Monday after a Sunday (5 U.S.C. 6103(b), E.O. 11582)', () => {
    for (const year of years)
      for (const { nominal, observed } of observedHolidays(year)) {
        const weekday = weekdayOf(nominal);
        expect(observed).toBe(
          weekday === 6 ? shift(nominal, -1) : weekday === 7 ? shift(nominal, 1) : nominal,
        );
      }
  });

  it('comes eleven times for every year, once under each name', () => {
    for (const year of years) {
      const ofYear = observedHolidays(year).filter(({ nominal }) => nominal.startsWith(`${year}-`));
      expect(new Set(ofYear.map(({ title }) => title)).size).toBe(11);
      expect(ofYear).toHaveLength(11);
    }
  });

  it('as a yearly rule shuts the observed weekday and the named day, and no other day of any year', () => {
    const spans = federalHolidayRules.map(({ rules }) => ({
      kind: 'yearly' as const,
      startDate: null,
      endDate: null,
      rules,
      liftedDates: [],
    }));
    for (const year of years.filter((one) => one % 3 === 0)) {
      const shut = spans.flatMap((span) => blackoutDates(span, `${year}-01-01`, `${year}-12-31`)).toSorted();
      const meant = observedHolidays(year)
        .flatMap(({ nominal, observed }) => [nominal, observed])
        .filter((date) => date.startsWith(`${year}-`));
      expect(shut).toEqual([...new Set(meant)].toSorted());
    }
  });
});
