import type { Box, Carrier, Counter, Hub, PostalCodeInfo, Species } from '@shared/contract';
import type { Deps } from '../deps';

export interface PlacesService {
  counters(): Promise<Counter[]>;
  /** Throws 404. */
  counter(id: number): Promise<Counter>;
  species(): Promise<Species[]>;
  boxes(): Promise<Box[]>;
  /** Throws 404. */
  box(id: number): Promise<Box>;
  carriers(): Promise<Carrier[]>;
  hubs(): Promise<Hub[]>;
  /** The sort hub that a carrier's parcels pass. */
  hubOfCarrier(carrierId: number): Promise<Hub>;
  /** Offline ZIP table; null when the ZIP is not in it. */
  postalCode(postalCode: string): Promise<PostalCodeInfo | null>;
}

export function createPlacesService(deps: Deps): PlacesService {
  throw new Error(`not built yet ${deps.config.PORT}`);
}
