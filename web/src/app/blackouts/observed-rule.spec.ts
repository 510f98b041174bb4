import { rrulestr } from 'rrule';
import { canBeObserved, readYearlyRules, yearlyRules } from './observed-rule';

/** The days of a year by an independent library, `rrule`. */
const daysIn = (year: number, rules: string): string[] =>
  rules
    .split('\n')
    .flatMap((line) =>
      rrulestr(`DTSTART:${year}0101T000000Z\nRRULE:${line}`)
        .between(new Date(`${year}-01-01T00:00:00Z`), new Date(`${year}-12-31T00:00:00Z`), true)
        .map((day) => day.toISOString().slice(0, 10)),
    )
    .toSorted();

const fixed = (month: number, day: number) => ({ kind: 'fixed', month, day }) as const;

describe('a holiday with its observed weekday', () => {
  // The Office of Personnel Management's lists: July 4, 2026 is a Saturday, observed Friday, July 3; July 4, 2027 is a
  // Sunday, observed Monday, July 5; in 2028 it is a Tuesday.
  const rules = yearlyRules({ choice: fixed(7, 4), isObserved: true });
  it('on a Saturday is kept on the Friday before too', () =>
    expect(daysIn(2026, rules)).toEqual(['2026-07-03', '2026-07-04']));
  it('on a Sunday is kept on the Monday after too', () =>
    expect(daysIn(2027, rules)).toEqual(['2027-07-04', '2027-07-05']));
  it('on a weekday is that day alone', () => expect(daysIn(2028, rules)).toEqual(['2028-07-04']));

  // New Year's Day 2028 is a Saturday (printed calendar): its Friday lies in the year before.
  it('crosses the turn of the year', () =>
    expect(daysIn(2027, yearlyRules({ choice: fixed(1, 1), isObserved: true }))).toContain('2027-12-31'));

  it('reads back what it wrote, in any order of lines', () => {
    const lines = rules.split('\n');
    const shuffled = [lines[0], lines[2], lines[1]].join('\n');
    expect(readYearlyRules(shuffled)).toEqual({ choice: fixed(7, 4), isObserved: true });
    expect(readYearlyRules(lines[0] ?? '')).toEqual({ choice: fixed(7, 4), isObserved: false });
  });

  it('leaves other sets of lines to the written form', () => {
    expect(
      readYearlyRules('FREQ=YEARLY;BYMONTH=7;BYMONTHDAY=4\nFREQ=YEARLY;BYMONTH=8;BYMONTHDAY=1'),
    ).toBeNull();
  });

  it('is not offered beside a leap day', () => {
    expect(canBeObserved(fixed(2, 28))).toBe(false);
    expect(canBeObserved(fixed(3, 1))).toBe(false);
    expect(canBeObserved(fixed(7, 4))).toBe(true);
    expect(canBeObserved({ kind: 'nth', month: 11, weekday: 4, nth: 4 })).toBe(false);
  });
});
