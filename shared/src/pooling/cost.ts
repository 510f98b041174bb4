import type { Point, PoolCosts } from './problem';
import { estimateLeg, type Leg } from './travel';

/** What a leg costs a coordinator: mileage and the minutes at the wheel. In cents, not rounded: sums are rounded once. */
export const legCents = (leg: Leg, centsPerMile: number, driverMinuteCents: number): number =>
  leg.miles * centsPerMile + leg.minutes * driverMinuteCents;

/** A trip to the counter and home again, all alone. */
export interface AloneTrip {
  readonly cents: number;
  readonly minutes: number;
  readonly miles: number;
}

/**
 * What a breeder who drives to the counter and back would spend. Valued like a run, so that the two compare: mileage at
 * `aloneCentsPerMile` (the IRS rate by default) and each minute as a coordinator's. Cents are rounded to whole ones.
 */
export function aloneTrip(
  breeder: Point,
  counter: Point,
  costs: PoolCosts,
  aloneCentsPerMile: number,
): AloneTrip {
  const leg = estimateLeg(breeder, counter, costs.circuity);
  return {
    cents: Math.round(2 * legCents(leg, aloneCentsPerMile, costs.driverMinuteCents)),
    minutes: 2 * leg.minutes,
    miles: 2 * leg.miles,
  };
}
