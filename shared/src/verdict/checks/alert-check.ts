import type { DayFacts } from '../day-facts';
import type { DraftReason } from '../draft-reason';

/** Warnings in force where and when the parcel is (design 5.5). When nobody knows whether there are any, a day is not open. */
export function alertCheck(facts: DayFacts): DraftReason[] {
  const shutting = new Set(facts.policy.shutAlerts.map((event) => event.toLowerCase()));
  return facts.places.flatMap((place): DraftReason[] => {
    if (!place.weather) return [];
    const { alerts } = place.weather.forecast;
    if (alerts === null) return [{ code: 'alerts-unknown', verdict: 'tight', values: { place: place.name } }];
    return alerts
      .filter((alert) => shutting.has(alert.event.toLowerCase()))
      .filter((alert) => Date.parse(alert.from) < place.alertToMs && Date.parse(alert.to) > place.alertFromMs)
      .map((alert) => ({
        code: 'alert',
        verdict: 'shut',
        values: { event: alert.event, place: place.name, from: alert.from, to: alert.to, zone: place.zone },
      }));
  });
}
