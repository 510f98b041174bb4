import type { Knex } from 'knex';
import { readPolicy } from '@shared/policy/policy-paths';
import type { Policy } from '@shared/policy/policy';

interface PolicyRow {
  id: number;
  values: string;
  created_at: string;
  by: string | null;
}

export interface StoredPolicy {
  readonly id: number;
  readonly values: Policy;
  readonly since: string;
  readonly by: string | null;
}

const rows = (db: Knex) =>
  db<PolicyRow>('policies')
    .leftJoin('people', 'people.id', 'policies.created_by')
    .select<PolicyRow[]>('policies.id', 'policies.values', 'policies.created_at', 'people.name as by');

const toPolicy = (row: PolicyRow): StoredPolicy => ({
  id: row.id,
  values: readPolicy(JSON.parse(row.values)),
  since: row.created_at,
  by: row.by,
});

/** The newest version; undefined while the circle has none of its own. */
export async function newestPolicy(db: Knex): Promise<StoredPolicy | undefined> {
  const [row] = await rows(db).orderBy('policies.id', 'desc').limit(1);
  return row && toPolicy(row);
}

/** One version by its id. */
export async function policyById(db: Knex, id: number): Promise<StoredPolicy | undefined> {
  const [row] = await rows(db).where('policies.id', id);
  return row && toPolicy(row);
}

/** Every version, oldest first. */
export async function allPolicies(db: Knex): Promise<StoredPolicy[]> {
  return (await rows(db).orderBy('policies.id')).map(toPolicy);
}

/** Stores a new version and answers its id; nothing ever changes or removes one. */
export async function addPolicy(db: Knex, values: Policy, at: string, personId: number): Promise<number> {
  const [id] = await db('policies').insert({
    values: JSON.stringify(values),
    created_at: at,
    created_by: personId,
  });
  if (id === undefined) throw new Error('The new policy has no id.');
  return id;
}
