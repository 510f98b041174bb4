import type { Counter } from '@shared/contract';
import { circleMinute, poolCounter } from './run-world';

const zone = 'America/Chicago';
const phoenix: Counter = {
  id: 7,
  carrierId: 1,
  name: 'Phoenix counter',
  street: '100 Ramp Road',
  city: 'Phoenix',
  state: 'AZ',
  postalCode: '85034',
  lat: 33.43,
  lon: -112.01,
  zone: 'America/Phoenix',
  canDropOff: true,
  canHold: true,
  workingDays: [1, 2, 3, 4, 5],
  cutOffMinutes: { '1': 1020, '2': 1020, '5': 900 },
  openingHours: {},
  commitMinute: 540,
  active: true,
  version: 1,
};

describe("a counter's cut-off on the circle's clock", () => {
  it('is two hours later in Texas than in Phoenix in summer, one in winter (Arizona keeps standard time)', () => {
    // Mondays; 17:00 in Phoenix.
    expect(poolCounter(phoenix, ['2026-07-06', '2026-12-07'], zone).cutOffMinutes).toEqual({
      '2026-07-06': 19 * 60,
      '2026-12-07': 18 * 60,
    });
  });

  it('is that of its weekday, and a weekday without one takes nothing', () => {
    const days = ['2026-12-08', '2026-12-09', '2026-12-11'];
    expect(poolCounter(phoenix, days, zone).cutOffMinutes).toEqual({ '2026-12-08': 1080, '2026-12-11': 960 });
  });

  it('is none at a counter that is retired or takes no drop-offs', () => {
    expect(poolCounter({ ...phoenix, active: false }, ['2026-12-07'], zone).cutOffMinutes).toEqual({});
    expect(poolCounter({ ...phoenix, canDropOff: false }, ['2026-12-07'], zone).cutOffMinutes).toEqual({});
  });
});

describe("an instant on the circle's clock", () => {
  it('counts minutes on the clock face, also past the change of the clocks', () => {
    // Sunday 14 March 2027: 02:00 became 03:00, so 15:00 UTC is 10:00 and not 09:00.
    expect(circleMinute(Date.parse('2027-03-14T15:00:00Z'), '2027-03-14', zone)).toBe(600);
    // Sunday 7 November 2027: 01:00 came twice; 15:00 UTC is 09:00.
    expect(circleMinute(Date.parse('2027-11-07T15:00:00Z'), '2027-11-07', zone)).toBe(540);
  });

  it('goes past midnight and before it', () => {
    expect(circleMinute(Date.parse('2026-12-08T07:30:00Z'), '2026-12-07', zone)).toBe(1440 + 90);
    expect(circleMinute(Date.parse('2026-12-07T05:00:00Z'), '2026-12-07', zone)).toBe(-60);
  });
});
