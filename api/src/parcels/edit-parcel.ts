import type * as z from 'zod';
import type { Parcel, parcelPatch, ParcelState } from '@shared/contract';
import { AppError } from '@shared/errors';
import { longDate } from '@shared/parcels/long-date';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { checkVersion } from '../http/router';
import { reasonsText, refuseShut, unchanged } from './book-parcel';
import { newArrivalToken } from './create-parcel';
import { moveParcel, rowOf, saveMove, stateWords } from './move-parcel';
import { checkFacts, factsOf, withFacts, type CheckedFacts, type ParcelFacts } from './parcel-facts';
import type { ParcelRow } from './parcel-rows';
import { columnsOf, writeContents } from './parcel-writes';

type Patch = z.output<typeof parcelPatch>;
type Field = keyof ParcelFacts;

const editable: readonly ParcelState[] = ['draft', 'seeking', 'booked', 'on-hold'];
const labels: Readonly<Record<Field, string>> = {
  buyer: 'the buyer',
  contents: 'the contents',
  boxId: 'the box',
  service: 'the service',
  holdCounterId: 'the hold counter',
  door: 'the address',
  readyFrom: 'the first day',
  latestDate: 'the latest day',
  lastMealDate: 'the last meal',
  note: 'the note',
  dropOffCounterId: 'the drop-off counter',
};
/** What a day's verdict rests on. */
const weighty: readonly Field[] = [
  'contents',
  'boxId',
  'service',
  'holdCounterId',
  'door',
  'readyFrom',
  'latestDate',
  'lastMealDate',
  'dropOffCounterId',
];

/** A patch held against the parcel as it stands. */
interface Edit {
  readonly before: Parcel;
  readonly facts: ParcelFacts;
  readonly changed: readonly Field[];
  readonly checked: CheckedFacts | null;
  readonly patch: Patch;
}

/** See `ParcelsService.edit`. */
export async function editParcel(
  deps: Deps,
  actor: Actor,
  id: number,
  patch: Patch,
  ifMatch: number | null,
): Promise<Parcel> {
  const before = await deps.services.parcels.forActor(actor, id);
  checkVersion(ifMatch, before.version, before);
  const edit = await heldAgainst(deps, before, patch);
  const verdict = await askAgain(deps, edit);
  return deps.transaction(async (tx) => {
    const now = await unchanged(tx, before);
    const columns = await fieldColumns(tx, edit);
    if (now.run && edit.changed.some((field) => field === 'boxId' || field === 'dropOffCounterId'))
      await tx.services.runs.takeOut(id, `${now.code} was changed.`, actor);
    if (Object.keys(columns).length > 0)
      await saveMove(
        tx,
        await rowOf(tx, id),
        { ...columns, ...keptSpan(edit) },
        actor,
        changeText(edit),
        verdict,
      );
    if (edit.changed.includes('contents')) await writeContents(tx.db, id, edit.facts.contents);
    if (columns.buyer_id !== undefined)
      await tx.services.notices.tell({ kind: 'parcel-created', parcelId: id });
    if (patch.state) await changeState(tx, actor, now, patch.state);
    return tx.services.parcels.get(id);
  });
}

/** The facts a patch brings, without what is no fact of the parcel. */
function factsIn(patch: Patch): Partial<ParcelFacts> {
  const known = Object.entries(patch).filter(([name]) => name !== 'state' && name !== 'trackingNumber');
  return Object.fromEntries(known);
}

async function heldAgainst(deps: Deps, before: Parcel, patch: Patch): Promise<Edit> {
  const stored = factsOf(before);
  const merged: ParcelFacts = { ...stored, ...factsIn(patch) };
  const facts = {
    ...merged,
    holdCounterId: merged.service === 'hold' ? merged.holdCounterId : null,
    door: merged.service === 'door' ? merged.door : null,
  };
  const changed = (Object.keys(labels) as Field[]).filter((field) => !same(facts[field], stored[field]));
  const heavy = changed.filter((field) => field !== 'note');
  if (heavy.length > 0) checkOpenToChange(before, heavy);
  const checked = heavy.length > 0 ? await checkFacts(deps, facts, stored) : null;
  return { before, facts, changed, checked, patch };
}

function checkOpenToChange(parcel: Parcel, changed: readonly Field[]): void {
  if (!editable.includes(parcel.state))
    throw new AppError(
      'conflict',
      `${parcel.code} is ${stateWords[parcel.state]}: only its note and tracking number can still change.`,
    );
  const onTheRoad = parcel.run && parcel.run.state !== 'proposed';
  const blocked = changed.find((field) => field === 'boxId' || field === 'dropOffCounterId');
  if (onTheRoad && blocked)
    throw new AppError(
      'conflict',
      `${parcel.code} is on a confirmed run: take it off its day first, then change ${labels[blocked]}.`,
    );
}

/** The verdict of a booked parcel's day with the change made; 409 when the day would not be booked like this. */
async function askAgain(deps: Deps, edit: Edit) {
  const { before, checked, changed } = edit;
  if (
    before.state !== 'booked' ||
    before.shipDate === null ||
    !checked ||
    !changed.some((field) => weighty.includes(field))
  )
    return null;
  const verdict = await deps.services.days.forDate(
    before.id,
    before.shipDate,
    withFacts(before, edit.facts, checked),
  );
  refuseShut(before.code, verdict);
  if (verdict.verdict !== 'open' && before.acceptedTight === null)
    throw new AppError(
      'day-not-offered',
      `${longDate(verdict.date)} would be ${verdict.verdict} with this change. ${reasonsText(verdict)} Take ${before.code} off its day, change it and book again.`,
      [],
      { current: verdict },
    );
  return verdict;
}

async function fieldColumns(
  tx: Deps,
  { before, facts, changed, checked, patch }: Edit,
): Promise<Partial<ParcelRow>> {
  const columns: Partial<ParcelRow> = {};
  if (changed.length > 0) {
    if (checked) Object.assign(columns, columnsOf(facts, checked.doorPlace));
    else columns.note = facts.note;
  }
  if (patch.trackingNumber !== undefined && patch.trackingNumber !== before.trackingNumber)
    columns.tracking_number = patch.trackingNumber;
  if (checked && facts.buyer.email !== before.buyer.email) {
    columns.buyer_id = await tx.services.people.ensureBuyer({ ...facts.buyer, zone: checked.zone });
    // The first buyer holds the old link, and what they said of their mornings is not the new one's word.
    columns.arrival_token = newArrivalToken();
    await tx.db('parcel_mornings').where({ parcel_id: before.id }).delete();
  }
  // Saving a booked parcel's new verdict keeps the words it was accepted with.
  if (checked && before.acceptedTight !== null) columns.accepted_tight = before.acceptedTight;
  return columns;
}

/** A span left open stays inside the parcel's days; one that fell outside altogether becomes all of them. */
function keptSpan({ before, facts }: Edit): Partial<ParcelRow> {
  if (!before.flexible) return {};
  const from = before.flexible.from > facts.readyFrom ? before.flexible.from : facts.readyFrom;
  const to = before.flexible.to < facts.latestDate ? before.flexible.to : facts.latestDate;
  return from <= to
    ? { flexible_from: from, flexible_to: to }
    : { flexible_from: facts.readyFrom, flexible_to: facts.latestDate };
}

async function changeState(
  tx: Deps,
  actor: Actor,
  before: Parcel,
  to: NonNullable<Patch['state']>,
): Promise<void> {
  if (before.state === to) return;
  const refuse = (how: string) =>
    new AppError('move-not-allowed', `${before.code} is ${stateWords[before.state]}. ${how}`);
  if (to === 'booked' && before.state !== 'packed') throw refuse('Book a day for it instead.');
  const texts = { packed: 'Packed.', booked: 'Unpacked again.', cancelled: 'Cancelled.', closed: 'Closed.' };
  if (to === 'cancelled' && before.run)
    await tx.services.runs.takeOut(before.id, `${before.code} was cancelled.`, actor);
  await moveParcel(tx, before.id, to, actor, texts[to]);
  if (to === 'cancelled')
    await tx.services.notices.tell({
      kind: 'parcel-cancelled',
      parcelId: before.id,
      shipDate: before.shipDate,
    });
}

function changeText({ before, changed, patch }: Edit): string {
  const parts = changed.map((field) => labels[field]);
  if (patch.trackingNumber !== undefined && patch.trackingNumber !== before.trackingNumber)
    parts.push('the tracking number');
  const last = parts.pop() ?? 'nothing';
  return `Changed ${parts.length > 0 ? `${parts.join(', ')} and ${last}` : last}.`;
}

/** Plain data compared as JSON with its keys in order. */
const same = (a: unknown, b: unknown): boolean => JSON.stringify(sorted(a)) === JSON.stringify(sorted(b));

function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted);
  if (value === null || typeof value !== 'object') return value;
  return Object.fromEntries(
    Object.entries(value)
      .sort(([a], [b]) => (a < b ? -1 : 1))
      .map(([key, inner]) => [key, sorted(inner)]),
  );
}
