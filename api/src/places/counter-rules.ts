import { parcelStates, type Counter, type CounterNew, type ParcelState } from '@shared/contract';
import { AppError, badInput, type FieldProblem } from '@shared/errors';
import type { Deps } from '../deps';

/** Parcels that still need their counters: everything up to the hand-out to the buyer. */
const done: readonly ParcelState[] = ['arrived', 'closed', 'cancelled'];
const openStates = parcelStates.filter((state) => !done.includes(state));

/** Rules of a counter that need more than its own fields. Throws 400, or 409 when what it loses is still in use. */
export async function checkCounter(tx: Deps, next: CounterNew, current: Counter | null): Promise<void> {
  const errors: FieldProblem[] = [];
  const carriers = await tx.services.places.carriers();
  if (!carriers.some((carrier) => carrier.id === next.carrierId))
    errors.push({ path: 'carrierId', message: 'That carrier is not known.' });
  if (!next.canDropOff && !next.canHold)
    errors.push({ path: 'canHold', message: 'A counter takes parcels in, holds them, or both.' });
  if (next.canDropOff && Object.keys(next.cutOffMinutes).length === 0)
    errors.push({ path: 'cutOffMinutes', message: 'Enter the cut-off of at least one weekday.' });
  if (errors.length > 0) throw badInput(errors);
  if (current) await refuseWhileUsed(tx, next, current);
}

async function refuseWhileUsed(tx: Deps, next: CounterNew, current: Counter): Promise<void> {
  const losesDropOff = current.active && current.canDropOff && !(next.active && next.canDropOff);
  const losesHold = current.active && current.canHold && !(next.active && next.canHold);
  if (!losesDropOff && !losesHold) return;
  const parcels = await tx.services.parcels.inStates(openStates);
  const parcelCodes = parcels
    .filter(
      (parcel) =>
        (losesDropOff && parcel.dropOff.counterId === current.id) ||
        (losesHold && parcel.destination.counterId === current.id),
    )
    .map((parcel) => parcel.code);
  const breeders = losesDropOff ? await tx.services.people.withRole('breeder') : [];
  const breederNames = breeders
    .filter((breeder) => breeder.breeder?.dropOffCounterId === current.id)
    .map((breeder) => breeder.name);
  if (parcelCodes.length === 0 && breederNames.length === 0) return;
  const users = [named('parcel', parcelCodes), named('breeder', breederNames)].filter((part) => part !== '');
  throw new AppError('conflict', `${current.name} is still used by ${users.join(' and by ')}.`, [], {
    parcels: parcelCodes,
    breeders: breederNames,
  });
}

function named(what: string, names: readonly string[]): string {
  if (names.length === 0) return '';
  const shown = names.slice(0, 5).join(', ');
  const more = names.length > 5 ? ` and ${names.length - 5} more` : '';
  return `${what}${names.length === 1 ? '' : 's'} ${shown}${more}`;
}
