import { cheapestHelp, withCapacity, type LeftBehind } from './cheapest-help';
import { addedCents, draftOf } from './construct';
import { dayName, dayNames, litres, money } from './in-words';
import { createInstance, volumeTolerance } from './instance';
import type { Placement } from './plan';
import type { Pin, PoolParcel, PoolProblem } from './problem';
import { createRunPricer, type RunPricer } from './run-pricer';

export type UnplacedReason =
  'no-safe-day' | 'weather-unknown' | 'no-driver' | 'no-room' | 'too-late' | 'too-costly' | 'not-tried';

export interface UnplacedParcel {
  readonly parcelId: number;
  readonly reason: UnplacedReason;
  readonly text: string;
  /** The cheapest change that would place it, or null when none was found. */
  readonly help: string | null;
}

type Why = Pick<UnplacedParcel, 'reason' | 'text'>;
const tryAgain: Why = {
  reason: 'not-tried',
  text: 'The search ended before it found a place; try again.',
};

/** Says why a parcel stayed behind in the given plan, and the cheapest thing that would help. */
export function explainUnplaced(
  problem: PoolProblem,
  placement: Placement,
  parcelIndex: number,
  pricer: RunPricer = createRunPricer(problem),
): UnplacedParcel {
  const left: LeftBehind = { problem, placement, index: parcelIndex, pricer };
  const parcel = problem.parcels[parcelIndex] as PoolParcel;
  const pin = problem.pins.find(({ parcelId }) => parcelId === parcel.id) ?? null;
  const reason = whyNoDay(parcel, pin) ?? whyNobody(left, parcel, pin) ?? whyNoPlace(left, parcel, pin);
  return { parcelId: parcel.id, ...reason, help: cheapestHelp(left) };
}

function whyNoDay(parcel: PoolParcel, pin: Pin | null): Why | null {
  if (pin && !parcel.days.some(({ date }) => date === pin.date)) {
    const text = `It is pinned to ${dayName(pin.date)}, which is not a safe day for it now.`;
    return { reason: 'no-safe-day', text };
  }
  if (parcel.days.length > 0) return null;
  const tight = parcel.tightDates ?? [];
  if (tight.length > 0) {
    const text = `Only tight days are left: ${dayNames(tight)}. The breeder has to accept one in words.`;
    return { reason: 'no-safe-day', text };
  }
  if (parcel.unknownDates.length > 0) {
    const text = `The weather is not known yet for ${dayNames(parcel.unknownDates)}.`;
    return { reason: 'weather-unknown', text };
  }
  return { reason: 'no-safe-day', text: 'None of the days asked for is safe as things stand.' };
}

/** Nobody could take it, were there room in every vehicle. */
function whyNobody({ problem, index, pricer }: LeftBehind, parcel: PoolParcel, pin: Pin | null): Why | null {
  const instance = createInstance(withCapacity(problem, Infinity), pricer);
  const options = instance.options[index] ?? [];
  const days = daysOf(parcel, pin);
  const dates = dayNames(days);
  if (options.length > 0) {
    const empty = draftOf(instance, []);
    if (options.some((option) => addedCents(instance, empty, index, option) < Infinity)) return null;
    return {
      reason: 'too-late',
      text: `On ${dates} no driver could collect it and be at the counter in time.`,
    };
  }
  const breeder = problem.stops.find(({ id }) => id === parcel.stopId);
  if (!breeder)
    return { reason: 'no-driver', text: 'Where its breeder lives is not known, so nobody can collect it.' };
  if (days.every((date) => breeder.daysAway.includes(date)))
    return { reason: 'no-safe-day', text: `${breeder.name} is away on ${dates}.` };
  if (pin)
    return {
      reason: 'no-driver',
      text: `It is pinned to a run on ${dates} that cannot go as it was planned.`,
    };
  const confirmed = problem.fixedRuns.some(
    (run) => run.takes === 'by-hand' && run.counterId === parcel.counterId && days.includes(run.date),
  );
  return {
    reason: 'no-driver',
    text: confirmed
      ? `Every run on ${dates} is confirmed already; parcels are put on it by hand.`
      : `No coordinator is free to drive on ${dates}.`,
  };
}

/** Somebody could, but not in this plan. */
function whyNoPlace(
  { problem, placement, index, pricer }: LeftBehind,
  parcel: PoolParcel,
  pin: Pin | null,
): Why {
  const instance = createInstance(problem, pricer);
  const draft = draftOf(instance, placement);
  const options = instance.options[index] ?? [];
  const dates = dayNames(daysOf(parcel, pin));
  const cheapest = Math.min(...options.map((option) => addedCents(instance, draft, index, option)));
  if (cheapest < problem.costs.unplacedCents) return tryAgain;
  if (cheapest < Infinity)
    return { reason: 'too-costly', text: `The cheapest way to take it would add ${money(cheapest)}.` };
  const groupOf = (slot: number) => draft.taken.get(instance.slots[slot]?.group ?? '');
  const here = options.filter(({ slot }) => (groupOf(slot) ?? slot) === slot);
  if (options.length > 0 && here.length === 0)
    return { reason: 'no-driver', text: `On ${dates} every driver is bound for another counter.` };
  const days = daysOf(parcel, pin);
  // A parcel that fits into no vehicle at all has no options; the largest one is named then.
  const free = problem.coordinators.filter(({ freeDates }) => days.some((date) => freeDates.includes(date)));
  const rooms =
    here.length > 0 ? here.map(({ slot }) => draft.roomL[slot] ?? 0) : free.map((one) => one.capacityL);
  const room = Math.max(...rooms, 0);
  if (room + volumeTolerance < parcel.volumeL) {
    const text = `It needs ${litres(parcel.volumeL)}; the most room left on ${dates} is ${litres(room)}.`;
    return { reason: 'no-room', text };
  }
  return { reason: 'too-late', text: `The runs on ${dates} cannot make one more stop in time.` };
}

const daysOf = (parcel: PoolParcel, pin: Pin | null): string[] =>
  pin ? [pin.date] : parcel.days.map(({ date }) => date);
