import type { Desk, Parcel, Run } from '@shared/contract';
import { addDays } from '@shared/calendar/add-days';
import { longDate } from '@shared/parcels/long-date';

/** A parcel booked to ship within so many days should be on a confirmed run. Assumption. */
const soonDays = 2;

/** Runs that cannot be driven as they stand, were not driven, or were never brought to an end. `today` in the circle's zone. */
export function runsNeedingAttention(runs: readonly Run[], today: string): Desk['runs'] {
  return runs.flatMap((run) => {
    const text = runComplaint(run, today);
    return text === null ? [] : [{ id: run.id, date: run.date, text }];
  });
}

function runComplaint(run: Run, today: string): string | null {
  const over = run.date < today;
  if (run.state === 'underway' && over) return 'It left and was never noted as handed over.';
  if (run.state === 'confirmed' && over) return 'Its day is over and it was never noted as driven.';
  if (over || (run.state !== 'proposed' && run.state !== 'confirmed')) return null;
  if (run.problems.length > 0) return run.problems.join(' ');
  if (run.state === 'proposed' && run.date <= addDays(today, 1))
    return `Not confirmed yet; ${run.coordinator.name} would drive.`;
  return null;
}

/** Parcels that wait for a person: on hold, left behind by their day, without a run in time, or never reported. */
export function parcelsNeedingAttention(parcels: readonly Parcel[], today: string): Desk['parcels'] {
  return parcels.flatMap((parcel) => {
    const text = parcelComplaint(parcel, today);
    return text === null ? [] : [{ id: parcel.id, code: parcel.code, text }];
  });
}

function parcelComplaint(parcel: Parcel, today: string): string | null {
  const { state, shipDate, arrivalDate } = parcel;
  if (state === 'on-hold') return `On hold: ${parcel.holdReason ?? 'no reason is noted.'}`;
  if ((state === 'booked' || state === 'packed') && shipDate !== null) {
    if (shipDate < today) return `Its day, ${longDate(shipDate)}, is over and it was never noted as shipped.`;
    if (shipDate <= addDays(today, soonDays) && parcel.run?.state !== 'confirmed')
      return `Ships on ${longDate(shipDate)} and is on no confirmed run.`;
  }
  if (state === 'handed-over' && arrivalDate !== null && arrivalDate < today)
    return `Should have arrived on ${longDate(arrivalDate)}; the buyer has not reported it.`;
  if (state === 'seeking' && parcel.latestDate < today) return 'The last day it could ship is over.';
  return null;
}
