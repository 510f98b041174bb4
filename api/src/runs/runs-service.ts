import type { Run } from '@shared/contract';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';

export interface RunsService {
  /** Throws 404. */
  get(id: number): Promise<Run>;
  /** The run a parcel is on, or null. */
  ofParcel(parcelId: number): Promise<Run | null>;
  /**
   * Takes a parcel out of its run, if it is on one: the run is sequenced and its cost shared anew, an emptied run is called
   * off, and (for a confirmed run) its people are told. The parcel's own state is left alone.
   */
  takeOut(parcelId: number, why: string, who: Actor | null): Promise<void>;
  /** Proposed and confirmed runs from a counter in a window of days, with the room left: the notches of the strip. */
  notches(counterId: number, from: string, to: string): Promise<{ id: number; date: string; state: string; roomL: number }[]>;
}

export function createRunsService(deps: Deps): RunsService {
  throw new Error(`not built yet ${deps.config.PORT}`);
}
