import type { Parcel, ParcelState } from '@shared/contract';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';

/** Null actor: the system itself (a recheck, a job). */
export type Who = Actor | null;

export interface ParcelsService {
  /** Whatever its owner; callers check who may see it. Throws 404. */
  get(id: number): Promise<Parcel>;
  byIds(ids: readonly number[]): Promise<Parcel[]>;
  /** Parcels in one of the states, e.g. for pooling. */
  inStates(states: readonly ParcelState[]): Promise<Parcel[]>;
  /** By the secret of the buyer's link. Throws 404. */
  byToken(token: string): Promise<Parcel>;
  /**
   * Moves a parcel along the state table (throws `move-not-allowed` otherwise), sets what comes with it, bumps the
   * version, writes history with `text`. Sends nothing by itself.
   */
  move(
    id: number,
    to: ParcelState,
    who: Who,
    text: string,
    set?: { shipDate?: string | null; holdReason?: string | null; shareCents?: number | null; trackingNumber?: string | null },
  ): Promise<void>;
  /** Takes it off its day and out of its run, and tells breeder and buyer; nothing when it is on hold already. */
  putOnHold(id: number, reason: string, who: Who): Promise<void>;
  /** Sets the share only (no history entry, no version). */
  setShare(id: number, shareCents: number | null): Promise<void>;
}

export function createParcelsService(deps: Deps): ParcelsService {
  throw new Error(`not built yet ${deps.config.PORT}`);
}
