import type { DayFacts, RoutePlace } from '../day-facts';

const hourMs = 3_600_000;
/** A gap of up to 3 h hides little and may be bridged; a longer one may hide the low. */
const bridgedHours = 3;
/** The service forecasts about a week; a place that ends sooner than this has a hole, not a horizon. Assumption. */
const usualReachHours = 6 * 24;

export type Coverage = 'known' | 'far' | 'missing';

/** Whether the weather of a place is known for the hours that count from now on. */
export function coverageOf(facts: DayFacts, place: RoutePlace): Coverage {
  const { weather } = place;
  const fromMs = Math.max(place.fromMs, Math.ceil(facts.nowMs / hourMs) * hourMs);
  const reach = weather === null ? facts.nowMs : weather.coverageEndMs;
  const usualReach = facts.nowMs + usualReachHours * hourMs;
  if (weather === null) return place.toMs > usualReach ? 'far' : 'missing';
  if (fromMs >= place.toMs) return 'known';
  if (place.toMs > Math.max(reach + bridgedHours * hourMs, usualReach)) return 'far';
  return weather.longestGapHours(fromMs, place.toMs) > bridgedHours
    ? place.toMs > usualReach && reach < place.toMs
      ? 'far'
      : 'missing'
    : 'known';
}
