import Holidays, { type HolidaysTypes } from 'date-holidays';
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

/**
 * From 2025 to 2036 the package knows the same weekdays as we do, if two of its habits are met: it files the substitutes of
 * Veterans Day (November 10, 2028 and 2034, November 12, 2029 and 2035) as bank holidays, so a list of its public ones lacks
 * them; and the substitute of a Saturday New Year's Day stands in the list of the year before, in which it falls.
 */
describe('date-holidays 3.37.0, country US', () => {
  const weekdaysOf = (year: number, counts: (holiday: HolidaysTypes.Holiday) => boolean): string[] => {
    const list = new Holidays('US').getHolidays(year).filter(counts);
    const dates = list.map(({ date }) => date.slice(0, 10));
    return [...new Set(dates.filter((date) => date.startsWith(String(year)) && isWeekday(date)))].sort();
  };
  const federal = ({ type, name }: HolidaysTypes.Holiday) =>
    type === 'public' || (type === 'bank' && name.startsWith('Veterans Day'));
  const ours = (year: number) =>
    observedHolidays(year)
      .map(({ observed }) => observed)
      .filter((date) => date.startsWith(String(year)));

  it.each([2025, 2026, 2027, 2028, 2029, 2030, 2031, 2032, 2033, 2034, 2035, 2036])(
    'has the same weekdays in %d',
    (year) => {
      expect(ours(year)).toEqual(weekdaysOf(year, federal));
    },
  );

  it('lacks the substitutes of Veterans Day among its public holidays, and nothing else', () => {
    const differ = [2026, 2027, 2028, 2029, 2034, 2035].flatMap((year) => {
      const theirs = weekdaysOf(year, ({ type }) => type === 'public');
      return [
        ...ours(year).filter((date) => !theirs.includes(date)),
        ...theirs.filter((date) => !ours(year).includes(date)),
      ];
    });
    expect(differ).toEqual(['2028-11-10', '2029-11-12', '2034-11-10', '2035-11-12']);
  });
});
