import type { Knex } from 'knex';
import type { RunState } from '@shared/contract';
import type { RunSheet } from './run-sheet';

export interface RunRow {
  id: number;
  state: RunState;
  date: string;
  coordinator_id: number;
  counter_id: number;
  depart_at: string;
  arrive_at: string;
  cut_off_at: string;
  drive_minutes: number;
  miles: number;
  last_leg_minutes: number;
  fixed_cents: number;
  driving_cents: number;
  alone_cents: number;
  problems: string;
  note: string;
  version: number;
}

export interface StopRow {
  run_id: number;
  seq: number;
  breeder_id: number;
  arrive_at: string;
  leave_at: string;
  wait_minutes: number;
  drive_minutes: number;
  miles: number;
}

export interface RunParcelRow {
  run_id: number;
  parcel_id: number;
  pinned: number;
  share_cents: number;
}

export interface RunFilter {
  readonly ids?: readonly number[];
  readonly from?: string;
  readonly to?: string;
  readonly states?: readonly RunState[];
}

/** By day, then by id. */
export function findRuns(db: Knex, filter: RunFilter): Promise<RunRow[]> {
  return db<RunRow>('runs')
    .select<RunRow[]>('runs.*')
    .modify((query) => {
      if (filter.ids) void query.whereIn('id', filter.ids);
      if (filter.from) void query.where('date', '>=', filter.from);
      if (filter.to) void query.where('date', '<=', filter.to);
      if (filter.states) void query.whereIn('state', filter.states);
    })
    .orderBy(['date', 'id']);
}

export const findStops = (db: Knex, runIds: readonly number[]): Promise<StopRow[]> =>
  db<StopRow>('run_stops').whereIn('run_id', runIds).orderBy(['run_id', 'seq']);

export const findRunParcels = (
  db: Knex,
  by: { runIds: readonly number[] } | { parcelIds: readonly number[] },
): Promise<RunParcelRow[]> =>
  'runIds' in by
    ? db<RunParcelRow>('run_parcels').whereIn('run_id', by.runIds).orderBy('parcel_id')
    : db<RunParcelRow>('run_parcels').whereIn('parcel_id', by.parcelIds).orderBy('parcel_id');

/** An empty proposed run; its sheet is to be worked out next. */
export async function insertRun(
  db: Knex,
  run: { coordinatorId: number; counterId: number; date: string },
  now: string,
): Promise<number> {
  const [id] = await db('runs').insert({
    state: 'proposed',
    date: run.date,
    coordinator_id: run.coordinatorId,
    counter_id: run.counterId,
    depart_at: now,
    arrive_at: now,
    cut_off_at: now,
    drive_minutes: 0,
    miles: 0,
    last_leg_minutes: 0,
    fixed_cents: 0,
    driving_cents: 0,
    alone_cents: 0,
    created_at: now,
    updated_at: now,
  });
  return id ?? 0;
}

/** Writes what follows from the parcels, the stops and the shares, and the next version. */
export async function writeSheet(db: Knex, runId: number, sheet: RunSheet, now: string): Promise<void> {
  await db('runs')
    .where({ id: runId })
    .update({ ...sheetRow(sheet), updated_at: now })
    .increment('version', 1);
  await db('run_stops').where({ run_id: runId }).del();
  for (const [index, stop] of sheet.stops.entries())
    await db('run_stops').insert({
      run_id: runId,
      seq: index + 1,
      breeder_id: stop.breederId,
      arrive_at: stop.arriveAt,
      leave_at: stop.leaveAt,
      wait_minutes: stop.waitMinutes,
      drive_minutes: stop.driveMinutes,
      miles: stop.miles,
    });
  for (const [parcelId, shareCents] of sheet.shares)
    await db('run_parcels').where({ run_id: runId, parcel_id: parcelId }).update({ share_cents: shareCents });
}

const sheetRow = (sheet: RunSheet) => ({
  depart_at: sheet.departAt,
  arrive_at: sheet.arriveAt,
  cut_off_at: sheet.cutOffAt,
  drive_minutes: sheet.driveMinutes,
  miles: sheet.miles,
  last_leg_minutes: sheet.lastLegMinutes,
  fixed_cents: sheet.fixedCents,
  driving_cents: sheet.drivingCents,
  alone_cents: sheet.aloneCents,
  problems: JSON.stringify(sheet.problems),
});

/** Sets columns of a run and its next version. */
export async function setRun(
  db: Knex,
  runId: number,
  columns: Record<string, unknown>,
  now: string,
): Promise<void> {
  await db('runs')
    .where({ id: runId })
    .update({ ...columns, updated_at: now })
    .increment('version', 1);
}

export async function putOnRun(db: Knex, runId: number, parcelId: number, pinned = false): Promise<void> {
  await db('run_parcels').insert({ run_id: runId, parcel_id: parcelId, pinned });
}

export async function takeOffRun(db: Knex, parcelIds: readonly number[]): Promise<void> {
  await db('run_parcels').whereIn('parcel_id', parcelIds).del();
}

export async function deleteRuns(db: Knex, ids: readonly number[]): Promise<void> {
  await db('runs').whereIn('id', ids).del();
}
