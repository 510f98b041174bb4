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
  const steps: [Step['key'], boolean, string, string | null][] = [
    ['day-chosen', parcel.shipDate !== null, 'The breeder chose a safe day.', times.bookedAt],
    ['on-a-run', handedOver || onRun, "The ride to the carrier's counter is arranged.", times.confirmedAt],
    ['handed-over', handedOver, 'Handed over to the overnight carrier.', times.handedOverAt],
    [
      'at-counter',
      arrived || (handedOver && readyAt !== null && readyAt <= times.nowIso),
      door ? 'At your door.' : 'Ready for you at the counter.',
      readyAt,
    ],
    [
      'collected',
      arrived,
      door ? 'Safely indoors with you.' : 'Collected by you.',
      arrived ? times.reportAt : null,
    ],
  ];
  const current = steps.findIndex(([, done]) => !done);
  return steps.map(([key, , text, at], i) => ({
    key,
    text,
    at,
    state: current < 0 || i < current ? 'done' : i === current ? 'now' : 'next',
  }));
}
