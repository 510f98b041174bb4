import type { DayVerdict } from '../contract/days';
import { dayVerdict } from './day-verdict';
import { denver, phoenix, sampleCounter, sampleQuestion, texas } from './question-samples';

const ask = (changes: Parameters<typeof sampleQuestion>[0]): DayVerdict =>
  dayVerdict(sampleQuestion(changes));
const codes = (day: DayVerdict): string[] => day.reasons.map((reason) => reason.code);

describe('the clocks of a journey', () => {
  it('keeps the clock of each place over a change of the clocks', () => {
    // On Sunday, March 14, 2027 Denver goes from UTC−7 to UTC−6 (Energy Policy Act of 2005: second Sunday of March).
    const change = (shipDate: string, now: string) =>
      ask({ shipDate, now, destination: { kind: 'hold', counter: denver } }).arrival.at;
    expect(change('2027-03-11', '2027-03-10T12:00:00.000Z')).toBe('2027-03-12T16:00:00.000Z');
    expect(change('2027-03-15', '2027-03-12T12:00:00.000Z')).toBe('2027-03-16T15:00:00.000Z');
    // November 1, 2026 has 25 hours in Texas: the cut-off of the Monday after is 17:00 there, 23:00 UTC, not 22:00.
    const monday = (now: string) => codes(ask({ shipDate: '2026-11-02', now }));
    expect(monday('2026-11-02T22:30:00.000Z')).not.toContain('cut-off-passed');
    expect(monday('2026-11-02T23:00:00.000Z')).toContain('cut-off-passed');
  });

  const cutOffAt = (minute: number) => ({
    ...texas,
    cutOffMinutes: { '1': minute, '2': minute, '3': minute, '4': minute, '5': minute },
  });
  it.each<[string, Parameters<typeof sampleQuestion>[0]]>([
    ['a cut-off at nine in the evening', { origin: cutOffAt(1260) }],
    ['a cut-off at eight in the morning', { origin: cutOffAt(480) }],
    [
      'a counter that is ready at six in the morning',
      { destination: { kind: 'hold', counter: { ...phoenix, commitMinute: 360, openingHours: {} } } },
    ],
    [
      'a drop-off in Honolulu, where the sort hub’s midnight has long passed',
      { origin: sampleCounter(6, 'Honolulu', 'HI', 'Pacific/Honolulu') },
    ],
  ])('may be unusual and are judged all the same: %s', (_what, changes) => {
    const day = dayVerdict(sampleQuestion(changes), { trace: true });
    expect(day.verdict).toBe('open');
    expect(day.trace?.map(({ at }) => at)).toEqual(day.trace?.map(({ at }) => at).toSorted());
  });

  it('count the hour that the fall gives and the spring takes', () => {
    const week = [1, 2, 3, 4, 5, 6, 7];
    const everyDay = Object.fromEntries(week.map((weekday) => [String(weekday), 1020]));
    const open = { ...texas, workingDays: week, cutOffMinutes: everyDay, openingHours: {} };
    const night = (shipDate: string) => {
      const now = `${shipDate}T12:00:00.000Z`;
      const question = {
        now,
        shipDate,
        origin: open,
        destination: { kind: 'hold' as const, counter: { ...open, id: 4 } },
      };
      const { trace = [], arrival, verdict } = dayVerdict(sampleQuestion(question), { trace: true });
      const planned = trace.filter(({ tempF }) => tempF !== null);
      const [first, last] = [planned[0]?.at ?? '', planned.at(-1)?.at ?? ''];
      return { verdict, at: arrival.at, hours: (Date.parse(last) - Date.parse(first)) / 3_600_000 };
    };
    // Noon to 11:00 on the clock of Texas. Saturday to Sunday, October 31 to November 1, 2026: UTC−5 becomes UTC−6.
    expect(night('2026-10-30')).toEqual({ verdict: 'open', at: '2026-10-31T14:00:00.000Z', hours: 23 });
    expect(night('2026-10-31')).toEqual({ verdict: 'open', at: '2026-11-01T15:00:00.000Z', hours: 24 });
    // March 13 to 14, 2027: UTC−6 becomes UTC−5.
    expect(night('2027-03-13')).toEqual({ verdict: 'open', at: '2027-03-14T14:00:00.000Z', hours: 22 });
  });
});
