import type { Knex } from 'knex';
import type { DayVerdict, PostalCodeInfo } from '@shared/contract';
import type { ParcelFacts } from './parcel-facts';
import type { ParcelRow } from './parcel-rows';

/** What a new parcel has beside the facts a person enters. */
export interface NewParcel {
  readonly breederId: number;
  readonly buyerId: number;
  readonly token: string;
  readonly codePrefix: string;
  readonly now: string;
}

/**
 * Writes a parcel and its contents; answers its id. The code is the next running number of its prefix: the first insert
 * takes SQLite's write lock, so no other connection can count between it and the second statement.
 */
export async function insertParcel(
  db: Knex,
  facts: ParcelFacts,
  door: PostalCodeInfo | null,
  made: NewParcel,
): Promise<number> {
  const [id] = (await db('parcels').insert({
    ...columnsOf(facts, door),
    code: `new ${made.token}`,
    state: 'draft',
    breeder_id: made.breederId,
    buyer_id: made.buyerId,
    arrival_token: made.token,
    created_at: made.now,
    updated_at: made.now,
  })) as [number];
  const last = (await db('parcels')
    .where('code', 'like', `${made.codePrefix}-%`)
    .max({ number: db.raw('cast(substr(code, ?) as integer)', [made.codePrefix.length + 2]) })
    .first()) as { number: number | null } | undefined;
  await db('parcels')
    .where({ id })
    .update({ code: `${made.codePrefix}-${String((last?.number ?? 0) + 1).padStart(4, '0')}` });
  await writeContents(db, id, facts.contents);
  return id;
}

/** Changes columns of a parcel and raises its version. */
export async function updateParcel(
  db: Knex,
  id: number,
  set: Partial<ParcelRow>,
  now: string,
): Promise<void> {
  await db('parcels')
    .where({ id })
    .update({ ...set, updated_at: now, version: db.raw('version + 1') });
}

/** Puts the contents in the place of those there were. */
export async function writeContents(db: Knex, id: number, contents: ParcelFacts['contents']): Promise<void> {
  await db('parcel_contents').where({ parcel_id: id }).delete();
  await db('parcel_contents').insert(
    contents.map((line) => ({
      parcel_id: id,
      species_id: line.speciesId,
      quantity: line.quantity,
      mass_g: line.massG,
    })),
  );
}

/** Keeps the verdict a booking was made on, with the settings' version and the words of acceptance. */
export async function insertBookingVerdict(
  db: Knex,
  made: {
    parcelId: number;
    verdict: DayVerdict;
    policyId: number | null;
    words: string | null;
    by: number | null;
    now: string;
  },
): Promise<void> {
  await db('booking_verdicts').insert({
    parcel_id: made.parcelId,
    ship_date: made.verdict.date,
    verdict: JSON.stringify(made.verdict),
    policy_id: made.policyId,
    accepted_tight: made.words,
    booked_by: made.by,
    created_at: made.now,
  });
}

/** The facts as columns; what the chosen service has no use for is emptied. */
export function columnsOf(facts: ParcelFacts, doorPlace: PostalCodeInfo | null): Partial<ParcelRow> {
  const door = facts.service === 'door' ? facts.door : null;
  return {
    buyer_name: facts.buyer.name,
    buyer_phone: facts.buyer.phone,
    drop_off_counter_id: facts.dropOffCounterId,
    service: facts.service,
    hold_counter_id: facts.service === 'hold' ? facts.holdCounterId : null,
    door_street: door?.street ?? null,
    door_city: door?.city ?? null,
    door_state: door?.state ?? null,
    door_postal_code: door?.postalCode ?? null,
    door_lat: door ? (doorPlace?.lat ?? null) : null,
    door_lon: door ? (doorPlace?.lon ?? null) : null,
    door_zone: door ? (doorPlace?.zone ?? null) : null,
    box_id: facts.boxId,
    ready_from: facts.readyFrom,
    latest_date: facts.latestDate,
    last_meal_date: facts.lastMealDate,
    note: facts.note,
  };
}
