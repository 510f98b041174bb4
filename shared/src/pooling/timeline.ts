import type { PoolStop, PoolCoordinator, PoolCounter } from './problem';
import { estimateLeg } from './travel';

/** A stop as driven; minutes after midnight on the circle's clock. */
export interface TimedStop {
  readonly stopId: number;
  readonly arriveMinute: number;
  readonly leaveMinute: number;
  /** Waiting for the window to open. */
  readonly waitMinutes: number;
  /** The leg to this stop. */
  readonly driveMinutes: number;
  readonly miles: number;
}

export interface Timeline {
  readonly departMinute: number;
  readonly stops: readonly TimedStop[];
  readonly arriveMinute: number;
  readonly driveMinutes: number;
  readonly miles: number;
  readonly lastLegMinutes: number;
}

/** Drives the stops in the given order from a given departure, waiting where a window is not open yet. */
export function timeline(
  coordinator: PoolCoordinator,
  stops: readonly PoolStop[],
  counter: PoolCounter,
  departMinute: number,
  circuity: number,
): Timeline {
  let here: { lat: number; lon: number } = coordinator;
  let minute = departMinute;
  let driveMinutes = 0;
  let miles = 0;
  const timed = stops.map((stop): TimedStop => {
    const leg = estimateLeg(here, stop, circuity);
    const arriveMinute = minute + leg.minutes;
    const waitMinutes = Math.max(0, stop.windowOpenMinute - arriveMinute);
    minute = arriveMinute + waitMinutes + stop.serviceMinutes;
    here = stop;
    driveMinutes += leg.minutes;
    miles += leg.miles;
    return {
      stopId: stop.id,
      arriveMinute,
      leaveMinute: minute,
      waitMinutes,
      driveMinutes: leg.minutes,
      miles: leg.miles,
    };
  });
  const last = estimateLeg(here, counter, circuity);
  return {
    departMinute,
    stops: timed,
    arriveMinute: minute + last.minutes,
    driveMinutes: driveMinutes + last.minutes,
    miles: miles + last.miles,
    lastLegMinutes: last.minutes,
  };
}
