import type { Arrival, Parcel } from '@shared/contract';
import type { CollectTimes } from './arrival-plan';

type Step = Arrival['steps'][number];

/** Instants from the parcel's run and booking, null where they are not known. */
export interface StepTimes {
  readonly bookedAt: string | null;
  readonly confirmedAt: string | null;
  readonly handedOverAt: string | null;
  readonly reportAt: string | null;
  readonly nowIso: string;
}

/**
 * The way of a parcel in five steps: those behind it `done`, the one it waits for `now`, the others `next`. None for a
 * cancelled one.
 */
export function arrivalSteps(parcel: Parcel, collect: CollectTimes, times: StepTimes): Step[] {
  if (parcel.state === 'cancelled') return [];
  const door = parcel.service === 'door';
  const arrived = parcel.state === 'arrived' || parcel.state === 'closed';
  const handedOver = arrived || parcel.state === 'handed-over';
  const onRun = parcel.run !== null && parcel.run.state !== 'proposed';
  const readyAt = collect.from ?? collect.by;
  const atCounter = arrived || (handedOver && readyAt !== null && readyAt <= times.nowIso);
  const steps: [Step['key'], boolean, string | null][] = [
    ['day-chosen', parcel.shipDate !== null, times.bookedAt],
    ['on-a-run', handedOver || onRun, times.confirmedAt],
    ['handed-over', handedOver, times.handedOverAt],
    ['at-counter', atCounter, readyAt],
    ['collected', arrived, arrived ? times.reportAt : null],
  ];
  const current = steps.findIndex(([, done]) => !done);
  return steps.map(([key, done, at], i) => ({
    key,
    text: wordsOf(key, door)[done ? 0 : 1],
    at,
    state: current < 0 || i < current ? 'done' : i === current ? 'now' : 'next',
  }));
}

/** A step in words: once it is behind the parcel, and before. */
function wordsOf(key: Step['key'], door: boolean): readonly [string, string] {
  switch (key) {
    case 'day-chosen':
      return ['The breeder chose a safe day.', 'The breeder chooses a safe day.'];
    case 'on-a-run':
      return [
        "The ride to the carrier's counter is arranged.",
        "The ride to the carrier's counter is being arranged.",
      ];
    case 'handed-over':
      return ['Handed over to the overnight carrier.', 'Hand-over to the overnight carrier.'];
    case 'at-counter':
      return door ? ['At your door.', 'At your door.'] : ['Ready for you at the counter.', 'At the counter.'];
    case 'collected':
      return door
        ? ['Safely indoors with you.', 'You bring it indoors at once.']
        : ['Collected by you.', 'You collect it.'];
  }
}
