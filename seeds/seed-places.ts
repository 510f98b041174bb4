import type { Knex } from 'knex';
import { federalHolidayRules } from '../shared/src/calendar/federal-holiday-rules';
import { boxes, species } from './circle-animals';
import { carrierName, counters, hub, type CounterSeed } from './circle-places';

/** Ids by the name the rest of the seed knows them by. */
export interface SeededPlaces {
  /** By city. */
  readonly counters: ReadonlyMap<string, number>;
  /** By common name, with the mass of a typical animal in grams. */
  readonly species: ReadonlyMap<string, { readonly id: number; readonly massG: number }>;
  readonly boxes: ReadonlyMap<string, number>;
}

const weekdays = [1, 2, 3, 4, 5];
const byWeekday = (days: readonly number[], value: unknown) =>
  JSON.stringify(Object.fromEntries(days.map((day) => [day, value])));

async function insert(db: Knex, table: string, row: Record<string, unknown>): Promise<number> {
  const [id] = await db(table).insert(row);
  if (id === undefined) throw new Error(`${table} took no row.`);
  return id;
}

/** The federal holidays (5 U.S.C. 6103) as yearly blackouts that an admin sees and can lift. */
export async function seedHolidays(db: Knex, now: string): Promise<void> {
  for (const { title, rules } of federalHolidayRules)
    await insert(db, 'blackouts', {
      title,
      kind: 'yearly',
      rules,
      scope: 'everywhere',
      source: 'federal-holiday',
      note: 'Federal holiday, with its observed day (5 U.S.C. 6103).',
      created_at: now,
    });
}

/** The invented carrier with its hub and counters, the species and the boxes of the demo circle. */
export async function seedPlaces(db: Knex): Promise<SeededPlaces> {
  const hubId = await insert(db, 'hubs', { ...hub });
  const carrierId = await insert(db, 'carriers', { name: carrierName, hub_id: hubId });
  const counterIds = new Map<string, number>();
  for (const counter of counters)
    counterIds.set(counter.city, await insert(db, 'counters', counterRow(counter, carrierId)));
  const speciesIds = new Map<string, { id: number; massG: number }>();
  for (const kind of species) {
    const id = await insert(db, 'species', {
      common_name: kind.commonName,
      scientific_name: kind.scientificName,
      band_low_f: kind.band[0],
      band_high_f: kind.band[1],
      endurance_low_f: kind.endurance[0],
      endurance_high_f: kind.endurance[1],
      outdoor_low_f: kind.outdoor[0],
      outdoor_high_f: kind.outdoor[1],
      typical_mass_g: kind.massG,
    });
    speciesIds.set(kind.commonName, { id, massG: kind.massG });
  }
  const boxIds = new Map<string, number>();
  for (const { name, lengthIn, widthIn, heightIn, foamIn } of boxes)
    boxIds.set(
      name,
      await insert(db, 'boxes', {
        name,
        length_in: lengthIn,
        width_in: widthIn,
        height_in: heightIn,
        foam_in: foamIn,
      }),
    );
  return { counters: counterIds, species: speciesIds, boxes: boxIds };
}

function counterRow(counter: CounterSeed, carrierId: number): Record<string, unknown> {
  const days = counter.saturday ? [...weekdays, 6] : weekdays;
  return {
    carrier_id: carrierId,
    name: counter.name,
    street: counter.street,
    city: counter.city,
    state: counter.state,
    postal_code: counter.postalCode,
    lat: counter.lat,
    lon: counter.lon,
    zone: counter.zone,
    can_drop_off: counter.dropOff ?? false,
    can_hold: true,
    working_days: JSON.stringify(days),
    cut_off_minutes: counter.dropOff ? byWeekday(weekdays, 17 * 60) : '{}',
    opening_hours: byWeekday(days, { openMinute: 8 * 60, closeMinute: 18 * 60 }),
    commit_minute: 9 * 60,
  };
}
