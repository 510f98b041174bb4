import { addedCents, draftOf, type Draft } from './construct';
import { createInstance, volumeTolerance, type Instance } from './instance';
import type { Placement } from './plan';
import type { PoolParcel, PoolProblem } from './problem';

export type UnplacedReason = 'no-safe-day' | 'weather-unknown' | 'no-driver' | 'no-room' | 'too-late' | 'too-costly' | 'not-tried';

export interface UnplacedParcel {
  readonly parcelId: number;
  readonly reason: UnplacedReason;
  readonly text: string;
  /** The cheapest change that would place it, or null when none was found. */
  readonly help: string | null;
}

const money = (cents: number) => `$${(cents / 100).toFixed(2)}`;
const litres = (volume: number) => `${Math.ceil(volume * 10) / 10} L`;

/** `2026-12-08` → `Tue, Dec 8`. */
export function dayName(date: string): string {
  return new Intl.DateTimeFormat('en-US', { weekday: 'short', month: 'short', day: 'numeric', timeZone: 'UTC' }).format(
    Date.parse(`${date}T00:00:00Z`),
  );
}
const dayNames = (dates: readonly string[]) => (dates.length > 3 ? `${dates.slice(0, 3).map(dayName).join('; ')} …` : dates.map(dayName).join('; '));

/** Says why a parcel stayed behind in the given plan, and the cheapest of: another day, more room, a driver. */
export function explainUnplaced(problem: PoolProblem, placement: Placement, parcelIndex: number): UnplacedParcel {
  const instance = createInstance(problem);
  const parcel = problem.parcels[parcelIndex] as PoolParcel;
  const draft = draftOf(instance, placement);
  const helps = [...otherDays(problem, placement, parcelIndex), ...moreRoom(problem, placement, parcelIndex), ...aDriver(problem, parcelIndex)];
  const help = helps.sort((a, b) => a.cents - b.cents)[0]?.text ?? null;
  return { parcelId: parcel.id, ...why(instance, draft, parcelIndex), help };
}

function why(instance: Instance, draft: Draft, index: number): { reason: UnplacedReason; text: string } {
  const { problem } = instance;
  const parcel = problem.parcels[index] as PoolParcel;
  const pin = problem.pins.find(({ parcelId }) => parcelId === parcel.id);
  if (pin && !parcel.days.some(({ date }) => date === pin.date))
    return { reason: 'no-safe-day', text: `It is pinned to ${dayName(pin.date)}, which is not a safe day for it now.` };
  if (parcel.days.length === 0 && parcel.unknownDates.length > 0)
    return { reason: 'weather-unknown', text: `The weather is not known yet for ${dayNames(parcel.unknownDates)}.` };
  if (parcel.days.length === 0) return { reason: 'no-safe-day', text: 'None of the days asked for is safe as things stand.' };
  const roomy = withRoom(problem, problem.coordinators, Infinity);
  const dates = dayNames(parcel.days.map(({ date }) => date));
  const anybody = createInstance(roomy).options[index] ?? [];
  if (anybody.length === 0) return { reason: 'no-driver', text: `No coordinator is free to drive on ${dates}.` };
  const options = instance.options[index] ?? [];
  const costs = options.map((option) => addedCents(instance, draft, index, option));
  const cheapest = Math.min(...costs);
  if (cheapest < problem.costs.unplacedCents) return { reason: 'not-tried', text: 'The search ended before it found a place; try again.' };
  if (cheapest < Infinity) return { reason: 'too-costly', text: `The cheapest way to take it would add ${money(cheapest)}.` };
  const empty = draftOf(createInstance(roomy), []);
  const reachable = anybody.some((option) => addedCents(createInstance(roomy), empty, index, option) < Infinity);
  if (!reachable) return { reason: 'too-late', text: `On ${dates} no driver could collect it and be at the counter in time.` };
  const room = Math.max(...options.map(({ slot }) => draft.roomL[slot] ?? 0), 0);
  if (room + volumeTolerance < parcel.volumeL)
    return { reason: 'no-room', text: `It needs ${litres(parcel.volumeL)}; the most room left on ${dates} is ${litres(Math.max(0, room))}.` };
  const busy = options.every(({ slot }) => draft.taken.has(instance.slots[slot]?.group ?? ''));
  return busy
    ? { reason: 'too-late', text: `The runs on ${dates} cannot make one more stop in time.` }
    : { reason: 'not-tried', text: 'The search ended before it found a place; try again.' };
}

interface Help {
  readonly cents: number;
  readonly text: string;
}

/** The plan with one thing changed: what would the parcel add now? */
function cheapestIn(problem: PoolProblem, placement: Placement, before: PoolProblem, index: number): { cents: number; date: string; coordinator: string } | null {
  const old = createInstance(before);
  const instance = createInstance(problem);
  const moved = placement.map((at) => {
    const slot = old.slots[at];
    return slot ? instance.slots.findIndex((s) => s.group === slot.group && s.counterId === slot.counterId) : -1;
  });
  const draft = draftOf(instance, moved);
  let best: { cents: number; date: string; coordinator: string } | null = null;
  for (const option of instance.options[index] ?? []) {
    const slot = instance.slots[option.slot];
    const cents = addedCents(instance, draft, index, option);
    if (!slot || cents === Infinity || (best && cents >= best.cents)) continue;
    best = { cents, date: slot.date, coordinator: problem.coordinators.find(({ id }) => id === slot.coordinatorId)?.name ?? '' };
  }
  return best;
}

const replaceParcel = (problem: PoolProblem, index: number, days: readonly string[]): PoolProblem => ({
  ...problem,
  pins: problem.pins.filter(({ parcelId }) => parcelId !== problem.parcels[index]?.id),
  parcels: problem.parcels.map((parcel, at) => (at === index ? { ...parcel, days: days.map((date) => ({ date, penaltyCents: 0 })) } : parcel)),
});

const withRoom = (problem: PoolProblem, coordinators: PoolProblem['coordinators'], capacityL: number): PoolProblem => ({
  ...problem,
  coordinators: coordinators.map((coordinator) => ({ ...coordinator, capacityL })),
});

function otherDays(problem: PoolProblem, placement: Placement, index: number): Help[] {
  const parcel = problem.parcels[index] as PoolParcel;
  const found = cheapestIn(replaceParcel(problem, index, parcel.elsewhere), placement, problem, index);
  if (!found) return [];
  const verb = parcel.dayFixed ? 'Booking it on' : 'Opening its span to';
  return [{ cents: found.cents, text: `${verb} ${dayName(found.date)} would place it with ${found.coordinator} for ${money(found.cents)} more.` }];
}

function moreRoom(problem: PoolProblem, placement: Placement, index: number): Help[] {
  const parcel = problem.parcels[index] as PoolParcel;
  const instance = createInstance(problem);
  const found = cheapestIn(withRoom(problem, problem.coordinators, 1e9), placement, problem, index);
  if (!found) return [];
  const draft = draftOf(instance, placement);
  const coordinator = problem.coordinators.find(({ name }) => name === found.coordinator);
  const slot = instance.slots.find((s) => s.date === found.date && s.coordinatorId === coordinator?.id && s.counterId === parcel.counterId);
  const lacking = parcel.volumeL - (slot ? (draft.roomL[slot.index] ?? 0) : (coordinator?.capacityL ?? 0));
  if (lacking <= volumeTolerance) return [];
  return [{ cents: found.cents, text: `${litres(lacking)} more room with ${found.coordinator} on ${dayName(found.date)} would place it.` }];
}

/** Somebody who is not free now: what if they drove for this parcel alone? */
function aDriver(problem: PoolProblem, index: number): Help[] {
  const parcel = problem.parcels[index] as PoolParcel;
  const dates = parcel.days.map(({ date }) => date);
  const willing = { ...problem, fixedRuns: [], coordinators: problem.coordinators.map((c) => ({ ...c, freeDates: dates.filter((date) => !c.freeDates.includes(date)) })) };
  const found = cheapestIn(willing, problem.parcels.map(() => -1), problem, index);
  return found ? [{ cents: found.cents, text: `A driver on ${dayName(found.date)} would place it: with ${found.coordinator} it would cost ${money(found.cents)}.` }] : [];
}
