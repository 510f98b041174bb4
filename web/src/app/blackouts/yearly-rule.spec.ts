import { rrulestr } from 'rrule';
import {
  dayExists,
  readYearlyRule,
  rulesText,
  yearlyRule,
  yearlyText,
  type YearlyChoice,
} from './yearly-rule';

/** The days by an independent library, `rrule`, in 2026. */
function daysOf(rule: string): string[] {
  return rrulestr(`DTSTART:20260101T000000Z\nRRULE:${rule}`)
    .between(new Date('2026-01-01T00:00:00Z'), new Date('2026-12-31T00:00:00Z'), true)
    .map((day) => day.toISOString().slice(0, 10));
}

describe('a yearly rule from plain choices', () => {
  // Dates of 2026 from 5 U.S.C. 6103(a), worked out on a paper calendar.
  it.each<[string, YearlyChoice, string, string]>([
    ['July 4', { kind: 'fixed', month: 7, day: 4 }, 'FREQ=YEARLY;BYMONTH=7;BYMONTHDAY=4', '2026-07-04'],
    [
      'Thanksgiving',
      { kind: 'nth', month: 11, weekday: 4, nth: 4 },
      'FREQ=YEARLY;BYMONTH=11;BYDAY=4TH',
      '2026-11-26',
    ],
    [
      'Memorial Day',
      { kind: 'nth', month: 5, weekday: 1, nth: -1 },
      'FREQ=YEARLY;BYMONTH=5;BYDAY=-1MO',
      '2026-05-25',
    ],
    [
      'Labor Day',
      { kind: 'nth', month: 9, weekday: 1, nth: 1 },
      'FREQ=YEARLY;BYMONTH=9;BYDAY=1MO',
      '2026-09-07',
    ],
  ])('%s', (_name, choice, rule, day) => {
    expect(yearlyRule(choice)).toBe(rule);
    expect(daysOf(rule)).toEqual([day]);
    expect(readYearlyRule(rule)).toEqual(choice);
  });

  it('reads the spellings that others write', () => {
    expect(readYearlyRule('RRULE:FREQ=YEARLY;BYDAY=+3MO;BYMONTH=1')).toEqual({
      kind: 'nth',
      month: 1,
      weekday: 1,
      nth: 3,
    });
  });

  it.each([
    'FREQ=YEARLY;BYMONTH=1;BYDAY=MO;BYMONTHDAY=2,3',
    'FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=30',
    'FREQ=YEARLY',
    'FREQ=YEARLY;BYMONTH=1;BYDAY=5MO',
  ])('leaves %s to the written form', (rule) => expect(readYearlyRule(rule)).toBeNull());

  it('says the choice in words', () => {
    expect(yearlyText({ kind: 'fixed', month: 7, day: 4 })).toBe('Every July 4');
    expect(yearlyText({ kind: 'nth', month: 11, weekday: 4, nth: 4 })).toBe('4th Thursday of November');
    expect(yearlyText({ kind: 'nth', month: 5, weekday: 1, nth: -1 })).toBe('Last Monday of May');
  });

  it('sums up a holiday with its observed weekdays', () => {
    expect(rulesText('FREQ=YEARLY;BYMONTH=7;BYMONTHDAY=4\nFREQ=YEARLY;BYMONTH=7;BYMONTHDAY=5;BYDAY=MO')).toBe(
      'Every July 4, and the weekday it is observed on',
    );
    expect(rulesText('FREQ=YEARLY;BYYEARDAY=100')).toBe('By a written yearly rule');
  });

  it('knows which days a month can have', () => {
    expect(dayExists(2, 29)).toBe(true);
    expect(dayExists(2, 30)).toBe(false);
    expect(dayExists(4, 31)).toBe(false);
    expect(dayExists(13, 1)).toBe(false);
  });
});
