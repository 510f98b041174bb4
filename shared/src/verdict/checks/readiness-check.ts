import { daysBetween } from '../../calendar/days-between';
import type { DayFacts } from '../day-facts';
import type { DraftReason } from '../draft-reason';

/** The parcel, its breeder and its buyer: ready, fed long enough ago, somebody there at both ends. */
export function readinessCheck(facts: DayFacts): DraftReason[] {
  const { shipDate, arrivalDate, policy } = facts;
  const found: DraftReason[] = [];
  const add = (verdict: 'shut' | 'tight', code: string, values: DraftReason['values']) =>
    found.push({ code, verdict, values });
  if (facts.readyFrom !== null && shipDate < facts.readyFrom)
    add('shut', 'not-ready', { date: facts.readyFrom });
  if (facts.latestDate !== null && shipDate > facts.latestDate)
    add('shut', 'too-late', { date: facts.latestDate });
  if (facts.lastMealDate !== null) {
    const days = daysBetween(facts.lastMealDate, shipDate);
    if (days < policy.fastDays) add('shut', 'fed-lately', { days, need: policy.fastDays });
  }
  if (facts.breederDaysAway.some((span) => span.from <= shipDate && shipDate <= span.to))
    add('shut', 'breeder-away', { date: shipDate });
  const said = facts.mornings.find((morning) => morning.date === arrivalDate);
  if (said && !said.suits) add('shut', 'buyer-away', { date: arrivalDate });
  else if (!said && facts.mornings.some((morning) => morning.suits))
    add('tight', 'buyer-not-said', { date: arrivalDate });
  return found;
}
