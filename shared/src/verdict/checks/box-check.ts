import type { RangeF, Verdict } from '../../contract/days';
import type { BandFit } from '../../thermal/chance';
import type { BoxJudgement } from '../../thermal/judge-box';
import type { BoxRun } from '../../thermal/simulate';
import type { DayFacts } from '../day-facts';
import type { DraftReason } from '../draft-reason';
import { sigmaF } from './rail-check';

/** What the animal will feel: the chance to stay in its band at the planned arrival, and to endure a day more (design 5.5). */
export function boxCheck(facts: DayFacts, judged: BoxJudgement): DraftReason[] {
  const { limits, policy } = facts;
  const { open, tight, lateOpen, lateTight } = policy.chance;
  const band = { lowF: limits.bandLowF, highF: limits.bandHighF };
  const found = [reason(facts, 'box', judged.chance, [open, tight], judged.nominal, judged.fit, band)];
  if (!judged.late) return [...found, { code: 'late-unknown', verdict: 'tight', values: {} }];
  const { chance, run, fit } = judged.late;
  const endurance = { lowF: limits.enduranceLowF, highF: limits.enduranceHighF };
  return [...found, reason(facts, 'box-late', chance, [lateOpen, lateTight], run, fit, endurance)];
}

function reason(
  facts: DayFacts,
  code: 'box' | 'box-late',
  chance: number,
  [open, tight]: readonly [number, number],
  run: BoxRun,
  fit: BandFit,
  band: RangeF,
): DraftReason {
  const verdict: Verdict = chance >= open ? 'open' : chance >= tight ? 'tight' : 'shut';
  const isCold =
    fit.stuckPoint >= 0 ? (run.tempF[fit.stuckPoint] ?? 0) < band.lowF : -fit.leastF <= fit.mostF;
  const point = fit.stuckPoint >= 0 ? fit.stuckPoint : isCold ? fit.lowPoint : fit.highPoint;
  const tempF = run.tempF[point] ?? NaN;
  const leg = run.legs[Math.max(0, point - 1)];
  const place = facts.places.find(({ role }) => role === leg?.role);
  const limitF = isCold ? band.lowF : band.highF;
  return {
    code,
    verdict,
    values: {
      chance: Math.round(chance * 10_000) / 10_000,
      tempF: Math.round(tempF * 10) / 10,
      byF: Math.round((isCold ? tempF - limitF : limitF - tempF) * 10) / 10,
      side: isCold ? 'low' : 'high',
      limitF,
      lowF: band.lowF,
      highF: band.highF,
      at: new Date(run.atMs[point] ?? 0).toISOString(),
      leg: leg?.kind ?? null,
      place: place?.name ?? null,
      zone: place?.zone ?? facts.origin.zone,
      species: speciesOf(facts, code, isCold, limitF),
      sigmaF: sigmaF(facts),
      leadDays: Math.max(0, facts.leadDays),
    },
  };
}

function speciesOf(
  { contents }: DayFacts,
  code: 'box' | 'box-late',
  isCold: boolean,
  limitF: number,
): string | null {
  const end =
    code === 'box' ? (isCold ? 'bandLowF' : 'bandHighF') : isCold ? 'enduranceLowF' : 'enduranceHighF';
  return contents.find((line) => line.species[end] === limitF)?.species.commonName ?? null;
}
