import { parcelStates, type Parcel, type ParcelState } from '@shared/contract';
import { AppError, badInput } from '@shared/errors';
import { has, type Actor } from '../http/actor';
import type { ParcelFilter } from './parcels-queries';

/** Whether the parcel is the actor's business: a breeder's own, any for coordinators and admins. */
export const mayWork = (actor: Actor, parcel: Parcel): boolean =>
  has(actor, 'coordinator', 'admin') || (has(actor, 'breeder') && parcel.breeder.id === actor.id);

/** Choosing the day is for the breeder and the coordinators: an admin who sees the parcel gets 403. */
export function checkMayBook(actor: Actor, parcel: Parcel): void {
  if (has(actor, 'coordinator') || parcel.breeder.id === actor.id) return;
  throw new AppError('forbidden', 'The day is chosen by the breeder or a coordinator.');
}

/** The filter of a list call, cut down to what the actor may see. Throws 400 for a state that does not exist. */
export function listFilter(
  actor: Actor,
  query: { state?: string; q?: string; breederId?: number },
): ParcelFilter {
  const ownOnly = !has(actor, 'coordinator', 'admin');
  const states = query.state ? statesOf(query.state) : undefined;
  const text = query.q?.trim();
  return {
    ...(states ? { states } : {}),
    ...(text ? { text } : {}),
    ...(ownOnly
      ? { breederId: actor.id }
      : query.breederId === undefined
        ? {}
        : { breederId: query.breederId }),
  };
}

function statesOf(list: string): ParcelState[] {
  return list.split(',').map((word) => {
    const state = parcelStates.find((one) => one === word.trim());
    if (!state) throw badInput([{ path: 'query.state', message: `There is no state "${word.trim()}".` }]);
    return state;
  });
}
