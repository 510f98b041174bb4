import type { DayFacts, RoutePlace } from '../day-facts';
import type { DraftReason } from '../draft-reason';
import type { Extremes } from '../place-weather';
import { coverageOf } from './coverage';

interface Limit {
  readonly valueF: number;
  /** Named when the species' own limit is the tighter one. */
  readonly species: string | null;
}
interface Rail {
  readonly low: Limit;
  readonly high: Limit;
}

/** One standard deviation of the forecast error for the day, °F; the last value stands for later days. */
export const sigmaF = (facts: DayFacts): number => {
  const list = facts.policy.sigmaF;
  return list[Math.min(Math.max(facts.leadDays, 0), list.length - 1)] ?? 0;
};

/**
 * The plain outdoor limits (design 5.5): at either end on both days, at the sort hub overnight. Inside by less than one
 * forecast error is tight; outside is shut, whatever a box model says.
 */
export function railCheck(facts: DayFacts): DraftReason[] {
  const found: DraftReason[] = [];
  let marginF = Infinity;
  for (const place of facts.places) {
    if (coverageOf(facts, place) !== 'known' || !place.weather) continue;
    const range = place.weather.window(place.fromMs, place.toMs);
    if (!range) continue;
    const { reasons, insideF } = look(facts, place, range, railOf(facts, place));
    found.push(...reasons);
    marginF = Math.min(marginF, insideF);
  }
  if (found.length > 0 || facts.outdoor === null || marginF === Infinity) return found;
  return [{ code: 'outdoors-fine', verdict: 'open', values: { ...facts.outdoor, marginF } }];
}

function railOf(facts: DayFacts, place: RoutePlace): Rail {
  const { policy, service, limits, contents } = facts;
  if (place.role === 'hub')
    return {
      low: { valueF: policy.hubRail.lowF, species: null },
      high: { valueF: policy.hubRail.highF, species: null },
    };
  const rail = policy.guardRails[service];
  const lowF = Math.max(rail.lowF, limits.outdoorLowF ?? -Infinity);
  const highF = Math.min(rail.highF, limits.outdoorHighF ?? Infinity);
  const by = (f: number, end: 'outdoorLowF' | 'outdoorHighF') =>
    contents.find((line) => line.species[end] === f)?.species.commonName ?? null;
  return {
    low: { valueF: lowF, species: lowF > rail.lowF ? by(lowF, 'outdoorLowF') : null },
    high: { valueF: highF, species: highF < rail.highF ? by(highF, 'outdoorHighF') : null },
  };
}

function look(
  facts: DayFacts,
  place: RoutePlace,
  range: Extremes,
  rail: Rail,
): { reasons: DraftReason[]; insideF: number } {
  const sigma = sigmaF(facts);
  const at = (ms: number) => new Date(ms).toISOString();
  const common = {
    place: place.name,
    zone: place.zone,
    sigmaF: sigma,
    leadDays: Math.max(0, facts.leadDays),
  };
  const aboveF = range.lowF - rail.low.valueF;
  const belowF = rail.high.valueF - range.highF;
  const reasons: DraftReason[] = [];
  if (aboveF < sigma)
    reasons.push({
      code: aboveF < 0 ? 'too-cold' : 'near-cold',
      verdict: aboveF < 0 ? 'shut' : 'tight',
      values: {
        ...common,
        at: at(range.lowAtMs),
        lowF: range.lowF,
        limitF: rail.low.valueF,
        byF: Math.abs(aboveF),
        species: rail.low.species,
      },
    });
  if (belowF < sigma)
    reasons.push({
      code: belowF < 0 ? 'too-hot' : 'near-hot',
      verdict: belowF < 0 ? 'shut' : 'tight',
      values: {
        ...common,
        at: at(range.highAtMs),
        highF: range.highF,
        limitF: rail.high.valueF,
        byF: Math.abs(belowF),
        species: rail.high.species,
      },
    });
  return { reasons, insideF: Math.min(aboveF, belowF) };
}
