import type { Pack } from '../../contract/days';
import type { DayFacts } from '../day-facts';
import type { DraftReason } from '../draft-reason';
import { coverageOf } from './coverage';

const ratedHours = { 'heat-40': 40, 'heat-72': 72 } as const;

/** The lowest and highest daily high along the route, °F; null while the weather is not known. */
function highs(facts: DayFacts): { least: number; most: number } | null {
  const all = facts.places.flatMap((place) => {
    if (coverageOf(facts, place) !== 'known') return [];
    const range = place.weather?.window(place.fromMs, place.toMs);
    return range ? [range.highF] : [];
  });
  return all.length > 0 ? { least: Math.min(...all), most: Math.max(...all) } : null;
}

/** Hours a pack must last: the planned time in the box and the spare ones of the policy. */
const neededHours = (facts: DayFacts): number => facts.hoursInBox + facts.policy.heatPackSpareHours;

/**
 * The packs that come into question, the least first: heat only when a high along the route is under the one limit, cold only when
 * one is over the other (common practice, no source). Of the heat packs those that last a day longer than planned, else the longest.
 */
export function packsToTry(facts: DayFacts): Pack[] {
  const range = highs(facts);
  if (!range) return ['none'];
  const packs: Pack[] = ['none'];
  if (range.least < facts.policy.heatPackBelowF) {
    if (neededHours(facts) <= ratedHours['heat-40']) packs.push('heat-40');
    packs.push('heat-72');
  }
  if (range.most > facts.policy.coldPackAboveF) packs.push('cold');
  return packs;
}

/** Says which pack it is, and when even the longest does not last with a day to spare (design 5.5). */
export function packReasons(facts: DayFacts, pack: Pack): DraftReason[] {
  const range = highs(facts);
  if (!range) return [];
  const { heatPackBelowF: belowF, coldPackAboveF: aboveF } = facts.policy;
  const found: DraftReason[] = [
    {
      code: 'pack',
      verdict: 'open',
      values: { pack, belowF, aboveF, lowHighF: range.least, highF: range.most },
    },
  ];
  const needHours = neededHours(facts);
  if ((pack === 'heat-40' || pack === 'heat-72') && needHours > ratedHours[pack])
    found.push({
      code: 'pack-short',
      verdict: 'tight',
      values: { hours: ratedHours[pack], needHours, longer: pack === 'heat-40' ? 72 : null },
    });
  return found;
}
