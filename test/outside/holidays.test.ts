import Holidays from 'date-holidays';
import { blackoutDates } from '@shared/calendar/blackout-dates';
import { federalHolidayRules } from '@shared/calendar/federal-holiday-rules';
import { observedHolidays } from '@shared/calendar/observed-holidays';

/**
 * Days on which federal offices are shut, by hand from the statute and a printed calendar: 5 U.S.C. 6103(a) names the days;
 * 6103(b)(1) keeps a Saturday holiday on the Friday before, E.O. 11582 sec. 3(a) (from memory) a Sunday one on the Monday after.
 */
const printed: Record<number, readonly string[]> = {
  2026: [
    '2026-01-01', // Thursday
    '2026-01-19', // third Monday of January
    '2026-02-16', // third Monday of February
    '2026-05-25', // last Monday of May
    '2026-06-19', // Friday
    '2026-07-03', // July 4 is a Saturday
    '2026-09-07', // first Monday of September
    '2026-10-12', // second Monday of October
    '2026-11-11', // Wednesday
    '2026-11-26', // fourth Thursday of November
    '2026-12-25', // Friday
  ],
  2027: [
    '2027-01-01', // Friday
    '2027-01-18',
    '2027-02-15',
    '2027-05-31',
    '2027-06-18', // June 19 is a Saturday
    '2027-07-05', // July 4 is a Sunday
    '2027-09-06',
    '2027-10-11',
    '2027-11-11', // Thursday
    '2027-11-25',
    '2027-12-24', // December 25 is a Saturday
    '2027-12-31', // January 1, 2028 is a Saturday
  ],
};

const isWeekday = (date: string) => ![0, 6].includes(new Date(`${date}T12:00:00Z`).getUTCDay());

describe.each([2026, 2027])('federal holidays observed in %d', (year) => {
  it('fall on the days that 5 U.S.C. 6103 gives', () => {
    const observed = observedHolidays(year).map((holiday) => holiday.observed);
    expect(observed.filter((date) => date.startsWith(String(year)))).toEqual(printed[year]);
  });

  it('are the weekdays that the yearly rules entered as blackouts shut', () => {
    const rules = federalHolidayRules.map(({ rules: text }) => ({
      kind: 'yearly' as const,
      startDate: null,
      endDate: null,
      rules: text,
      liftedDates: [],
    }));
    const dates = rules
      .flatMap((rule) => blackoutDates(rule, `${year}-01-01`, `${year}-12-31`))
      .filter(isWeekday);
    expect(dates.toSorted()).toEqual(printed[year]);
  });
});

describe('date-holidays 3.37.0, country US', () => {
  // Its substitutes of Veterans Day have the type "bank" (2028-11-10 and others), so both types are taken; its list of a year
  // holds the substitute for next January 1.
  const theirs = (year: number): string[] => {
    const list = new Holidays('US')
      .getHolidays(year)
      .filter(({ type }) => type === 'public' || (type === 'bank' && /Veterans/.test(type)));
    return [
      ...new Set(
        list
          .map(({ date }) => date.slice(0, 10))
          .filter((date) => date.startsWith(String(year)) && isWeekday(date)),
      ),
    ].sort();
  };

  it.each([2025, 2026, 2027])('has the same weekdays in %d', (year) => {
    const ours = observedHolidays(year)
      .map(({ observed }) => observed)
      .filter((date) => date.startsWith(String(year)));
    expect(ours).toEqual(theirs(year));
  });
});
