import type { DayFacts } from '../day-facts';
import type { DraftReason } from '../draft-reason';
import { coverageOf } from './coverage';

const names = { origin: 'shipDate', hub: 'shipDate', destination: 'arrivalDate' } as const;

/** Whether there is a forecast that a verdict may rest on, and how old it is. */
export function forecastCheck(facts: DayFacts): DraftReason[] {
  return facts.places.flatMap((place): DraftReason[] => {
    const date = facts[names[place.role]];
    const coverage = coverageOf(facts, place);
    if (coverage === 'missing')
      return [{ code: 'no-forecast', verdict: 'shut', values: { place: place.name, date } }];
    if (coverage === 'far' || place.weather === null)
      return [{ code: 'forecast-far', verdict: 'far', values: { place: place.name, date } }];
    const hours = (facts.nowMs - place.weather.issuedMs) / 3_600_000;
    const mostHours = facts.policy.forecastMaxAgeHours;
    return hours > mostHours
      ? [{ code: 'forecast-old', verdict: 'tight', values: { place: place.name, hours, mostHours } }]
      : [];
  });
}
