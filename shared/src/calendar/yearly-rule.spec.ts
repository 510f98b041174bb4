import fc from 'fast-check';
import { DateTime } from 'luxon';
import { yearlyRuleDates, yearlyRuleEverFalls, yearlyRuleProblem } from './yearly-rule';

const weekdays = ['MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'] as const;
const day = (year: number, month: number, date: number) => DateTime.utc(year, month, date);
/** Every day from January 1, 2026 to December 31, 2035. */
const tenYears = Array.from({ length: 3652 }, (_, index) => day(2026, 1, 1).plus({ days: index }));
const iso = (date: DateTime) => date.toISODate() ?? '';
const inTenYears = (rule: string) => yearlyRuleDates(rule, '2026-01-01', '2035-12-31');

describe('a yearly rule', () => {
  it('names a day of a month in each year that has it', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 12 }), fc.integer({ min: 1, max: 31 }), (month, date) => {
        const byLooking = tenYears.filter((one) => one.month === month && one.day === date).map(iso);
        expect(inTenYears(`FREQ=YEARLY;BYMONTH=${month};BYMONTHDAY=${date}`)).toEqual(byLooking);
      }),
      { numRuns: 40 },
    );
  });

  it('names the nth weekday of a month, from its beginning or its end', () => {
    const ordinal = fc.constantFrom(1, 2, 3, 4, 5, -1, -2);
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 12 }),
        fc.integer({ min: 0, max: 6 }),
        ordinal,
        (month, at, n) => {
          const byLooking = tenYears.filter((one) => {
            if (one.month !== month || one.weekday !== at + 1) return false;
            const fromEnd = Math.ceil(((one.daysInMonth ?? 0) - one.day + 1) / 7);
            return n > 0 ? Math.ceil(one.day / 7) === n : fromEnd === -n;
          });
          expect(inTenYears(`FREQ=YEARLY;BYMONTH=${month};BYDAY=${n}${weekdays[at]}`)).toEqual(
            byLooking.map(iso),
          );
        },
      ),
      { numRuns: 60 },
    );
  });

  it('counts from its start where it counts', () => {
    const christmasEve = 'FREQ=YEARLY;BYMONTH=12;BYMONTHDAY=24';
    const between = (rule: string, start: string) => yearlyRuleDates(rule, '2026-01-01', '2032-12-31', start);
    expect(between(`${christmasEve};COUNT=2`, '2026-01-01')).toEqual(['2026-12-24', '2027-12-24']);
    expect(between(`${christmasEve};INTERVAL=3`, '2025-01-01')).toEqual(['2028-12-24', '2031-12-24']);
    expect(between(`${christmasEve};UNTIL=20271231`, '2026-01-01')).toEqual(['2026-12-24', '2027-12-24']);
    expect(between('FREQ=YEARLY', '2026-03-05').slice(0, 2)).toEqual(['2026-03-05', '2027-03-05']);
  });

  // The ranges of RFC 5545 section 3.3.10.
  it.each([
    'FREQ=YEARLY;BYMONTH=0;BYMONTHDAY=1',
    'FREQ=YEARLY;BYMONTH=13;BYMONTHDAY=1',
    'FREQ=YEARLY;BYMONTHDAY=0',
    'FREQ=YEARLY;BYMONTHDAY=32',
    'FREQ=YEARLY;BYYEARDAY=0',
    'FREQ=YEARLY;BYYEARDAY=-367',
    'FREQ=YEARLY;BYWEEKNO=54;BYDAY=MO',
    'FREQ=YEARLY;BYDAY=0MO',
    'FREQ=YEARLY;BYDAY=54MO',
    'FREQ=YEARLY;BYMONTHDAY=1;BYSETPOS=0',
    'FREQ=YEARLY;BYMONTHDAY=31;BYSETPOS=-400',
    'FREQ=YEARLY;BYMONTHDAY=1;INTERVAL=0',
    'FREQ=YEARLY;BYMONTHDAY=1;UNTIL=20271301',
    'FREQ=YEARLY;BYMONTHDAY=1;',
  ])('is refused out of its ranges, in a sentence: %s', (rule) => {
    expect(yearlyRuleProblem(rule)).toMatch(/ (is not understood|cannot be used in a yearly day off)\.$/);
    expect(() => inTenYears(rule)).toThrow(RangeError);
  });

  it('never surprises once it is accepted: whatever its parts, it yields days of the window in order', () => {
    const sign = fc.constantFrom('', '+', '-');
    const number = (max: number) => fc.integer({ min: 0, max });
    const signed = (max: number) => fc.tuple(sign, number(max)).map(([before, n]) => `${before}${n}`);
    const few = (value: fc.Arbitrary<string>) =>
      fc.array(value, { minLength: 1, maxLength: 3 }).map((values) => values.join(','));
    const weekday = fc.tuple(fc.option(signed(60)), fc.constantFrom(...weekdays));
    const part = fc.oneof(
      few(number(14).map(String)).map((text) => `BYMONTH=${text}`),
      few(signed(33)).map((text) => `BYMONTHDAY=${text}`),
      few(signed(370)).map((text) => `BYYEARDAY=${text}`),
      few(signed(55)).map((text) => `BYWEEKNO=${text}`),
      few(weekday.map(([n, name]) => `${n ?? ''}${name}`)).map((text) => `BYDAY=${text}`),
      few(signed(370)).map((text) => `BYSETPOS=${text}`),
      number(100).map((n) => `INTERVAL=${n}`),
      number(9999).map((n) => `COUNT=${n}`),
    );
    let accepted = 0;
    fc.assert(
      fc.property(fc.uniqueArray(part, { minLength: 1, maxLength: 4 }), (parts) => {
        const rule = ['FREQ=YEARLY', ...parts].join(';');
        if (yearlyRuleProblem(rule, '2026-01-01') !== null) return;
        accepted += 1;
        const dates = yearlyRuleDates(rule, '2026-06-01', '2028-05-31', '2026-01-01');
        expect(dates).toEqual([...new Set(dates)].toSorted());
        expect(dates.every((date) => date >= '2026-06-01' && date <= '2028-05-31')).toBe(true);
      }),
      { numRuns: 80, seed: 20261201 },
    );
    expect(accepted).toBeGreaterThan(20);
  }, 60_000);

  it('comes at least once in forty years, or it is a mistake', () => {
    const ever = (parts: string) => yearlyRuleEverFalls(`FREQ=YEARLY;${parts}`, '2026-12-01');
    expect(ever('BYMONTH=2;BYMONTHDAY=30')).toBe(false);
    // New Year's Eve is a Friday in 2038 and then in 2049: eleven years without, and no mistake.
    expect(yearlyRuleEverFalls('FREQ=YEARLY;BYMONTH=12;BYMONTHDAY=31;BYDAY=FR', '2039-01-01')).toBe(true);
    // February 29 on a Sunday: 2032, and again in 2060.
    expect(yearlyRuleEverFalls('FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=29;BYDAY=SU', '2032-03-01')).toBe(true);
  });
});
