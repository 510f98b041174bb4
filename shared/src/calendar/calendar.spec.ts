import fc from 'fast-check';
import { DateTime } from 'luxon';
import { addDays } from './add-days';
import { blackoutCalendar, blackoutsOn, type BlackoutRule } from './blackout-calendar';
import { blackoutDates } from './blackout-dates';
import { cutOffInstant } from './cut-off-instant';
import { datesFrom } from './dates-from';
import { daysBetween } from './days-between';
import { dayOff, isWorkingDay, type WorkPlace } from './is-working-day';
import { isoWeekday } from './iso-weekday';
import { localInstant } from './local-instant';
import { nextWorkingDay } from './next-working-day';
import { slackDays } from './slack-days';
import { startOfLocalDay } from './start-of-local-day';
import { yearlyRuleDates, yearlyRuleEverFalls, yearlyRuleProblem } from './yearly-rule';

const rule = (changes: Partial<BlackoutRule> = {}): BlackoutRule => ({
  title: 'Closed',
  kind: 'date',
  startDate: '2026-12-08',
  endDate: null,
  rules: null,
  liftedDates: [],
  scope: 'everywhere',
  carrierId: null,
  state: null,
  counterId: null,
  ...changes,
});
const phoenix: WorkPlace = { workingDays: [1, 2, 3, 4, 5], carrierId: 1, state: 'AZ', counterId: 7 };
const calendarOf = (...rules: BlackoutRule[]) => blackoutCalendar(rules, '2026-11-01', '2027-02-28');
const anyDate = fc.integer({ min: 0, max: 40_000 }).map((days) => addDays('1990-01-01', days));

describe('plain dates', () => {
  it.each([
    ['2026-02-28', 1, '2026-03-01'],
    ['2028-02-28', 1, '2028-02-29'],
    ['2026-12-31', 1, '2027-01-01'],
    ['2026-03-01', -1, '2026-02-28'],
    // 2100 is no leap year (Gregorian reform).
    ['2100-02-28', 1, '2100-03-01'],
  ])('%s and %d days is %s', (from, days, to) => {
    expect(addDays(from, days)).toBe(to);
  });

  it('agree with luxon on every date: sums, differences and weekdays', () => {
    fc.assert(
      fc.property(anyDate, fc.integer({ min: -800, max: 800 }), (date, days) => {
        const there = DateTime.fromISO(date, { zone: 'utc' }).plus({ days });
        expect(addDays(date, days)).toBe(there.toISODate());
        expect(daysBetween(date, addDays(date, days))).toBe(days);
        expect(isoWeekday(date)).toBe(DateTime.fromISO(date, { zone: 'utc' }).weekday);
      }),
    );
  });

  it('count from the first', () => {
    expect(datesFrom('2026-12-30', 3)).toEqual(['2026-12-30', '2026-12-31', '2027-01-01']);
    expect(datesFrom('2026-12-30', 0)).toEqual([]);
  });
});

describe('local clocks', () => {
  const hours = (date: string, zone: string) =>
    (startOfLocalDay(addDays(date, 1), zone) - startOfLocalDay(date, zone)) / 3_600_000;

  it.each([
    // Energy Policy Act of 2005: second Sunday of March, first Sunday of November.
    ['2026-11-01', 'America/Chicago', 25],
    ['2027-03-14', 'America/Chicago', 23],
    ['2027-11-07', 'America/New_York', 25],
    // Arizona (but for the Navajo Nation) and Hawaii keep standard time all year.
    ['2026-11-01', 'America/Phoenix', 24],
    ['2027-03-14', 'Pacific/Honolulu', 24],
    ['2027-03-13', 'America/Chicago', 24],
  ])('%s in %s has %d hours', (date, zone, length) => {
    expect(hours(date, zone)).toBe(length);
  });

  it.each([
    ['2026-12-01', 1020, 'America/Chicago', '2026-12-01T23:00:00.000Z'],
    ['2026-07-06', 1020, 'America/Chicago', '2026-07-06T22:00:00.000Z'],
    ['2026-07-06', 1020, 'America/Phoenix', '2026-07-07T00:00:00.000Z'],
    ['2026-07-06', 1020, 'Pacific/Honolulu', '2026-07-07T03:00:00.000Z'],
    // On the long day 17:00 on the face of the clock is 18 hours after midnight, on the short one 16.
    ['2026-11-01', 1020, 'America/Chicago', '2026-11-01T23:00:00.000Z'],
    ['2027-03-14', 1020, 'America/Chicago', '2027-03-14T22:00:00.000Z'],
    // 2:30 does not exist that night; 1:30 on the long night is the first of the two.
    ['2027-03-14', 150, 'America/Chicago', '2027-03-14T08:30:00.000Z'],
    ['2026-11-01', 90, 'America/Chicago', '2026-11-01T06:30:00.000Z'],
    ['2026-12-01', 1440, 'America/Chicago', '2026-12-02T06:00:00.000Z'],
  ])('%s, minute %d in %s is %s', (date, minute, zone, instant) => {
    expect(new Date(localInstant(date, minute, zone)).toISOString()).toBe(instant);
  });

  it('refuse a zone that does not exist', () => {
    expect(() => startOfLocalDay('2026-12-01', 'America/Nowhere')).toThrow(RangeError);
  });

  it('give a cut-off on the weekdays that have one', () => {
    const counter = { zone: 'America/Chicago', cutOffMinutes: { '1': 1020, '5': 930 } };
    const at = (date: string) => cutOffInstant(counter, date);
    expect(at('2026-12-07')).toBe(Date.parse('2026-12-07T23:00:00Z'));
    expect(at('2026-12-04')).toBe(Date.parse('2026-12-04T21:30:00Z'));
    expect(at('2026-12-08')).toBeNull();
  });
});

describe('blackouts', () => {
  it.each<[string, Partial<BlackoutRule>, string[]]>([
    ['a date', {}, ['2026-12-08']],
    [
      'a range, both ends',
      { kind: 'range', endDate: '2026-12-10' },
      ['2026-12-08', '2026-12-09', '2026-12-10'],
    ],
    [
      'a range with a day lifted',
      { kind: 'range', endDate: '2026-12-10', liftedDates: ['2026-12-09'] },
      ['2026-12-08', '2026-12-10'],
    ],
    [
      'a yearly day',
      { kind: 'yearly', startDate: null, rules: 'FREQ=YEARLY;BYMONTH=12;BYMONTHDAY=24' },
      ['2026-12-24'],
    ],
    [
      'a yearly day lifted this year',
      {
        kind: 'yearly',
        startDate: null,
        rules: 'FREQ=YEARLY;BYMONTH=12;BYMONTHDAY=24',
        liftedDates: ['2026-12-24'],
      },
      [],
    ],
    [
      'two rules, a day of both once',
      {
        kind: 'yearly',
        startDate: null,
        rules: 'FREQ=YEARLY;BYMONTH=12;BYMONTHDAY=24\nFREQ=YEARLY;BYMONTH=12;BYDAY=4TH',
      },
      ['2026-12-24'],
    ],
    [
      'a yearly day that begins later',
      { kind: 'yearly', startDate: '2027-01-01', rules: 'FREQ=YEARLY;BYMONTH=12;BYMONTHDAY=24' },
      [],
    ],
  ])('cover the days of %s', (_name, changes, dates) => {
    expect(blackoutDates(rule(changes), '2026-12-01', '2026-12-31')).toEqual(dates);
  });

  it('are the second Tuesday of March (RFC 5545 3.3.10), every year', () => {
    expect(yearlyRuleDates('FREQ=YEARLY;BYMONTH=3;BYDAY=2TU', '2026-01-01', '2028-12-31')).toEqual([
      '2026-03-10',
      '2027-03-09',
      '2028-03-14',
    ]);
  });

  it.each([
    'FREQ=DAILY',
    'BYMONTH=7',
    'FREQ=YEARLY',
    'FREQ=YEARLY;BYHOUR=1,2,3',
    'FREQ=YEARLY;BYDAY=9XX',
    'FREQ=YEARLY;BYMONTH=7;BYMONTH=8',
    'FREQ=YEARLY;BYMONTHDAY=1;COUNT=2;UNTIL=20300101',
  ])('refuse the rule %s in a sentence', (text) => {
    expect(yearlyRuleProblem(text)).toMatch(/\.$/);
    expect(() => yearlyRuleDates(text, '2026-01-01', '2026-12-31')).toThrow(RangeError);
  });

  it('know a day that never comes', () => {
    expect(yearlyRuleEverFalls('FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=30', '2026-01-01')).toBe(false);
    expect(yearlyRuleEverFalls('FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=29', '2026-01-01')).toBe(true);
  });

  it('are only known inside the window that was expanded: a date nobody looked at must not pass', () => {
    expect(() => blackoutsOn(calendarOf(), '2027-03-01')).toThrow(RangeError);
  });
});

describe('working days', () => {
  it('are the weekdays without a blackout that concerns the place', () => {
    const calendar = calendarOf(rule({ title: 'Building work', scope: 'counter', counterId: 7 }));
    expect(dayOff(phoenix, '2026-12-08', calendar)).toEqual({ why: 'blackout', title: 'Building work' });
    expect(dayOff({ ...phoenix, counterId: 8 }, '2026-12-08', calendar)).toBeNull();
    expect(dayOff({ ...phoenix, counterId: null }, '2026-12-08', calendar)).toBeNull();
    expect(dayOff(phoenix, '2026-12-12', calendar)).toEqual({ why: 'weekday' });
  });

  it('are counted as slack directly after the arrival, two at most', () => {
    const free = calendarOf();
    // Monday to Friday of one week.
    expect(
      ['2026-12-07', '2026-12-08', '2026-12-09', '2026-12-10', '2026-12-11'].map((date) =>
        slackDays(phoenix, date, free),
      ),
    ).toEqual([2, 2, 2, 1, 0]);
    expect(slackDays(phoenix, '2026-12-07', calendarOf(rule()))).toBe(0);
  });

  it('come after a holiday weekend on the Tuesday', () => {
    const calendar = calendarOf(rule({ startDate: '2027-01-18' }));
    expect(nextWorkingDay(phoenix, '2027-01-15', calendar)).toBe('2027-01-19');
    expect(nextWorkingDay({ ...phoenix, workingDays: [] }, '2027-01-15', calendar)).toBeNull();
  });

  it('are never more with one blackout more', () => {
    const span = fc.tuple(fc.integer({ min: 0, max: 100 }), fc.integer({ min: 0, max: 20 }));
    fc.assert(
      fc.property(
        fc.array(span, { maxLength: 4 }),
        span,
        fc.integer({ min: 0, max: 90 }),
        (spans, extra, at) => {
          const toRule = ([start, length]: [number, number]) =>
            rule({
              kind: 'range',
              startDate: addDays('2026-11-05', start),
              endDate: addDays('2026-11-05', start + length),
            });
          const date = addDays('2026-11-05', at);
          const before = blackoutCalendar(spans.map(toRule), '2026-11-01', '2027-06-30');
          const after = blackoutCalendar([...spans, extra].map(toRule), '2026-11-01', '2027-06-30');
          if (isWorkingDay(phoenix, date, after)) expect(isWorkingDay(phoenix, date, before)).toBe(true);
          expect(slackDays(phoenix, date, after)).toBeLessThanOrEqual(slackDays(phoenix, date, before));
        },
      ),
    );
  });
});
