import { Settings } from 'luxon';
import type { Availability } from '@shared/contract';
import { spanText, withAway, withDrivingDay, withoutAway, withoutDrivingDay } from './availability-edits';

const week = { from: '2026-12-07', to: '2026-12-11', note: 'Reptile show' };
const before: Availability = { daysAway: [week], drivingDays: [{ date: '2026-12-12', free: true }] };

beforeEach(() => {
  Settings.defaultLocale = 'en-US';
  Settings.now = () => Date.UTC(2026, 11, 1, 12);
});

describe('days away', () => {
  it('are kept in order of time, whenever they were entered', () => {
    const day = { from: '2026-12-03', to: '2026-12-03', note: '  dentist ' };
    expect(withAway(before, day).daysAway).toEqual([{ ...day, note: 'dentist' }, week]);
  });

  it('are taken out one by one, also where two are the same', () => {
    const twice = { ...before, daysAway: [week, week] };
    expect(withoutAway(twice, week).daysAway).toEqual([week]);
  });

  it('leave the driving days alone', () => {
    expect(withAway(before, week).drivingDays).toBe(before.drivingDays);
    expect(withoutAway(before, week).drivingDays).toBe(before.drivingDays);
  });

  it.each([
    ['2026-12-07', '2026-12-09', 'Mon, Dec 7 to Wed, Dec 9'],
    ['2026-12-07', '2026-12-07', 'Mon, Dec 7'],
  ])('from %s to %s read "%s"', (from, to, text) => {
    expect(spanText({ from, to })).toBe(text);
  });
});

describe('single driving days', () => {
  it('say one thing of a day: the last word counts', () => {
    expect(withDrivingDay(before, { date: '2026-12-12', free: false }).drivingDays).toEqual([
      { date: '2026-12-12', free: false },
    ]);
  });

  it('are kept in order and taken out by their date', () => {
    const two = withDrivingDay(before, { date: '2026-12-05', free: true });
    expect(two.drivingDays.map((day) => day.date)).toEqual(['2026-12-05', '2026-12-12']);
    expect(withoutDrivingDay(two, '2026-12-05')).toEqual(before);
  });
});
