import type { Verdict } from '@shared/contract';
import { bestDay } from './best-day';

const day = (date: string, verdict: Verdict) => ({ date, verdict });

describe('the day to show first', () => {
  it.each([
    [
      'the first open day',
      [day('2026-12-07', 'tight'), day('2026-12-08', 'open'), day('2026-12-09', 'open')],
      '2026-12-08',
    ],
    ['a tight one where none is open', [day('2026-12-07', 'far'), day('2026-12-08', 'tight')], '2026-12-08'],
    ['a far one rather than a shut one', [day('2026-12-11', 'shut'), day('2026-12-14', 'far')], '2026-12-14'],
    ['the first where all are shut', [day('2026-12-11', 'shut'), day('2026-12-12', 'shut')], '2026-12-11'],
    ['none where there are none', [], null],
  ])('is %s', (_rule, days, expected) => {
    expect(bestDay(days)).toBe(expected);
  });
});
