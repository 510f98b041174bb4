import type { PoolStop, PoolParcel, PoolProblem } from '@shared/pooling/problem';

export const monday = '2026-12-07';
export const tuesday = '2026-12-08';

export const breeder = (id: number, change: Partial<PoolStop> = {}): PoolStop => ({
  id,
  name: `Breeder ${id}`,
  lat: 29.5,
  lon: -98.4 - id / 100,
  windowOpenMinute: 540,
  windowCloseMinute: 840,
  serviceMinutes: 10,
  daysAway: [],
  ...change,
});

export const parcel = (id: number, change: Partial<PoolParcel> = {}): PoolParcel => ({
  id,
  label: `P-${id}`,
  stopId: 1,
  breederId: change.stopId ?? 1,
  counterId: 900,
  volumeL: 20,
  days: [{ date: monday, penaltyCents: 0 }],
  elsewhere: [],
  unknownDates: [],
  dayFixed: true,
  ...change,
});

export const driver = (change: Partial<PoolProblem['coordinators'][number]> = {}) => ({
  id: 500,
  name: 'Cora',
  lat: 29.42,
  lon: -98.49,
  capacityL: 100,
  longestRunMinutes: 300,
  centsPerMile: 70,
  freeDates: [monday, tuesday],
  ...change,
});

export const counter = (change: Partial<PoolProblem['counters'][number]> = {}) => ({
  id: 900,
  name: 'Airport counter',
  lat: 29.53,
  lon: -98.47,
  cutOffMinutes: { [monday]: 1020, [tuesday]: 1020 },
  ...change,
});

/** Two breeders with a parcel each, one driver, one counter, Monday and Tuesday; everything fits with ease. */
export const smallPool = (change: Partial<PoolProblem> = {}): PoolProblem => ({
  parcels: [parcel(1), parcel(2, { stopId: 2 })],
  stops: [breeder(1), breeder(2)],
  coordinators: [driver()],
  counters: [counter()],
  fixedRuns: [],
  pins: [],
  costs: {
    runFixedCents: 1200,
    driverMinuteCents: 25,
    unplacedCents: 50_000,
    cutOffSlackMinutes: 30,
    circuity: 1.3,
  },
  earliestMinutes: {},
  ...change,
});
