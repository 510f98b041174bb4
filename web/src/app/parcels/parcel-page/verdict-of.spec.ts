import type { Problem } from '@shared/contract';
import { sampleDay } from '../parcel-samples';
import { verdictOf, withVerdict } from './verdict-of';

const problem = (rest: Record<string, unknown>): Problem => ({
  type: 'urn:dayberth:problem:day-not-offered',
  title: 'That day is not offered any more',
  status: 409,
  code: 'day-not-offered',
  errors: [],
  ...rest,
});

describe('a day that is not offered any more', () => {
  it('comes with its present verdict', () => {
    const current = sampleDay({ verdict: 'shut' });
    expect(verdictOf(problem({ current }))).toEqual(current);
  });

  it.each([
    [{}],
    [{ current: null }],
    [{ current: { version: 4 } }],
    [{ current: { date: '2026-12-08', verdict: 'fine', reasons: [] } }],
  ])('is not made up from %j', (rest) => {
    expect(verdictOf(problem(rest))).toBeNull();
  });

  it('takes its place in the strip, and its run stays', () => {
    const run = { id: 3, state: 'confirmed', roomL: 18 };
    const days = [sampleDay({ date: '2026-12-07' }), sampleDay({ date: '2026-12-08', run })];
    const now = withVerdict(days, sampleDay({ date: '2026-12-08', verdict: 'shut' }));
    expect(now.map((day) => day.verdict)).toEqual(['open', 'shut']);
    expect(now[1]?.run).toEqual(run);
  });
});
