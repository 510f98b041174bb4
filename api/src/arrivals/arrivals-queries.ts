import type { Knex } from 'knex';

/** What the buyer's page needs beside the parcel itself. */
export interface ArrivalRow {
  parcel_id: number;
  breeder_phone: string | null;
  report_outcome: string | null;
  report_text: string | null;
  report_at: string | null;
  run_state: string | null;
  confirmed_at: string | null;
  handed_over_at: string | null;
  booked_at: string | null;
}

/** By the secret of the link; undefined when there is none. */
export async function findArrivalRow(db: Knex, token: string): Promise<ArrivalRow | undefined> {
  const booked = db('booking_verdicts as bv')
    .max('bv.created_at')
    .whereRaw('bv.parcel_id = p.id and bv.ship_date = p.ship_date');
  return (await db('parcels as p')
    .join('people as breeder', 'breeder.id', 'p.breeder_id')
    .leftJoin('run_parcels as rp', 'rp.parcel_id', 'p.id')
    .leftJoin('runs as run', 'run.id', 'rp.run_id')
    .where('p.arrival_token', token)
    .select({
      parcel_id: 'p.id',
      breeder_phone: 'breeder.phone',
      report_outcome: 'p.report_outcome',
      report_text: 'p.report_text',
      report_at: 'p.report_at',
      run_state: 'run.state',
      confirmed_at: 'run.confirmed_at',
      handed_over_at: 'run.handed_over_at',
    })
    .select(booked.as('booked_at'))
    .first()) as ArrivalRow | undefined;
}

/** Keeps what the buyer said of some mornings; the others stay as they were. */
export async function saveMornings(
  db: Knex,
  parcelId: number,
  mornings: readonly { date: string; suits: boolean }[],
): Promise<void> {
  if (mornings.length === 0) return;
  await db('parcel_mornings')
    .insert(mornings.map(({ date, suits }) => ({ parcel_id: parcelId, date, suits })))
    .onConflict(['parcel_id', 'date'])
    .merge(['suits']);
}

/** Raises a parcel's version: what was said of it changes what may be done with it. */
export async function touchParcel(db: Knex, parcelId: number, now: string): Promise<void> {
  await db('parcels')
    .where({ id: parcelId })
    .update({ updated_at: now, version: db.raw('version + 1') });
}

export async function saveReport(
  db: Knex,
  parcelId: number,
  report: { outcome: string; text: string; at: string },
): Promise<void> {
  await db('parcels')
    .where({ id: parcelId })
    .update({ report_outcome: report.outcome, report_text: report.text, report_at: report.at });
}
