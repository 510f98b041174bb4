import type { Verdict } from '../contract/days';

/** From best to worst: unknown weather weighs more than a little room, and a day that is shut stays shut. */
const severity: Readonly<Record<Verdict, number>> = { open: 0, tight: 1, far: 2, shut: 3 };

/** How bad a verdict is: open 0, tight 1, far 2, shut 3. */
export const verdictSeverity = (verdict: Verdict): number => severity[verdict];

/** The worst of some verdicts; `open` of none. */
export const worstVerdict = (verdicts: readonly Verdict[]): Verdict =>
  verdicts.reduce<Verdict>((worst, one) => (severity[one] > severity[worst] ? one : worst), 'open');
