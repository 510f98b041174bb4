import fc from 'fast-check';
import { hourMs, hoursBetween } from './hours-between';
import { localDayRange } from './local-day-range';
import type { OutdoorForecast } from './outdoor-forecast';

const forecast = (zone: string, start: string, tempsF: readonly (number | null)[]): OutdoorForecast => ({
  zone,
  startMs: Date.parse(start),
  tempsF,
  issuedAt: start,
  fetchedAt: start,
  alerts: [],
});
/** Temperature i in hour i, so that a value tells which hour it came from. */
const counted = (count: number) => Array.from({ length: count }, (_, index) => index);

describe('the range of a local day', () => {
  it('counts hours from local midnight to local midnight of the place', () => {
    // Central Standard Time is UTC−6: 1 December runs from 06:00Z (hour 6) to 05:00Z (hour 29).
    const range = localDayRange(
      forecast('America/Chicago', '2026-12-01T00:00:00Z', counted(48)),
      '2026-12-01',
    );
    expect(range).toMatchObject({ lowF: 6, highF: 29, hours: 24, missingHours: 0, longestGapHours: 0 });
    expect(range?.lowAtMs).toBe(Date.parse('2026-12-01T06:00:00Z'));
    expect(range?.highAtMs).toBe(Date.parse('2026-12-02T05:00:00Z'));
  });

  // US clock changes 2026-03-08 and 2026-11-01, 2027-03-14 and 2027-11-07 at 02:00 local; none in Arizona, Hawaii and
  // Puerto Rico (Uniform Time Act dates as in the IANA table).
  it.each([
    ['America/Chicago', '2026-03-08', 23, '2026-03-08T06:00:00Z', '2026-03-09T05:00:00Z'],
    ['America/Chicago', '2026-11-01', 25, '2026-11-01T05:00:00Z', '2026-11-02T06:00:00Z'],
    ['America/New_York', '2027-03-14', 23, '2027-03-14T05:00:00Z', '2027-03-15T04:00:00Z'],
    ['America/Los_Angeles', '2027-11-07', 25, '2027-11-07T07:00:00Z', '2027-11-08T08:00:00Z'],
    ['America/Phoenix', '2026-03-08', 24, '2026-03-08T07:00:00Z', '2026-03-09T07:00:00Z'],
    ['Pacific/Honolulu', '2026-11-01', 24, '2026-11-01T10:00:00Z', '2026-11-02T10:00:00Z'],
    ['America/Puerto_Rico', '2026-03-08', 24, '2026-03-08T04:00:00Z', '2026-03-09T04:00:00Z'],
    ['America/Anchorage', '2026-03-08', 23, '2026-03-08T09:00:00Z', '2026-03-09T08:00:00Z'],
  ])('in %s on %s has %i hours', (zone, date, hours, from, to) => {
    const startMs = Date.parse(from) - 12 * hourMs;
    const range = localDayRange(forecast(zone, new Date(startMs).toISOString(), counted(72)), date);
    expect(range?.hours).toBe(hours);
    expect(range?.lowAtMs).toBe(Date.parse(from));
    expect(range?.highAtMs).toBe(Date.parse(to) - hourMs);
  });

  it('tells how many hours are missing and the longest run of them', () => {
    const temps: (number | null)[] = counted(24);
    for (const hour of [3, 4, 5, 10, 23]) temps[hour] = null;
    const range = localDayRange(forecast('Etc/UTC', '2026-12-01T00:00:00Z', temps), '2026-12-01');
    expect(range).toMatchObject({ missingHours: 5, longestGapHours: 3, lowF: 0, highF: 22 });
  });

  it('counts hours beyond the coverage as missing', () => {
    const range = localDayRange(forecast('Etc/UTC', '2026-12-01T18:00:00Z', counted(10)), '2026-12-01');
    expect(range).toMatchObject({ hours: 24, missingHours: 18, longestGapHours: 18, lowF: 0, highF: 5 });
    const last = localDayRange(forecast('Etc/UTC', '2026-12-01T18:00:00Z', counted(10)), '2026-12-02');
    expect(last).toMatchObject({ missingHours: 20, longestGapHours: 20, lowF: 6, highF: 9 });
  });

  it.each(['2026-11-30', '2026-12-03'])('is null on %s, of which not one hour is covered', (date) => {
    expect(localDayRange(forecast('Etc/UTC', '2026-12-01T00:00:00Z', counted(48)), date)).toBeNull();
  });

  it('is null when every hour of the day is null', () => {
    expect(localDayRange(forecast('Etc/UTC', '2026-12-01T00:00:00Z', [null, null]), '2026-12-01')).toBeNull();
  });

  it('takes the first of several hours with the same low', () => {
    const temps = [50, 40, 45, 40, 60, 60];
    const range = localDayRange(forecast('Etc/UTC', '2026-12-01T00:00:00Z', temps), '2026-12-01');
    expect(range?.lowAtMs).toBe(Date.parse('2026-12-01T01:00:00Z'));
    expect(range?.highAtMs).toBe(Date.parse('2026-12-01T04:00:00Z'));
  });

  it('keeps low at or under high, and its hours add up, whatever is missing', () => {
    const temp = fc.option(fc.integer({ min: -40, max: 120 }), { nil: null });
    fc.assert(
      fc.property(fc.array(temp, { maxLength: 60 }), fc.integer({ min: 0, max: 2 }), (temps, dayOffset) => {
        const range = localDayRange(
          forecast('America/Denver', '2026-11-01T00:00:00Z', temps),
          `2026-11-0${dayOffset + 1}`,
        );
        if (range === null) return;
        expect(range.lowF).toBeLessThanOrEqual(range.highF);
        expect(range.longestGapHours).toBeLessThanOrEqual(range.missingHours);
        expect(range.missingHours).toBeLessThan(range.hours);
      }),
    );
  });

  it('leaves the forecast as it was', () => {
    const frozen = Object.freeze({
      ...forecast('Etc/UTC', '2026-12-01T00:00:00Z', Object.freeze([1, null, 3])),
    });
    expect(() => localDayRange(frozen, '2026-12-01')).not.toThrow();
  });
});

describe('the hours of a window', () => {
  const day = forecast('Etc/UTC', '2026-12-01T00:00:00Z', counted(24));
  const at = (clock: string) => Date.parse(`2026-12-01T${clock}:00Z`);

  it('are those it touches: the start counts, the end does not', () => {
    expect(hoursBetween(day, at('17:30'), at('19:00')).map((hour) => hour.tempF)).toEqual([17, 18]);
    expect(hoursBetween(day, at('17:00'), at('17:01'))).toEqual([{ atMs: at('17:00'), tempF: 17 }]);
  });

  it('are named with null where the forecast does not reach', () => {
    const hours = hoursBetween(day, at('22:00'), at('22:00') + 4 * hourMs);
    expect(hours.map((hour) => hour.tempF)).toEqual([22, 23, null, null]);
    expect(hoursBetween(day, at('00:00') - 2 * hourMs, at('01:00')).map((hour) => hour.tempF)).toEqual([
      null,
      null,
      0,
    ]);
  });

  it.each([0, -hourMs])('are none in a window of %i ms', (length) => {
    expect(hoursBetween(day, at('12:00'), at('12:00') + length)).toEqual([]);
  });
});
