import type * as z from 'zod';
import type {
  booking,
  DayVerdict,
  HistoryEntry,
  Parcel,
  parcelListQuery,
  parcelNew,
  parcelPatch,
  ParcelState,
} from '@shared/contract';
import { notFound } from '@shared/errors';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { bookParcel, unbookParcel } from './book-parcel';
import { createParcel } from './create-parcel';
import { editParcel } from './edit-parcel';
import { listFilter, mayWork } from './parcel-access';
import { moveParcel, putParcelOnHold } from './move-parcel';
import { findParcels, type ParcelFilter } from './parcels-queries';

/** Null actor: the system itself (a recheck, a job). */
export type Who = Actor | null;

/** What is set together with a move; what is left out follows from the state. */
export interface MoveSet {
  readonly shipDate?: string | null;
  readonly holdReason?: string | null;
  readonly shareCents?: number | null;
  readonly trackingNumber?: string | null;
  readonly flexible?: { readonly from: string; readonly to: string } | null;
  readonly acceptedTight?: string | null;
  /** The verdict that the move rests on: kept as the booking's. */
  readonly verdict?: DayVerdict;
}

export interface ParcelsService {
  /** Whatever its owner; callers check who may see it. Throws 404. */
  get(id: number): Promise<Parcel>;
  byIds(ids: readonly number[]): Promise<Parcel[]>;
  /** Parcels in one of the states, e.g. for pooling. */
  inStates(states: readonly ParcelState[]): Promise<Parcel[]>;
  /** By the secret of the buyer's link. Throws 404. */
  byToken(token: string): Promise<Parcel>;
  /** A buyer's own. */
  ofBuyer(personId: number): Promise<Parcel[]>;
  /**
   * Moves a parcel along the state table (throws `move-not-allowed` otherwise), sets what comes with it, bumps the
   * version, writes history with `text`. Sends nothing by itself.
   */
  move(id: number, to: ParcelState, who: Who, text: string, set?: MoveSet): Promise<void>;
  /** Takes it off its day and out of its run, and tells breeder and buyer; nothing when it is on hold already. */
  putOnHold(id: number, reason: string, who: Who): Promise<void>;
  /** Sets the share only (no history entry, no version). */
  setShare(id: number, shareCents: number | null): Promise<void>;

  /** A parcel that the actor works with: a breeder's own, any for coordinators and admins. Throws 404. */
  forActor(actor: Actor, id: number): Promise<Parcel>;
  /** The parcels an actor works with, newest first, narrowed. Throws 400 for a state that does not exist. */
  list(actor: Actor, query: z.output<typeof parcelListQuery>): Promise<Parcel[]>;
  history(actor: Actor, id: number): Promise<HistoryEntry[]>;
  /** Enters a draft. Throws 400 field by field. */
  create(actor: Actor, body: z.output<typeof parcelNew>): Promise<Parcel>;
  /** Changes fields or the state. Throws 400, 404, 409 (too late, or its day would not be offered), 412. */
  edit(
    actor: Actor,
    id: number,
    patch: z.output<typeof parcelPatch>,
    ifMatch: number | null,
  ): Promise<Parcel>;
  /** Books a day or leaves a span open. Throws 400, 403, 404, 409 with the present verdict, 412. */
  book(actor: Actor, id: number, body: z.output<typeof booking>, ifMatch: number | null): Promise<Parcel>;
  /** Back to a draft, out of its run. Throws 403, 404, 409, 412. */
  unbook(actor: Actor, id: number, ifMatch: number | null): Promise<Parcel>;
}

/** Parcels from draft to arrival. */
export function createParcelsService(deps: Deps): ParcelsService {
  const find = (filter: ParcelFilter) => findParcels(deps.db, filter, deps.config.PUBLIC_URL);
  const one = async (filter: ParcelFilter): Promise<Parcel> => {
    const [parcel] = await find(filter);
    if (!parcel) throw notFound('That parcel');
    return parcel;
  };
  const forActor = async (actor: Actor, id: number): Promise<Parcel> => {
    const parcel = await one({ ids: [id] });
    if (!mayWork(actor, parcel)) throw notFound('That parcel');
    return parcel;
  };
  return {
    get: (id) => one({ ids: [id] }),
    byIds: (ids) => find({ ids }),
    inStates: (states) => find({ states }),
    byToken: (token) => one({ token }),
    ofBuyer: (buyerId) => find({ buyerId }),
    move: (id, to, who, text, set) => deps.transaction((tx) => moveParcel(tx, id, to, who, text, set)),
    putOnHold: (id, reason, who) => deps.transaction((tx) => putParcelOnHold(tx, id, reason, who)),
    setShare: async (id, shareCents) => {
      await deps.db('parcels').where({ id }).update({ share_cents: shareCents });
    },
    forActor,
    list: (actor, query) => find(listFilter(actor, query)),
    history: async (actor, id) => deps.services.history.of('parcel', (await forActor(actor, id)).id),
    create: (actor, body) => createParcel(deps, actor, body),
    edit: (actor, id, patch, ifMatch) => editParcel(deps, actor, id, patch, ifMatch),
    book: (actor, id, body, ifMatch) => bookParcel(deps, actor, id, body, ifMatch),
    unbook: (actor, id, ifMatch) => unbookParcel(deps, actor, id, ifMatch),
  };
}
