import type { DayVerdict, ParcelState } from '@shared/contract';
import { AppError, notFound } from '@shared/errors';
import { canMoveParcel } from '@shared/states/parcel-moves';
import type { Deps } from '../deps';
import { findParcelRow } from './parcels-queries';
import type { ParcelRow } from './parcel-rows';
import { insertBookingVerdict, updateParcel } from './parcel-writes';
import type { MoveSet, Who } from './parcels-service';

export const stateWords: Readonly<Record<ParcelState, string>> = {
  draft: 'a draft',
  seeking: 'waiting for a day',
  booked: 'booked',
  packed: 'packed',
  aboard: 'aboard a run',
  'handed-over': 'handed over to the carrier',
  arrived: 'arrived',
  closed: 'closed',
  'on-hold': 'on hold',
  cancelled: 'cancelled',
};

/** Moves a parcel along the state table inside the present transaction; see `ParcelsService.move`. */
export async function moveParcel(
  tx: Deps,
  id: number,
  to: ParcelState,
  who: Who,
  text: string,
  set: MoveSet = {},
): Promise<void> {
  const row = await rowOf(tx, id);
  if (!canMoveParcel(row.state, to))
    throw new AppError(
      'move-not-allowed',
      `${row.code} is ${stateWords[row.state]}; from there it cannot become ${stateWords[to]}.`,
    );
  const columns = { state: to, ...comesWith(row, to, text), ...columnsOfSet(set) };
  if (to === 'booked' && (columns.ship_date ?? row.ship_date) === null)
    throw new AppError('move-not-allowed', `${row.code} needs a day to be booked on.`);
  await saveMove(tx, row, columns, who, text, set.verdict ?? null);
}

/** Writes a parcel's change of state or day with its verdict and history. */
export async function saveMove(
  tx: Deps,
  row: ParcelRow,
  columns: Partial<ParcelRow>,
  who: Who,
  text: string,
  verdict: DayVerdict | null,
): Promise<void> {
  const now = tx.clock.nowIso();
  await updateParcel(tx.db, row.id, columns, now);
  if (verdict) {
    const { id: policyId } = await tx.services.policy.current();
    const words = columns.accepted_tight ?? null;
    await insertBookingVerdict(tx.db, {
      parcelId: row.id,
      verdict,
      policyId,
      words,
      by: who?.id ?? null,
      now,
    });
  }
  await tx.services.history.add({
    actorId: who?.id ?? null,
    actorName: who?.name ?? 'Dayberth',
    subjectKind: 'parcel',
    subjectId: row.id,
    action: columns.state ?? row.state,
    text,
    before: Object.fromEntries(Object.keys(columns).map((key) => [key, row[key as keyof ParcelRow]])),
    after: columns,
  });
}

/** A parcel's row; throws 404. */
export async function rowOf(deps: Deps, id: number): Promise<ParcelRow> {
  const row = await findParcelRow(deps.db, { id });
  if (!row) throw notFound('That parcel');
  return row;
}

/** What a state brings with it: off its day, a parcel has neither date nor share nor accepted words. */
function comesWith(row: ParcelRow, to: ParcelState, text: string): Partial<ParcelRow> {
  const offItsDay = { ship_date: null, accepted_tight: null, share_cents: null };
  if (to === 'draft') return { ...offItsDay, hold_reason: null, flexible_from: null, flexible_to: null };
  if (to === 'cancelled') return { ...offItsDay, hold_reason: null };
  if (to === 'on-hold') return { ...offItsDay, hold_reason: text };
  if (to === 'booked') return { hold_reason: null };
  if (to === 'seeking')
    return {
      ...offItsDay,
      hold_reason: null,
      flexible_from: row.flexible_from ?? row.ready_from,
      flexible_to: row.flexible_to ?? row.latest_date,
    };
  return {};
}

function columnsOfSet(set: MoveSet): Partial<ParcelRow> {
  return {
    ...(set.shipDate === undefined ? {} : { ship_date: set.shipDate }),
    ...(set.holdReason === undefined ? {} : { hold_reason: set.holdReason }),
    ...(set.shareCents === undefined ? {} : { share_cents: set.shareCents }),
    ...(set.trackingNumber === undefined ? {} : { tracking_number: set.trackingNumber }),
    ...(set.flexible === undefined
      ? {}
      : { flexible_from: set.flexible?.from ?? null, flexible_to: set.flexible?.to ?? null }),
    ...(set.acceptedTight === undefined ? {} : { accepted_tight: set.acceptedTight }),
  };
}

/** See `ParcelsService.putOnHold`; inside the present transaction. */
export async function putParcelOnHold(tx: Deps, id: number, reason: string, who: Who): Promise<void> {
  const { state, ship_date: shipDate } = await rowOf(tx, id);
  if (state === 'on-hold') return;
  await tx.services.runs.takeOut(id, reason, who);
  await moveParcel(tx, id, 'on-hold', who, reason, { holdReason: reason });
  await tx.services.notices.tell({ kind: 'parcel-on-hold', parcelId: id, reason, shipDate });
}
