import type { DayVerdict, Parcel } from '@shared/contract';
import { cutOffInstant } from '@shared/calendar/cut-off-instant';
import { longDate } from '@shared/parcels/long-date';
import { mostStops, type PoolProblem } from '@shared/pooling/problem';
import type { RunFrame } from './run-sheet';

/** What a run's problems rest on besides its own parcels and places. */
export interface RunFacts {
  /** How the run's day is judged now for each parcel; null when that is not asked any more (the run is confirmed). */
  readonly days: ReadonlyMap<number, DayVerdict> | null;
  readonly isDriverFree: boolean;
  /** The driver has another run on that day which is decided already. */
  readonly isDriverTaken: boolean;
  readonly isDayOver: boolean;
  /** Today: the minute on the circle's clock that it is now; null on other days. */
  readonly earliestMinute: number | null;
}

interface Driven {
  /** An order of the stops keeps windows, cut-off and the longest run … */
  readonly isDriven: boolean;
  /** … but only by leaving earlier than now. */
  readonly isTooLate: boolean;
}

/** In plain sentences what is wrong with a run; empty when it can be confirmed and driven. */
export function runProblems(
  facts: RunFacts & Driven,
  problem: PoolProblem,
  frame: RunFrame,
  parcels: readonly Parcel[],
): string[] {
  if (parcels.length === 0) return ['No parcel is on this run yet.'];
  return [
    ...driverProblems(facts, frame),
    ...roomProblems(frame, parcels),
    ...driveProblems(facts, problem, frame),
    ...parcels.flatMap((parcel) => parcelProblems(facts, problem, frame, parcel)),
  ];
}

function driverProblems(facts: RunFacts, { coordinator, date }: RunFrame): string[] {
  if (facts.isDayOver) return [`${longDate(date)} is over.`];
  const found: string[] = [];
  if (!facts.isDriverFree) found.push(`${coordinator.name} does not drive on ${longDate(date)}.`);
  if (facts.isDriverTaken) found.push(`${coordinator.name} drives another run on ${longDate(date)}.`);
  if (coordinator.lat === null || coordinator.lon === null)
    found.push(`Where ${coordinator.name} starts from is not known.`);
  return found;
}

function roomProblems({ coordinator }: RunFrame, parcels: readonly Parcel[]): string[] {
  const loadL = parcels.reduce((sum, parcel) => sum + parcel.box.volumeL, 0);
  const capacityL = coordinator.coordinator?.capacityL ?? 0;
  if (loadL <= capacityL + 1e-6) return [];
  return [`The boxes take ${loadL.toFixed(1)} L, the vehicle has ${capacityL} L.`];
}

function driveProblems(driven: Driven, problem: PoolProblem, { counter, date }: RunFrame): string[] {
  if (cutOffInstant(counter, date) === null)
    return [`The ${counter.name} takes no drop-off on ${longDate(date)}.`];
  if (problem.stops.length === 0 || problem.coordinators.length === 0) return [];
  if (problem.stops.length > mostStops)
    return [`A run has at most ${mostStops} stops, this one ${problem.stops.length}.`];
  if (driven.isTooLate) return ['It is too late today: the driver would have had to leave already.'];
  return driven.isDriven
    ? []
    : ['No order of the stops keeps the collection windows, the cut-off and the longest run.'];
}

function parcelProblems(facts: RunFacts, problem: PoolProblem, frame: RunFrame, parcel: Parcel): string[] {
  const { counter, date } = frame;
  const found: string[] = [];
  if (parcel.dropOff.counterId !== counter.id)
    found.push(`${parcel.code} is checked for the ${parcel.dropOff.name}, not this counter.`);
  if (!problem.stops.some(({ id }) => id === parcel.breeder.id))
    found.push(`${parcel.code}: where ${parcel.breeder.name} lives is not known.`);
  if (parcel.shipDate !== null && parcel.shipDate !== date)
    found.push(`${parcel.code} is booked on ${longDate(parcel.shipDate)}.`);
  if (parcel.flexible && (date < parcel.flexible.from || date > parcel.flexible.to))
    found.push(`${parcel.code} was not left open for ${longDate(date)}.`);
  return facts.days ? [...found, ...dayProblems(parcel, date, facts.days.get(parcel.id))] : found;
}

/** What speaks against shipping a parcel on a day as it is judged now. */
export function dayProblems(parcel: Parcel, date: string, day: DayVerdict | undefined): string[] {
  if (!day) return [`${parcel.code}: ${longDate(date)} cannot be judged.`];
  if (day.verdict === 'shut' || day.verdict === 'far') {
    const reason = day.reasons.find((one) => one.verdict === day.verdict)?.text ?? '';
    return [`${parcel.code} is ${day.verdict} on ${longDate(date)}. ${reason}`.trim()];
  }
  const accepted = parcel.acceptedTight !== null && parcel.shipDate === date;
  if (day.verdict === 'tight' && !accepted)
    return [
      `${parcel.code} is tight on ${longDate(date)}, which ${parcel.breeder.name} has not accepted yet.`,
    ];
  return [];
}
