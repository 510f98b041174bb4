import { addedCents, draftOf } from './construct';
import { dayName, litres, money } from './in-words';
import { createInstance, volumeTolerance } from './instance';
import type { Placement } from './plan';
import type { PoolParcel, PoolProblem } from './problem';
import type { RunPricer } from './run-pricer';

/** A parcel that stayed behind in a plan. */
export interface LeftBehind {
  readonly problem: PoolProblem;
  readonly placement: Placement;
  readonly index: number;
  /** Of the same problem; its answers are used again. */
  readonly pricer: RunPricer;
}

interface Help {
  readonly cents: number;
  readonly text: string;
}

interface Place {
  readonly cents: number;
  readonly date: string;
  readonly coordinatorId: number;
  readonly coordinator: string;
}

/** The cheapest of: another day, more room, a hand on a confirmed run, a driver. Null when none of them would do. */
export function cheapestHelp(left: LeftBehind): string | null {
  const helps = [...otherDays(left), ...moreRoom(left), ...byHand(left), ...aDriver(left)];
  return helps.sort((a, b) => a.cents - b.cents)[0]?.text ?? null;
}

/** The problem with one thing changed and the plan kept: what would the parcel add now, and where? */
function cheapestIn(changed: PoolProblem, left: LeftBehind, placement = left.placement): Place | null {
  const old = createInstance(left.problem, left.pricer);
  const instance = createInstance(changed, left.pricer);
  const moved = placement.map((at) => {
    const slot = old.slots[at];
    return slot
      ? instance.slots.findIndex((s) => s.group === slot.group && s.counterId === slot.counterId)
      : -1;
  });
  const draft = draftOf(instance, moved);
  let best: Place | null = null;
  for (const option of instance.options[left.index] ?? []) {
    const slot = instance.slots[option.slot];
    const cents = addedCents(instance, draft, left.index, option);
    if (!slot || cents === Infinity || (best && cents >= best.cents)) continue;
    const coordinator = changed.coordinators.find(({ id }) => id === slot.coordinatorId)?.name ?? '';
    best = { cents, date: slot.date, coordinatorId: slot.coordinatorId, coordinator };
  }
  return best;
}

const parcelOf = (left: LeftBehind): PoolParcel => left.problem.parcels[left.index] as PoolParcel;

function otherDays(left: LeftBehind): Help[] {
  const { problem, index } = left;
  const parcel = parcelOf(left);
  const changed: PoolProblem = {
    ...problem,
    pins: problem.pins.filter(({ parcelId }) => parcelId !== parcel.id),
    parcels: problem.parcels.map((other, at) =>
      at === index ? { ...other, days: parcel.elsewhere.map((date) => ({ date, penaltyCents: 0 })) } : other,
    ),
  };
  const found = cheapestIn(changed, left);
  if (!found) return [];
  const verb = parcel.dayFixed ? 'Booking it on' : 'Opening its span to';
  const text = `${verb} ${dayName(found.date)} would place it with ${found.coordinator} for ${money(found.cents)} more.`;
  return [{ cents: found.cents, text }];
}

function moreRoom(left: LeftBehind): Help[] {
  const { problem, placement, pricer } = left;
  const parcel = parcelOf(left);
  const found = cheapestIn(withCapacity(problem, 1e9), left);
  if (!found) return [];
  const instance = createInstance(problem, pricer);
  const draft = draftOf(instance, placement);
  const slot = instance.slots.find(
    (one) =>
      one.date === found.date &&
      one.coordinatorId === found.coordinatorId &&
      one.counterId === parcel.counterId,
  );
  const whole = problem.coordinators.find(({ id }) => id === found.coordinatorId)?.capacityL ?? 0;
  const lacking = parcel.volumeL - (slot ? (draft.roomL[slot.index] ?? 0) : whole);
  if (lacking <= volumeTolerance) return [];
  const text = `${litres(lacking)} more room with ${found.coordinator} on ${dayName(found.date)} would place it.`;
  return [{ cents: found.cents, text }];
}

/** A plan never adds to a confirmed run; a coordinator may. */
function byHand(left: LeftBehind): Help[] {
  const { problem } = left;
  const fixedRuns = problem.fixedRuns.map((run) =>
    run.takes === 'by-hand' ? { ...run, takes: 'more' as const } : run,
  );
  const confirmed = (place: Place) =>
    fixedRuns.some((run) => run.coordinatorId === place.coordinatorId && run.date === place.date);
  const found = cheapestIn({ ...problem, fixedRuns }, left);
  if (!found || !confirmed(found)) return [];
  const text = `Put on the confirmed run of ${found.coordinator} on ${dayName(found.date)} by hand it would add ${money(found.cents)}.`;
  return [{ cents: found.cents, text }];
}

/** Somebody who is not free now: what if they drove for this parcel alone? */
function aDriver(left: LeftBehind): Help[] {
  const { problem } = left;
  const dates = parcelOf(left).days.map(({ date }) => date);
  const willing: PoolProblem = {
    ...problem,
    fixedRuns: [],
    coordinators: problem.coordinators.map((one) => ({
      ...one,
      freeDates: dates.filter((date) => !one.freeDates.includes(date)),
    })),
  };
  const found = cheapestIn(
    willing,
    left,
    problem.parcels.map(() => -1),
  );
  if (!found) return [];
  const text = `A driver on ${dayName(found.date)} would place it: with ${found.coordinator} it would cost ${money(found.cents)}.`;
  return [{ cents: found.cents, text }];
}

/** The problem with every vehicle as roomy as said, in litres. */
export const withCapacity = (problem: PoolProblem, capacityL: number): PoolProblem => ({
  ...problem,
  coordinators: problem.coordinators.map((coordinator) => ({ ...coordinator, capacityL })),
});
