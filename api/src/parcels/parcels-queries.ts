import type { Knex } from 'knex';
import type { Parcel, ParcelState } from '@shared/contract';
import {
  toParcel,
  type ContentRow,
  type JoinedRow,
  type MorningRow,
  type ParcelParts,
  type ParcelRow,
  type VerdictRow,
} from './parcel-rows';

export interface ParcelFilter {
  readonly ids?: readonly number[];
  readonly states?: readonly ParcelState[];
  readonly breederId?: number;
  readonly buyerId?: number;
  readonly token?: string;
  /** Part of the code, a name, a species or a destination. */
  readonly text?: string;
}

/** Ids that go into one statement; SQLite takes 32 766 values at most. */
const chunkSize = 2000;

/** The parcels that a filter leaves, newest first: four statements, however many there are. */
export async function findParcels(db: Knex, filter: ParcelFilter, publicUrl: string): Promise<Parcel[]> {
  if (filter.ids?.length === 0 || filter.states?.length === 0) return [];
  const rows = await joinedRows(db, filter);
  const parts = await partsOf(
    db,
    rows.map((row) => row.id),
  );
  return rows.map((row) => toParcel(row, parts, publicUrl));
}

/** One parcel's own row, or undefined. */
export function findParcelRow(
  db: Knex,
  where: { id: number } | { arrival_token: string },
): Promise<ParcelRow | undefined> {
  return db<ParcelRow>('parcels')
    .where(where as Partial<ParcelRow>)
    .first();
}

async function joinedRows(db: Knex, filter: ParcelFilter): Promise<JoinedRow[]> {
  const rows: JoinedRow[] = [];
  for (const ids of filter.ids ? chunks(filter.ids) : [undefined])
    rows.push(...((await narrowed(joined(db), { ...filter, ids })) as JoinedRow[]));
  return rows.sort((a, b) => b.id - a.id);
}

function joined(db: Knex): Knex.QueryBuilder {
  return db('parcels as p')
    .join('people as breeder', 'breeder.id', 'p.breeder_id')
    .join('people as buyer', 'buyer.id', 'p.buyer_id')
    .join('boxes as box', 'box.id', 'p.box_id')
    .join('counters as drop', 'drop.id', 'p.drop_off_counter_id')
    .leftJoin('counters as hold', 'hold.id', 'p.hold_counter_id')
    .leftJoin('run_parcels as rp', 'rp.parcel_id', 'p.id')
    .leftJoin('runs as run', (on) => on.on('run.id', 'rp.run_id').andOnVal('run.state', '<>', 'called-off'))
    .leftJoin('people as driver', 'driver.id', 'run.coordinator_id')
    .select('p.*', {
      breeder_name: 'breeder.name',
      breeder_business: 'breeder.business_name',
      buyer_email: 'buyer.email',
      box_name: 'box.name',
      box_length_in: 'box.length_in',
      box_width_in: 'box.width_in',
      box_height_in: 'box.height_in',
      drop_name: 'drop.name',
      drop_city: 'drop.city',
      drop_state: 'drop.state',
      drop_zone: 'drop.zone',
      hold_name: 'hold.name',
      hold_street: 'hold.street',
      hold_city: 'hold.city',
      hold_state: 'hold.state',
      hold_postal_code: 'hold.postal_code',
      hold_zone: 'hold.zone',
      run_id: 'run.id',
      run_state: 'run.state',
      run_date: 'run.date',
      run_coordinator: 'driver.name',
    });
}

function narrowed(query: Knex.QueryBuilder, filter: ParcelFilter): Knex.QueryBuilder {
  if (filter.ids) void query.whereIn('p.id', [...filter.ids]);
  if (filter.states) void query.whereIn('p.state', [...filter.states]);
  if (filter.breederId !== undefined) void query.where('p.breeder_id', filter.breederId);
  if (filter.buyerId !== undefined) void query.where('p.buyer_id', filter.buyerId);
  if (filter.token !== undefined) void query.where('p.arrival_token', filter.token);
  if (filter.text) void query.where((any) => matching(any, filter.text ?? ''));
  return query;
}

/** Case does not matter (SQLite's LIKE, ASCII); `%` and `_` in the text stand for themselves. */
function matching(query: Knex.QueryBuilder, text: string): void {
  const pattern = `%${text.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
  const columns = [
    'p.code',
    'p.buyer_name',
    'buyer.email',
    'breeder.name',
    'breeder.business_name',
    'hold.city',
    'hold.name',
    'p.door_city',
    'p.tracking_number',
  ];
  for (const column of columns) void query.orWhereRaw("?? like ? escape '\\'", [column, pattern]);
  void query.orWhereRaw(
    "exists (select 1 from parcel_contents pc join species s on s.id = pc.species_id where pc.parcel_id = p.id and (s.common_name like ? escape '\\' or s.scientific_name like ? escape '\\'))",
    [pattern, pattern],
  );
}

async function partsOf(db: Knex, ids: readonly number[]): Promise<ParcelParts> {
  const contents: ContentRow[] = [];
  const mornings: MorningRow[] = [];
  const verdicts: VerdictRow[] = [];
  for (const some of chunks(ids)) {
    contents.push(
      ...(await db('parcel_contents as pc')
        .join('species as s', 's.id', 'pc.species_id')
        .whereIn('pc.parcel_id', some)
        .orderBy('pc.id')
        .select<ContentRow[]>(
          'pc.parcel_id',
          'pc.species_id',
          'pc.quantity',
          'pc.mass_g',
          's.common_name',
          's.scientific_name',
        )),
    );
    mornings.push(...(await db<MorningRow>('parcel_mornings').whereIn('parcel_id', some).orderBy('date')));
    const newest = db('booking_verdicts').max('id').whereIn('parcel_id', some).groupBy('parcel_id');
    verdicts.push(
      ...(await db('booking_verdicts')
        .whereIn('id', newest)
        .select<VerdictRow[]>('parcel_id', 'ship_date', 'verdict')),
    );
  }
  return { contents: byParcel(contents), mornings: byParcel(mornings), verdicts: byParcel(verdicts) };
}

function byParcel<T extends { parcel_id: number }>(rows: readonly T[]): ReadonlyMap<number, T[]> {
  const map = new Map<number, T[]>();
  for (const row of rows) {
    const list = map.get(row.parcel_id);
    if (list) list.push(row);
    else map.set(row.parcel_id, [row]);
  }
  return map;
}

function chunks<T>(items: readonly T[]): T[][] {
  return Array.from({ length: Math.ceil(items.length / chunkSize) }, (_, i) =>
    items.slice(i * chunkSize, (i + 1) * chunkSize),
  );
}
