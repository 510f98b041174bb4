import type { DaysAnswer, DayVerdict, Parcel, RouteCheck } from '@shared/contract';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';

export interface DaysService {
  /** Fourteen days from `from` (default: today at the drop-off counter) for a stored parcel. */
  forParcel(parcelId: number, options?: { from?: string; days?: number }): Promise<DaysAnswer>;
  /** The verdicts of many parcels at once, forecasts fetched once: for pooling, blackouts and rechecks. */
  forParcels(parcelIds: readonly number[], options: { from: string; days: number }): Promise<ReadonlyMap<number, DayVerdict[]>>;
  /** One day, as it stands now; `as`: for the stored parcel with changes that are not saved yet. */
  forDate(parcelId: number, date: string, as?: Parcel): Promise<DayVerdict>;
  /** A question without a parcel; nothing is saved. */
  routeCheck(actor: Actor, body: RouteCheck): Promise<DaysAnswer>;
}

export function createDaysService(deps: Deps): DaysService {
  throw new Error(`not built yet ${deps.config.PORT}`);
}
