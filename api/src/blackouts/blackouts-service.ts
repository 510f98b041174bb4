import type { Blackout, BlackoutList } from '@shared/contract';
import type { Deps } from '../deps';

export interface BlackoutsService {
  all(): Promise<Blackout[]>;
  /** The blackouts and each covered day of the window (both ends count). */
  list(from: string, to: string): Promise<BlackoutList>;
}

export function createBlackoutsService(deps: Deps): BlackoutsService {
  throw new Error(`not built yet ${deps.config.PORT}`);
}
