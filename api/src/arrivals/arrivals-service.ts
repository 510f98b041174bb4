import type { Arrival, ArrivalList } from '@shared/contract';
import type { Deps } from '../deps';

export interface ArrivalsService {
  /** What the buyer sees, by the secret of the link. Throws 404. */
  byToken(token: string): Promise<Arrival>;
  ofBuyer(personId: number): Promise<ArrivalList>;
}

export function createArrivalsService(deps: Deps): ArrivalsService {
  throw new Error(`not built yet ${deps.config.PORT}`);
}
