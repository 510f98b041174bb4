import type { FixedRun, Pin, PoolStop, PoolParcel, PoolProblem } from '@shared/pooling/problem';

/** A small linear congruential generator (Numerical Recipes constants): the same cases everywhere. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 4294967296;
  };
}

export interface CaseSize {
  readonly seed: number;
  readonly parcels: number;
  readonly breeders: number;
  readonly coordinators: number;
  readonly dates: readonly string[];
  readonly counters?: number;
  readonly pins?: number;
  readonly fixedRun?: boolean;
}

/** A parcel that is collected at its own breeder. */
const at = (id: number) => ({ stopId: id, breederId: id });

export const weekDays = ['2026-12-07', '2026-12-08', '2026-12-09'] as const;

/** An invented circle round San Antonio in which rooms, windows and cut-offs bind now and then. */
export function poolCase(size: CaseSize): PoolProblem {
  const random = seeded(size.seed);
  const between = (low: number, high: number) => low + Math.floor(random() * (high - low + 1));
  const near = () => ({ lat: 29.4 + (random() - 0.5) * 0.9, lon: -98.5 + (random() - 0.5) * 1.1 });
  const chance = (share: number) => random() < share;
  const counterIds = Array.from({ length: size.counters ?? 1 }, (_, index) => 900 + index);
  const breeders = Array.from({ length: size.breeders }, (_, index): PoolStop => {
    const windowOpenMinute = 60 * between(7, 12);
    return {
      id: 100 + index,
      name: `Breeder ${index}`,
      ...near(),
      windowOpenMinute,
      windowCloseMinute: windowOpenMinute + 60 * between(1, 6),
      serviceMinutes: between(5, 20),
      daysAway: size.dates.filter(() => chance(0.1)),
    };
  });
  const parcels = Array.from({ length: size.parcels }, (_, index): PoolParcel => ({
    id: index + 1,
    label: `P-${index + 1}`,
    ...at(100 + between(0, size.breeders - 1)),
    counterId: counterIds[between(0, counterIds.length - 1)] ?? 900,
    volumeL: between(10, 60),
    days: size.dates
      .filter(() => chance(0.7))
      .map((date, later) => ({ date, penaltyCents: later * 40 + (chance(0.2) ? 300 : 0) })),
    elsewhere: [],
    unknownDates: [],
    dayFixed: false,
  }));
  const coordinators = Array.from({ length: size.coordinators }, (_, index) => ({
    id: 500 + index,
    name: `Driver ${index}`,
    ...near(),
    capacityL: between(50, 150),
    longestRunMinutes: between(120, 300),
    centsPerMile: between(55, 85),
    freeDates: size.dates.filter(() => chance(0.85)),
  }));
  const counters = counterIds.map((id) => ({
    id,
    name: `Counter ${id}`,
    ...near(),
    cutOffMinutes: Object.fromEntries(
      size.dates.filter(() => chance(0.95)).map((date) => [date, 60 * between(14, 18)]),
    ),
  }));
  const first = coordinators[0];
  const pins = parcels.slice(0, size.pins ?? 0).map(({ id, counterId }): Pin => ({
    parcelId: id,
    coordinatorId: 500 + between(0, size.coordinators - 1),
    date: size.dates[between(0, size.dates.length - 1)] ?? '',
    counterId,
  }));
  const fixed: FixedRun[] =
    size.fixedRun && first
      ? [
          {
            takes: 'more',
            runId: 77,
            coordinatorId: first.id,
            date: size.dates[0] ?? '',
            counterId: 900,
            stopIds: [100],
            volumeL: 30,
          },
        ]
      : [];
  return {
    parcels,
    stops: breeders,
    coordinators,
    counters,
    fixedRuns: fixed,
    pins,
    costs: {
      runFixedCents: 1200,
      driverMinuteCents: 25,
      unplacedCents: chance(0.3) ? 4000 : 50_000,
      cutOffSlackMinutes: 30,
      circuity: 1.3,
    },
    earliestMinutes: chance(0.3) ? { [size.dates[0] ?? '']: 60 * between(7, 11) } : {},
  };
}
