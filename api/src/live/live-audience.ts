import type { Knex } from 'knex';
import type { LiveChange, LiveKind, Role } from '@shared/contract';

/** What a change is compared with to find out who may hear of it. */
export interface ChangeFacts {
  readonly parcels: ReadonlyMap<number, { readonly breederId: number; readonly buyerId: number | null }>;
  /** By run: the breeders whose parcels are on it. */
  readonly runBreeders: ReadonlyMap<number, ReadonlySet<number>>;
}

/** A person who listens, with the roles of now. */
export interface Hearer {
  readonly id: number;
  readonly roles: readonly Role[];
}

/** What every day verdict rests on concerns all who see verdicts. */
const common: readonly LiveKind[] = ['blackout', 'counter', 'species', 'box', 'policy', 'meeting-place'];

/** Reads what is needed for all changes of a batch in two queries. */
export async function changeFacts(db: Knex, changes: readonly LiveChange[]): Promise<ChangeFacts> {
  const ids = (kind: LiveKind) => changes.filter((one) => one.kind === kind).map(({ id }) => id);
  const parcels = await db('parcels')
    .whereIn('id', ids('parcel'))
    .select<{ id: number; breederId: number; buyerId: number | null }[]>({
      id: 'id',
      breederId: 'breeder_id',
      buyerId: 'buyer_id',
    });
  const riders = await db('run_parcels as rp')
    .join('parcels as p', 'p.id', 'rp.parcel_id')
    .whereIn('rp.run_id', ids('run'))
    .select<{ runId: number; breederId: number }[]>({ runId: 'rp.run_id', breederId: 'p.breeder_id' });
  const runBreeders = new Map<number, Set<number>>();
  for (const { runId, breederId } of riders)
    runBreeders.set(runId, (runBreeders.get(runId) ?? new Set()).add(breederId));
  return { parcels: new Map(parcels.map((one) => [one.id, one])), runBreeders };
}

/** Whether a person may hear of a change: only of what the ordinary calls would show to them. */
export function mayHear(hearer: Hearer, { kind, id }: LiveChange, facts: ChangeFacts): boolean {
  const is = (...roles: readonly Role[]) => roles.some((role) => hearer.roles.includes(role));
  if (common.includes(kind)) return is('breeder', 'coordinator', 'admin');
  if (kind === 'person') return id === hearer.id || is('admin');
  if (is('coordinator', 'admin')) return true;
  if (kind === 'run') return is('breeder') && (facts.runBreeders.get(id)?.has(hearer.id) ?? false);
  if (kind !== 'parcel') return false;
  const parcel = facts.parcels.get(id);
  return (is('breeder') && parcel?.breederId === hearer.id) || (is('buyer') && parcel?.buyerId === hearer.id);
}
