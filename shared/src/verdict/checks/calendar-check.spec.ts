import { defaultPolicy } from '../../policy/policy';
import { dayFacts } from '../day-facts';
import { sampleCounter, sampleQuestion, texas } from '../question-samples';
import { calendarCheck } from './calendar-check';

type Changes = Parameters<typeof sampleQuestion>[0];
const look = (changes: Changes = {}) => calendarCheck(dayFacts(sampleQuestion(changes)));
const says = (changes: Changes = {}) => look(changes).map(({ code, verdict }) => `${code}: ${verdict}`);
const everyDay = [1, 2, 3, 4, 5, 6, 7];
const cutOffs = Object.fromEntries(everyDay.map((weekday) => [String(weekday), 1020]));

describe('the carrier’s calendar', () => {
  // The week of Tuesday, December 1, 2026, between two counters that work Monday to Friday.
  it.each([
    ['Tuesday', '2026-12-01', ['slack: open']],
    ['Wednesday', '2026-12-02', ['slack: open']],
    ['Thursday', '2026-12-03', ['no-slack: tight']],
    ['Friday', '2026-12-04', ['arrival-closed: shut']],
    ['Saturday', '2026-12-05', ['origin-closed: shut', 'arrival-closed: shut']],
    ['Sunday', '2026-12-06', ['origin-closed: shut', 'slack: open']],
    ['Monday', '2026-12-07', ['slack: open']],
  ])('on a %s', (_weekday, shipDate, expected) => {
    expect(says({ shipDate })).toEqual(expected);
  });

  it('counts slack by the days of the counter that holds the parcel, not by those of the drop-off', () => {
    const sundays = sampleCounter(9, 'Tampa', 'FL', 'America/New_York', { workingDays: everyDay });
    expect(look({ shipDate: '2026-12-04', destination: { kind: 'hold', counter: sundays } })).toEqual([
      { code: 'slack', verdict: 'open', values: { days: 2 } },
    ]);
    expect(
      says({ shipDate: '2026-12-05', origin: { ...texas, workingDays: everyDay, cutOffMinutes: cutOffs } }),
    ).toEqual(['arrival-closed: shut']);
  });

  it('knows a door for Monday to Friday', () => {
    const door = { name: 'the door', city: 'Phoenix', state: 'AZ', zone: 'America/Phoenix' };
    const at = (shipDate: string) => says({ shipDate, destination: { kind: 'door', door } });
    expect(at('2026-12-04')).toEqual(['arrival-closed: shut']);
    expect(at('2026-12-03')).toEqual(['no-slack: tight']);
  });

  it('asks for as much slack as the circle wants', () => {
    const want = (minSlackDays: number, shipDate: string) =>
      says({ shipDate, policy: { ...defaultPolicy, minSlackDays } });
    expect(want(1, '2026-12-03')).toEqual(['no-slack: shut']);
    expect(want(1, '2026-12-02')).toEqual(['slack: open']);
    expect(want(2, '2026-12-02')).toEqual(['no-slack: shut']);
    expect(want(2, '2026-12-01')).toEqual(['slack: open']);
  });

  it('says when a late parcel would be handed out, over a holiday weekend too', () => {
    const holiday = {
      title: 'Birthday of Martin Luther King, Jr.',
      kind: 'date' as const,
      startDate: '2027-01-18',
      endDate: null,
      rules: null,
      liftedDates: [],
      scope: 'everywhere' as const,
      carrierId: null,
      state: null,
      counterId: null,
    };
    const thursday = { shipDate: '2027-01-14', now: '2027-01-13T12:00:00.000Z', blackouts: [holiday] };
    expect(look(thursday)).toEqual([
      {
        code: 'no-slack',
        verdict: 'tight',
        values: { place: 'Phoenix counter', days: 0, next: '2027-01-19' },
      },
    ]);
  });

  it('closes at the cut-off itself, not a second before', () => {
    // 17:00 in Texas in winter is 23:00 UTC.
    const at = (now: string) => says({ now, shipDate: '2026-12-01' });
    expect(at('2026-12-01T22:59:59.000Z')).toEqual(['slack: open']);
    expect(at('2026-12-01T23:00:00.000Z')).toEqual(['cut-off-passed: shut', 'slack: open']);
  });

  it('takes nothing at a counter on a weekday for which it has no cut-off', () => {
    const origin = { ...texas, cutOffMinutes: { '1': 1020, '2': 1020, '4': 1020, '5': 1020 } };
    expect(look({ origin })[0]).toEqual({
      code: 'origin-closed',
      verdict: 'shut',
      values: { place: 'San Antonio counter', date: '2026-12-02', title: null },
    });
  });

  it('is over on a day that is past by the clock of the drop-off counter, and ends where offers end', () => {
    // 05:00 UTC on December 3 is still December 2 in Texas.
    const at = (now: string) => says({ now, shipDate: '2026-12-02' });
    expect(at('2026-12-03T05:00:00.000Z')).not.toContain('past: shut');
    expect(at('2026-12-03T06:00:00.000Z')).toContain('past: shut');
    // Sixty days from December 1 is Saturday, January 30.
    expect(says({ shipDate: '2027-01-30' })).not.toContain('beyond-offer: shut');
    expect(says({ shipDate: '2027-01-31' })).toContain('beyond-offer: shut');
  });
});
