import type { TestSite } from './test-site';

export interface ParcelRow {
  readonly code: string;
  readonly breederId: number;
  readonly buyerId: number;
  readonly holdCounterId: number;
  readonly shipDate: string | null;
  readonly state?: string;
  readonly quantity?: number;
}

/** Writes a parcel with one corn snake in a small box straight into the tables; answers its id. */
export async function addParcel(site: TestSite, row: ParcelRow): Promise<number> {
  const { db, ids, deps } = site;
  const at = deps.clock.nowIso();
  const buyer = await db<{ id: number; name: string }>('people').where({ id: row.buyerId }).first();
  const [id] = await db('parcels').insert({
    code: row.code,
    state: row.state ?? 'booked',
    breeder_id: row.breederId,
    buyer_id: row.buyerId,
    buyer_name: buyer?.name ?? '',
    drop_off_counter_id: ids.dropOffCounter,
    service: 'hold',
    hold_counter_id: row.holdCounterId,
    box_id: ids.smallBox,
    ready_from: '2026-01-01',
    latest_date: '2027-12-31',
    ship_date: row.shipDate,
    arrival_token: `arrival-token-of-${row.code}`,
    created_at: at,
    updated_at: at,
  });
  await db('parcel_contents').insert({
    parcel_id: id,
    species_id: ids.cornSnake,
    quantity: row.quantity ?? 1,
    mass_g: 160,
  });
  return id as number;
}

export interface StopRow {
  readonly breederId: number;
  readonly arriveAt: string;
  readonly leaveAt: string;
  readonly parcelIds: readonly number[];
}

export interface RunRow {
  readonly date: string;
  readonly departAt: string;
  readonly arriveAt: string;
  readonly cutOffAt: string;
  readonly stops: readonly StopRow[];
  readonly state?: string;
}

/** Writes a run with its stops and parcels straight into the tables; answers its id. */
export async function addRun(site: TestSite, row: RunRow): Promise<number> {
  const at = site.deps.clock.nowIso();
  const [id] = await site.db('runs').insert({
    state: row.state ?? 'confirmed',
    date: row.date,
    coordinator_id: site.ids.coordinator,
    counter_id: site.ids.dropOffCounter,
    drive_minutes: 60,
    miles: 40,
    last_leg_minutes: 20,
    fixed_cents: 1200,
    driving_cents: 3000,
    alone_cents: 9000,
    created_at: at,
    updated_at: at,
    ...times(row),
  });
  await putStops(site, id as number, row.stops);
  return id as number;
}

/** Replaces the times, stops and parcels of a run, as a change by a coordinator would, and raises its version. */
export async function changeRun(site: TestSite, id: number, row: Omit<RunRow, 'state'>): Promise<void> {
  await site.db('run_stops').where({ run_id: id }).del();
  await site.db('run_parcels').where({ run_id: id }).del();
  await site.db('runs').where({ id }).update(times(row)).increment('version', 1);
  await putStops(site, id, row.stops);
}

const times = (row: Omit<RunRow, 'state'>) => ({
  depart_at: row.departAt,
  arrive_at: row.arriveAt,
  cut_off_at: row.cutOffAt,
});

async function putStops(site: TestSite, id: number, stops: readonly StopRow[]): Promise<void> {
  for (const [index, stop] of stops.entries()) {
    await site.db('run_stops').insert({
      run_id: id,
      seq: index + 1,
      breeder_id: stop.breederId,
      arrive_at: stop.arriveAt,
      leave_at: stop.leaveAt,
      wait_minutes: 0,
      drive_minutes: 20,
      miles: 15,
    });
    for (const parcelId of stop.parcelIds)
      await site.db('run_parcels').insert({ run_id: id, parcel_id: parcelId, share_cents: 700 });
  }
}
