import { DateTime } from 'luxon';
import type { Counter, Parcel, Person } from '@shared/contract';
import { cutOffInstant } from '@shared/calendar/cut-off-instant';
import type { Policy } from '@shared/policy/policy';
import type {
  PoolStop,
  PoolCoordinator,
  PoolCounter,
  PoolCosts,
  PoolParcel,
  PoolProblem,
} from '@shared/pooling/problem';
import type { Deps } from '../deps';

/** The people and places that runs are made of, read once. */
export interface RunWorld {
  readonly policy: Policy;
  readonly zone: string;
  readonly breeders: ReadonlyMap<number, Person>;
  readonly coordinators: ReadonlyMap<number, Person>;
  readonly counters: ReadonlyMap<number, Counter>;
  readonly costs: PoolCosts;
}

export async function readRunWorld({ services }: Deps): Promise<RunWorld> {
  const { policy } = await services.policy.current();
  const byId = <T extends { id: number }>(list: readonly T[]) => new Map(list.map((one) => [one.id, one]));
  const { runFixedCents, driverMinuteCents, unplacedCents, cutOffSlackMinutes, circuity } = policy.pooling;
  return {
    policy,
    zone: policy.circleZone,
    breeders: byId(await services.people.withRole('breeder')),
    coordinators: byId(await services.people.withRole('coordinator')),
    counters: byId(await services.places.counters()),
    costs: { runFixedCents, driverMinuteCents, unplacedCents, cutOffSlackMinutes, circuity },
  };
}

/** An instant as minutes after midnight of `date` on the circle's clock face. */
export function circleMinute(instantMs: number, date: string, zone: string): number {
  const at = DateTime.fromMillis(instantMs, { zone });
  const days = Math.round(at.startOf('day').diff(DateTime.fromISO(date, { zone }), 'days').days);
  return days * 1440 + at.hour * 60 + at.minute;
}

export function poolStop(person: Person, daysAway: readonly string[]): PoolStop | null {
  if (!person.breeder || person.lat === null || person.lon === null) return null;
  const { windowOpenMinute, windowCloseMinute, serviceMinutes } = person.breeder;
  return {
    id: person.id,
    name: person.businessName ?? person.name,
    lat: person.lat,
    lon: person.lon,
    windowOpenMinute,
    windowCloseMinute,
    serviceMinutes,
    daysAway,
  };
}

export function poolCoordinator(person: Person, freeDates: readonly string[]): PoolCoordinator | null {
  if (!person.coordinator || person.lat === null || person.lon === null) return null;
  const { capacityL, longestRunMinutes, centsPerMile } = person.coordinator;
  return {
    id: person.id,
    name: person.name,
    lat: person.lat,
    lon: person.lon,
    capacityL,
    longestRunMinutes,
    centsPerMile,
    freeDates,
  };
}

/** A counter with its cut-offs on the given dates, on the circle's clock. */
export function poolCounter(counter: Counter, dates: readonly string[], zone: string): PoolCounter {
  const cutOffMinutes: Record<string, number> = {};
  for (const date of dates) {
    const at = counter.active && counter.canDropOff ? cutOffInstant(counter, date) : null;
    if (at !== null) cutOffMinutes[date] = circleMinute(at, date, zone);
  }
  return { id: counter.id, name: counter.name, lat: counter.lat, lon: counter.lon, cutOffMinutes };
}

/** Parcels as the pricing of one run needs them: all on its day. */
export const poolParcel = (parcel: Parcel, date: string): PoolParcel => ({
  id: parcel.id,
  label: parcel.code,
  stopId: parcel.breeder.id,
  breederId: parcel.breeder.id,
  counterId: parcel.dropOff.counterId,
  volumeL: parcel.box.volumeL,
  days: [{ date, penaltyCents: 0 }],
  elsewhere: [],
  unknownDates: [],
  dayFixed: true,
});

/** The problem of one run alone: its coordinator, counter and parcels on its day. Nobody leaves before `earliestMinute`. */
export function oneRunProblem(
  world: RunWorld,
  coordinator: Person,
  counter: Counter,
  date: string,
  parcels: readonly Parcel[],
  earliestMinute: number | null,
): PoolProblem {
  const ids = [...new Set(parcels.map((parcel) => parcel.breeder.id))];
  const driver = poolCoordinator(coordinator, [date]);
  return {
    parcels: parcels.map((parcel) => poolParcel(parcel, date)),
    stops: ids.flatMap((id) => {
      const person = world.breeders.get(id);
      return (person && poolStop(person, [])) ?? [];
    }),
    coordinators: driver ? [driver] : [],
    counters: [poolCounter(counter, [date], world.zone)],
    fixedRuns: [],
    pins: [],
    costs: world.costs,
    earliestMinutes: earliestMinute === null ? {} : { [date]: earliestMinute },
  };
}
