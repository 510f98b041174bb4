import type { Blackout, BlackoutList } from '@shared/contract';
import { calendarMonth, dateForKey } from './calendar-grid';

const blackout = (id: number, title: string): Blackout => ({
  id,
  title,
  kind: 'range',
  startDate: null,
  endDate: null,
  rules: null,
  liftedDates: [],
  scope: 'everywhere',
  carrierId: null,
  state: null,
  counterId: null,
  note: '',
  source: 'admin',
  createdAt: '2026-01-01T00:00:00.000Z',
  version: 1,
});
const on = (blackoutId: number, ...dates: string[]): BlackoutList['days'] =>
  dates.map((date) => ({ date, blackoutId }));

const list: BlackoutList = {
  blackouts: [blackout(1, 'Christmas'), blackout(2, 'Hub works')],
  days: [...on(1, '2026-12-25'), ...on(2, '2026-12-24', '2026-12-25', '2026-12-26', '2026-12-27')],
};

describe('the month calendar', () => {
  const month = calendarMonth('2026-12', list, '2026-12-01');
  const day = (date: string) => month.weeks.flat().find((found) => found.date === date);

  // By a printed calendar: December 2026 begins on a Tuesday and has five American weeks.
  it('fills whole weeks from Sunday on', () => {
    expect(month.weeks).toHaveLength(5);
    expect(month.weeks[0]?.map((found) => found.day)).toEqual([29, 30, 1, 2, 3, 4, 5]);
    expect(month.weeks[0]?.[0]).toMatchObject({ isInMonth: false, bars: [] });
    expect(month.weeks[4]?.at(-1)?.date).toBe('2027-01-02');
    expect(day('2026-12-01')?.isToday).toBe(true);
  });

  it('keeps a bar of several days on one height, above shorter ones', () => {
    expect(day('2026-12-24')?.bars.map((bar) => [bar.blackout.id, bar.lane])).toEqual([[2, 0]]);
    expect(day('2026-12-25')?.bars.map((bar) => [bar.blackout.id, bar.lane])).toEqual([
      [2, 0],
      [1, 1],
    ]);
  });

  it('leaves a title the room of its bar in the week', () => {
    // 24 to 26 December 2026 are Thursday to Saturday, the last days of an American week.
    expect(day('2026-12-24')?.bars[0]?.span).toBe(3);
    expect(day('2026-12-27')?.bars[0]?.span).toBe(1);
  });

  it('names a bar at its beginning and again in each week', () => {
    expect(day('2026-12-24')?.bars[0]).toMatchObject({ starts: true, ends: false, isNamed: true });
    expect(day('2026-12-25')?.bars[0]).toMatchObject({ starts: false, ends: false, isNamed: false });
    expect(day('2026-12-27')?.bars[0]).toMatchObject({ starts: false, ends: true, isNamed: true });
  });
});

describe('keys in the month calendar', () => {
  it.each([
    ['ArrowRight', '2026-12-31', '2027-01-01'],
    ['ArrowUp', '2026-12-03', '2026-11-26'],
    ['Home', '2026-12-09', '2026-12-06'],
    ['End', '2026-12-09', '2026-12-12'],
    ['PageDown', '2027-01-31', '2027-02-28'],
    ['PageUp', '2027-01-15', '2026-12-15'],
  ])('%s from %s goes to %s', (key, from, to) => expect(dateForKey(from, key)).toBe(to));

  it('leaves other keys alone', () => expect(dateForKey('2026-12-09', 'a')).toBeNull());
});
