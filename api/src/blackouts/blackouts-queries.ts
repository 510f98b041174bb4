import type { Knex } from 'knex';
import type { Blackout, BlackoutScope } from '@shared/contract';

interface BlackoutRow {
  id: number;
  title: string;
  kind: Blackout['kind'];
  start_date: string | null;
  end_date: string | null;
  rules: string | null;
  lifted_dates: string;
  scope: BlackoutScope;
  carrier_id: number | null;
  state: string | null;
  counter_id: number | null;
  note: string;
  source: Blackout['source'];
  created_at: string;
  version: number;
}

/** What an admin sets of a blackout. */
export type BlackoutFields = Omit<Blackout, 'id' | 'source' | 'createdAt' | 'version'>;

const fromRow = (row: BlackoutRow): Blackout => ({
  id: row.id,
  title: row.title,
  kind: row.kind,
  startDate: row.start_date,
  endDate: row.end_date,
  rules: row.rules,
  liftedDates: JSON.parse(row.lifted_dates) as string[],
  scope: row.scope,
  carrierId: row.carrier_id,
  state: row.state,
  counterId: row.counter_id,
  note: row.note,
  source: row.source,
  createdAt: row.created_at,
  version: row.version,
});

const toRow = (fields: BlackoutFields): Omit<BlackoutRow, 'id' | 'source' | 'created_at' | 'version'> => ({
  title: fields.title,
  kind: fields.kind,
  start_date: fields.startDate,
  end_date: fields.endDate,
  rules: fields.rules,
  lifted_dates: JSON.stringify(fields.liftedDates),
  scope: fields.scope,
  carrier_id: fields.carrierId,
  state: fields.state,
  counter_id: fields.counterId,
  note: fields.note,
});

export async function findBlackouts(db: Knex): Promise<Blackout[]> {
  return (await db<BlackoutRow>('blackouts').orderBy('id')).map(fromRow);
}

export async function findBlackout(db: Knex, id: number): Promise<Blackout | null> {
  const row = await db<BlackoutRow>('blackouts').where({ id }).first();
  return row ? fromRow(row) : null;
}

/** Answers the id. */
export async function insertBlackout(db: Knex, fields: BlackoutFields, now: string): Promise<number> {
  const [id] = await db('blackouts').insert({ ...toRow(fields), source: 'admin', created_at: now });
  if (id === undefined) throw new Error('The blackout was not written.');
  return id;
}

export async function updateBlackout(db: Knex, id: number, fields: BlackoutFields): Promise<void> {
  await db('blackouts').where({ id }).update(toRow(fields)).increment('version', 1);
}

export async function deleteBlackout(db: Knex, id: number): Promise<void> {
  await db('blackouts').where({ id }).delete();
}
