import { defaultPolicy } from '../../policy/policy';
import { dayFacts } from '../day-facts';
import { sampleQuestion } from '../question-samples';
import { readinessCheck } from './readiness-check';

/** Shipped on Wednesday, December 2, arriving on the 3rd. */
const look = (changes: Parameters<typeof sampleQuestion>[0] = {}) =>
  readinessCheck(dayFacts(sampleQuestion(changes)));
const codes = (changes: Parameters<typeof sampleQuestion>[0]) => look(changes).map(({ code }) => code);

describe('a parcel', () => {
  it('of which nothing is said is held back by nothing', () => {
    expect(look()).toEqual([]);
  });

  it('goes from the day it is ready to the latest day, both included', () => {
    expect(codes({ readyFrom: '2026-12-02', latestDate: '2026-12-02' })).toEqual([]);
    expect(codes({ readyFrom: '2026-12-03' })).toEqual(['not-ready']);
    expect(codes({ latestDate: '2026-12-01' })).toEqual(['too-late']);
  });

  // Three days without food before travelling: common practice, no source.
  it.each([
    ['2026-11-28', []],
    ['2026-11-29', []],
    ['2026-11-30', ['fed-lately']],
    ['2026-12-02', ['fed-lately']],
    ['2026-12-05', ['fed-lately']],
  ])('that last ate on %s', (lastMealDate, expected) => {
    expect(codes({ lastMealDate })).toEqual(expected);
  });

  it('waits as many days after a meal as the circle keeps', () => {
    expect(codes({ lastMealDate: '2026-11-29', policy: { ...defaultPolicy, fastDays: 4 } })).toEqual([
      'fed-lately',
    ]);
    expect(codes({ lastMealDate: '2026-12-02', policy: { ...defaultPolicy, fastDays: 0 } })).toEqual([]);
  });

  it('needs its breeder on the ship day, the first and the last day away included', () => {
    const away = (from: string, to: string) => codes({ breederDaysAway: [{ from, to }] });
    expect(away('2026-12-02', '2026-12-08')).toEqual(['breeder-away']);
    expect(away('2026-11-20', '2026-12-02')).toEqual(['breeder-away']);
    expect(away('2026-11-20', '2026-12-01')).toEqual([]);
    // Away on the arrival day only: somebody else is there then.
    expect(away('2026-12-03', '2026-12-03')).toEqual([]);
  });

  it('needs its buyer on the morning it arrives, not on the day it is shipped', () => {
    const said = (...mornings: { date: string; suits: boolean }[]) =>
      look({ mornings }).map(({ code, verdict }) => `${code}: ${verdict}`);
    expect(said({ date: '2026-12-03', suits: true })).toEqual([]);
    expect(said({ date: '2026-12-03', suits: false })).toEqual(['buyer-away: shut']);
    expect(said({ date: '2026-12-02', suits: false })).toEqual([]);
    expect(said({ date: '2026-12-04', suits: true })).toEqual(['buyer-not-said: tight']);
  });
});
