import type { Blackout } from '@shared/contract';
import { nextDays, ruleGroups, scopeText, whenText } from './blackout-words';

const blackout = (over: Partial<Blackout>): Blackout => ({
  id: 1,
  title: 'Closed',
  kind: 'date',
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
  ...over,
});
const names = { carriers: [{ id: 3, name: 'Larkspur Overnight', hubId: 1 }], counters: [] };
const christmas = 'FREQ=YEARLY;BYMONTH=12;BYMONTHDAY=25';

describe('for whom a blackout closes', () => {
  it.each<[Partial<Blackout>, string]>([
    [{ scope: 'everywhere' }, 'everywhere'],
    [{ scope: 'carrier', carrierId: 3 }, 'Larkspur Overnight'],
    [{ scope: 'state', state: 'AZ' }, 'Arizona'],
    [{ scope: 'counter', counterId: 99 }, 'one counter'],
  ])('%j is %s', (over, text) => expect(scopeText(blackout(over), names)).toBe(text));
});

describe('when it holds', () => {
  it('names both ends of a range, and the year when it is another', () => {
    const range = blackout({ kind: 'range', startDate: '2031-12-24', endDate: '2032-01-02' });
    expect(whenText(range)).toBe('Wed, Dec 24, 2031 – Fri, Jan 2, 2032');
  });
  it('says a yearly rule in words', () => {
    expect(whenText(blackout({ kind: 'yearly', rules: christmas }))).toBe('Every December 25');
  });
});

describe('the next days of a blackout', () => {
  it('are found years ahead, lifted ones among them so that they can be closed again', () => {
    const yearly = blackout({ kind: 'yearly', rules: christmas, liftedDates: ['2027-12-25'] });
    expect(nextDays(yearly, '2026-12-01', 3)).toEqual(['2026-12-25', '2027-12-25', '2028-12-25']);
  });
  it('are none while the rule is still being written', () => {
    expect(nextDays(blackout({ kind: 'yearly', rules: 'FREQ=YEARLY;BYMON' }), '2026-12-01', 3)).toEqual([]);
  });
});

describe('the list of rules', () => {
  it('stands in groups, the nearest first', () => {
    const groups = ruleGroups(
      [
        blackout({ id: 1, kind: 'yearly', rules: christmas }),
        blackout({ id: 2, startDate: '2026-12-20' }),
        blackout({ id: 3, startDate: '2026-12-10' }),
        blackout({ id: 4, startDate: '2026-11-10' }),
      ],
      '2026-12-01',
    );
    expect(groups.map(({ title, rows }) => [title, rows.map((row) => row.blackout.id)])).toEqual([
      ['Certain days', [3, 2]],
      ['Every year', [1]],
      ['Over', [4]],
    ]);
  });
  it('skips a lifted day when it tells the next one', () => {
    const lifted = blackout({ kind: 'yearly', rules: christmas, liftedDates: ['2026-12-25'] });
    expect(ruleGroups([lifted], '2026-12-01')[0]?.rows[0]?.next).toBe('2027-12-25');
  });
});
