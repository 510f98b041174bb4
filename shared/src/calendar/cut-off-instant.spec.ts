import fc from 'fast-check';
import { addDays } from './add-days';
import { cutOffInstant } from './cut-off-instant';
import { localInstant } from './local-instant';

const everyDay = Object.fromEntries([1, 2, 3, 4, 5, 6, 7].map((weekday) => [String(weekday), 1020]));
const cutOff = (date: string, zone: string) =>
  new Date(cutOffInstant({ zone, cutOffMinutes: everyDay }, date) ?? NaN).toISOString();
const zones = [
  'America/New_York',
  'America/Indiana/Indianapolis',
  'America/Chicago',
  'America/Denver',
  'America/Phoenix',
  'America/Los_Angeles',
  'America/Anchorage',
  'Pacific/Honolulu',
];

// The clocks change on the second Sunday of March and the first of November (Energy Policy Act of 2005, 15 U.S.C. 260a):
// March 8 and November 1, 2026, March 14 and November 7, 2027. Arizona and Hawaii keep standard time.
describe('a cut-off at five in the afternoon', () => {
  it.each([
    // The Saturday in standard time, the Sunday after in daylight time: an hour earlier in UTC.
    ['2026-03-07', 'America/Chicago', '2026-03-07T23:00:00.000Z'],
    ['2026-03-08', 'America/Chicago', '2026-03-08T22:00:00.000Z'],
    ['2026-10-31', 'America/Chicago', '2026-10-31T22:00:00.000Z'],
    ['2026-11-01', 'America/Chicago', '2026-11-01T23:00:00.000Z'],
    ['2027-03-13', 'America/Chicago', '2027-03-13T23:00:00.000Z'],
    ['2027-03-14', 'America/Chicago', '2027-03-14T22:00:00.000Z'],
    ['2027-11-06', 'America/Chicago', '2027-11-06T22:00:00.000Z'],
    ['2027-11-07', 'America/Chicago', '2027-11-07T23:00:00.000Z'],
    ['2026-11-01', 'America/New_York', '2026-11-01T22:00:00.000Z'],
    ['2026-11-01', 'America/Denver', '2026-11-02T00:00:00.000Z'],
    ['2027-03-14', 'America/Los_Angeles', '2027-03-15T00:00:00.000Z'],
    ['2027-03-14', 'America/Anchorage', '2027-03-15T01:00:00.000Z'],
    ['2026-03-08', 'America/Phoenix', '2026-03-09T00:00:00.000Z'],
    ['2026-11-01', 'America/Phoenix', '2026-11-02T00:00:00.000Z'],
    ['2027-03-14', 'Pacific/Honolulu', '2027-03-15T03:00:00.000Z'],
    ['2027-11-07', 'Pacific/Honolulu', '2027-11-08T03:00:00.000Z'],
  ])('on %s in %s is %s', (date, zone, instant) => {
    expect(cutOff(date, zone)).toBe(instant);
  });

  it('comes 25 hours after the last one when the clocks go back, 23 when they go forward, and else 24', () => {
    const hours = (date: string, zone: string) =>
      (Date.parse(cutOff(date, zone)) - Date.parse(cutOff(addDays(date, -1), zone))) / 3_600_000;
    for (const zone of zones) {
      const keepsTime = zone === 'America/Phoenix' || zone === 'Pacific/Honolulu';
      expect(
        ['2026-03-08', '2026-11-01', '2027-03-14', '2027-11-07'].map((date) => hours(date, zone)),
      ).toEqual(keepsTime ? [24, 24, 24, 24] : [23, 25, 23, 25]);
      expect(hours('2026-12-01', zone)).toBe(24);
    }
  });
});

describe('any time of any day of 2026 and 2027', () => {
  it('is what the clock of the zone shows then, but for the hour that the spring skips', () => {
    const shown = (instant: number, zone: string) =>
      new Intl.DateTimeFormat('sv-SE', { timeZone: zone, dateStyle: 'short', timeStyle: 'short' }).format(
        instant,
      );
    const two = (n: number) => String(n).padStart(2, '0');
    fc.assert(
      fc.property(
        fc.constantFrom(...zones),
        fc.integer({ min: 0, max: 729 }),
        fc.integer({ min: 0, max: 1439 }),
        (zone, days, minute) => {
          const date = addDays('2026-01-01', days);
          if (['2026-03-08', '2027-03-14'].includes(date) && minute >= 120 && minute < 180) return;
          expect(shown(localInstant(date, minute, zone), zone)).toBe(
            `${date} ${two(Math.floor(minute / 60))}:${two(minute % 60)}`,
          );
        },
      ),
      { numRuns: 400 },
    );
  });
});
