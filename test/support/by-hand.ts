import type { PoolProblem, Slot } from '@shared/pooling/problem';
import type { SequenceProblem } from '@shared/pooling/sequence';
import { estimateLeg } from '@shared/pooling/travel';

/** Every order of the items. */
export function orders<T>(items: readonly T[]): T[][] {
  if (items.length === 0) return [[]];
  return items.flatMap((item, at) =>
    orders(items.filter((_, index) => index !== at)).map((rest) => [item, ...rest]),
  );
}

/** Drives an order from a departure, minute by minute: when it is at the end, or null when a window is missed. */
export function arrival(problem: SequenceProblem, order: readonly number[], depart: number): number | null {
  let minute = depart;
  let here: number | null = null;
  for (const at of order) {
    const stop = problem.stops[at];
    if (!stop) throw new RangeError(`No stop ${at}.`);
    minute += (here === null ? stop.fromStart : problem.between[here]?.[at])?.minutes ?? NaN;
    if (minute > stop.closeMinute) return null;
    minute = Math.max(minute, stop.openMinute) + stop.serviceMinutes;
    here = at;
  }
  return minute + ((here === null ? null : problem.stops[here]?.toEnd.minutes) ?? NaN);
}

/** Whether an order left at that minute keeps windows, cut-off and length. */
export function isKept(problem: SequenceProblem, order: readonly number[], depart: number): boolean {
  const end = arrival(problem, order, depart);
  return (
    end !== null &&
    depart >= problem.earliestDepartMinute &&
    end <= problem.latestArriveMinute &&
    end - depart <= problem.longestMinutes
  );
}

/** The cents of an order, by adding up its legs. */
export function centsOf(problem: SequenceProblem, order: readonly number[]): number {
  const first = problem.stops[order[0] ?? -1]?.fromStart.cents ?? NaN;
  const last = problem.stops[order.at(-1) ?? -1]?.toEnd.cents ?? NaN;
  return order
    .slice(1)
    .reduce(
      (sum, at, index) => sum + (problem.between[order[index] ?? -1]?.[at]?.cents ?? NaN),
      first + last,
    );
}

/** The cheapest order by trying every one at every minute; Infinity when none is kept. */
export function cheapestByHand(problem: SequenceProblem): number {
  let best = Infinity;
  for (const order of orders(problem.stops.map((_, index) => index))) {
    const cents = centsOf(problem, order);
    if (cents >= best) continue;
    for (
      let depart = Math.max(0, problem.earliestDepartMinute);
      depart <= problem.latestArriveMinute;
      depart++
    )
      if (isKept(problem, order, depart)) {
        best = cents;
        break;
      }
  }
  return best;
}

/** The legs of a run, laid out here and not by the program; distances are the program's own estimate. */
export function legsOf(problem: PoolProblem, slot: Slot, stopIds: readonly number[]): SequenceProblem {
  const { costs } = problem;
  const driver = found(problem.coordinators, slot.coordinatorId);
  const counter = found(problem.counters, slot.counterId);
  const stops = stopIds.map((id) => found(problem.stops, id));
  const leg = (a: { lat: number; lon: number }, b: { lat: number; lon: number }) => {
    const { miles, minutes } = estimateLeg(a, b, costs.circuity);
    return { minutes, cents: miles * driver.centsPerMile + minutes * costs.driverMinuteCents };
  };
  return {
    stops: stops.map((stop) => ({
      openMinute: stop.windowOpenMinute,
      closeMinute: stop.windowCloseMinute,
      serviceMinutes: stop.serviceMinutes,
      fromStart: leg(driver, stop),
      toEnd: leg(stop, counter),
    })),
    between: stops.map((a) => stops.map((b) => leg(a, b))),
    earliestDepartMinute: problem.earliestMinutes[slot.date] ?? 0,
    latestArriveMinute: (counter.cutOffMinutes[slot.date] ?? -Infinity) - costs.cutOffSlackMinutes,
    longestMinutes: driver.longestRunMinutes,
  };
}

export function found<T extends { readonly id: number }>(list: readonly T[], id: number): T {
  const one = list.find((item) => item.id === id);
  if (!one) throw new RangeError(`Nobody has the id ${id}.`);
  return one;
}
