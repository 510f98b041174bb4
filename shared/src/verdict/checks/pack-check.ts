import type { Pack } from '../../contract/days';
import type { DayFacts } from '../day-facts';
import type { DraftReason } from '../draft-reason';
import { coverageOf } from './coverage';

/** The lowest and highest daily high along the route, °F; null while the weather is not known. */
function highs(facts: DayFacts): { least: number; most: number } | null {
  const all = facts.places.flatMap((place) => {
    if (coverageOf(facts, place) !== 'known') return [];
    const range = place.weather?.window(place.fromMs, place.toMs);
    return range ? [range.highF] : [];
  });
  return all.length > 0 ? { least: Math.min(...all), most: Math.max(...all) } : null;
}

/** The pack by rule of thumb: heat when a high is under the one limit, cold when one is over the other, none on both. */
export function packOf(facts: DayFacts): Pack {
  const range = highs(facts);
  if (!range) return 'none';
  const heat = range.least < facts.policy.heatPackBelowF;
  const cold = range.most > facts.policy.coldPackAboveF;
  if (heat && !cold) return facts.hoursInBox + facts.policy.heatPackSpareHours > 40 ? 'heat-72' : 'heat-40';
  return cold && !heat ? 'cold' : 'none';
}

/** Says which pack, and whether its hours last with a day to spare (design 5.5). */
export function packCheck(facts: DayFacts): DraftReason[] {
  const range = highs(facts);
  if (!range) return [];
  const pack = packOf(facts);
  const values = { pack, belowF: facts.policy.heatPackBelowF, highF: range.most };
  const found: DraftReason[] = [{ code: 'pack', verdict: 'open', values }];
  const needHours = facts.hoursInBox + facts.policy.heatPackSpareHours;
  if (pack === 'heat-72' && needHours > 72)
    found.push({ code: 'pack-short', verdict: 'tight', values: { hours: 72, needHours, longer: null } });
  return found;
}
