/** A place on the road, degrees. */
export interface Point {
  readonly lat: number;
  readonly lon: number;
}

/** One day a parcel may ride on, and what choosing it counts as beside money spent, in whole cents. */
export interface ParcelDay {
  readonly date: string;
  readonly penaltyCents: number;
}

export interface PoolParcel {
  readonly id: number;
  /** What people call it; used in sentences. */
  readonly label: string;
  /** Where it gets aboard. */
  readonly stopId: number;
  /** Who pays for it: several breeders may bring boxes to one stop. */
  readonly breederId: number;
  /** Verdict and route rest on this drop-off counter: only a run to it takes the parcel. */
  readonly counterId: number;
  readonly volumeL: number;
  /** Safe days only; a day that is not here is never used. */
  readonly days: readonly ParcelDay[];
  /** Safe days outside of what the breeder asked for: only ever proposed in words. */
  readonly elsewhere: readonly string[];
  /** Days asked for whose weather nobody knows yet. */
  readonly unknownDates: readonly string[];
  /** Days asked for that are tight and not accepted: nobody may count on them. */
  readonly tightDates?: readonly string[];
  /** Booked on one day (true) or open for several (false). */
  readonly dayFixed: boolean;
}

/** Where a driver takes boxes aboard: a breeder's place, or one that breeders bring them to. */
export interface PoolStop extends Point {
  readonly id: number;
  readonly name: string;
  /** Collection window, minutes after midnight on the circle's clock; both ends count. */
  readonly windowOpenMinute: number;
  readonly windowCloseMinute: number;
  readonly serviceMinutes: number;
  readonly daysAway: readonly string[];
}

export interface PoolCoordinator extends Point {
  readonly id: number;
  readonly name: string;
  readonly capacityL: number;
  /** Longest time from leaving home to the counter, waiting included. */
  readonly longestRunMinutes: number;
  readonly centsPerMile: number;
  readonly freeDates: readonly string[];
}

export interface PoolCounter extends Point {
  readonly id: number;
  readonly name: string;
  /** By date: the cut-off in minutes after midnight on the circle's clock; a missing date takes no drop-off. */
  readonly cutOffMinutes: Readonly<Record<string, number>>;
}

/** A run that was decided already: it stays as it is. */
export interface FixedRun {
  /** `more`: the plan may add parcels; `by-hand`: only a person does; `nothing`: it has left already. */
  readonly takes: 'more' | 'by-hand' | 'nothing';
  readonly runId: number;
  readonly coordinatorId: number;
  readonly date: string;
  readonly counterId: number;
  readonly stopIds: readonly number[];
  readonly volumeL: number;
}

/** A person's decision: the parcel rides on this run or not at all. */
export interface Pin {
  readonly parcelId: number;
  readonly coordinatorId: number;
  readonly date: string;
  readonly counterId: number;
}

export interface PoolCosts {
  readonly runFixedCents: number;
  readonly driverMinuteCents: number;
  readonly unplacedCents: number;
  readonly cutOffSlackMinutes: number;
  readonly circuity: number;
}

/** Everything the pooling decides from. Money in whole cents, room in litres, times in whole minutes. */
export interface PoolProblem {
  readonly parcels: readonly PoolParcel[];
  readonly stops: readonly PoolStop[];
  readonly coordinators: readonly PoolCoordinator[];
  readonly counters: readonly PoolCounter[];
  readonly fixedRuns: readonly FixedRun[];
  readonly pins: readonly Pin[];
  readonly costs: PoolCosts;
  /** By date: nobody leaves before this minute (today: now). Missing: midnight. */
  readonly earliestMinutes: Readonly<Record<string, number>>;
}

/** Most stops of one run: the exact sequence is quick up to here. */
export const mostStops = 12;

/** A coordinator on a day, bound for one counter: the place a parcel can be put in. */
export interface Slot {
  readonly coordinatorId: number;
  readonly date: string;
  readonly counterId: number;
}

export const slotKey = (slot: Slot): string => `${slot.coordinatorId}|${slot.date}|${slot.counterId}`;
