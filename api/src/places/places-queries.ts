import type { Knex } from 'knex';
import type { Box, BoxNew, Carrier, Counter, CounterNew, Hub, Species, SpeciesNew } from '@shared/contract';

interface CounterRow {
  id: number;
  carrier_id: number;
  name: string;
  street: string;
  city: string;
  state: string;
  postal_code: string;
  lat: number;
  lon: number;
  zone: string;
  can_drop_off: number;
  can_hold: number;
  working_days: string;
  cut_off_minutes: string;
  opening_hours: string;
  commit_minute: number;
  active: number;
  version: number;
}

export const counterFromRow = (row: CounterRow): Counter => ({
  id: row.id,
  carrierId: row.carrier_id,
  name: row.name,
  street: row.street,
  city: row.city,
  state: row.state,
  postalCode: row.postal_code,
  lat: row.lat,
  lon: row.lon,
  zone: row.zone,
  canDropOff: Boolean(row.can_drop_off),
  canHold: Boolean(row.can_hold),
  workingDays: JSON.parse(row.working_days) as Counter['workingDays'],
  cutOffMinutes: JSON.parse(row.cut_off_minutes) as Counter['cutOffMinutes'],
  openingHours: JSON.parse(row.opening_hours) as Counter['openingHours'],
  commitMinute: row.commit_minute,
  active: Boolean(row.active),
  version: row.version,
});

export const counterToRow = (counter: CounterNew): Record<string, unknown> => ({
  carrier_id: counter.carrierId,
  name: counter.name,
  street: counter.street,
  city: counter.city,
  state: counter.state,
  postal_code: counter.postalCode,
  lat: counter.lat,
  lon: counter.lon,
  zone: counter.zone,
  can_drop_off: counter.canDropOff,
  can_hold: counter.canHold,
  working_days: JSON.stringify([...new Set(counter.workingDays)].sort()),
  cut_off_minutes: JSON.stringify(counter.cutOffMinutes),
  opening_hours: JSON.stringify(counter.openingHours),
  commit_minute: counter.commitMinute,
  active: counter.active,
});

interface SpeciesRow {
  id: number;
  common_name: string;
  scientific_name: string;
  band_low_f: number;
  band_high_f: number;
  endurance_low_f: number;
  endurance_high_f: number;
  outdoor_low_f: number | null;
  outdoor_high_f: number | null;
  typical_mass_g: number;
  venomous: number;
  note: string;
  active: number;
  version: number;
}

export const speciesFromRow = (row: SpeciesRow): Species => ({
  id: row.id,
  commonName: row.common_name,
  scientificName: row.scientific_name,
  bandLowF: row.band_low_f,
  bandHighF: row.band_high_f,
  enduranceLowF: row.endurance_low_f,
  enduranceHighF: row.endurance_high_f,
  outdoorLowF: row.outdoor_low_f,
  outdoorHighF: row.outdoor_high_f,
  typicalMassG: row.typical_mass_g,
  venomous: Boolean(row.venomous),
  note: row.note,
  active: Boolean(row.active),
  version: row.version,
});

export const speciesToRow = (species: SpeciesNew): Record<string, unknown> => ({
  common_name: species.commonName,
  scientific_name: species.scientificName,
  band_low_f: species.bandLowF,
  band_high_f: species.bandHighF,
  endurance_low_f: species.enduranceLowF,
  endurance_high_f: species.enduranceHighF,
  outdoor_low_f: species.outdoorLowF,
  outdoor_high_f: species.outdoorHighF,
  typical_mass_g: species.typicalMassG,
  venomous: species.venomous,
  note: species.note,
  active: species.active,
});

interface BoxRow {
  id: number;
  name: string;
  length_in: number;
  width_in: number;
  height_in: number;
  foam_in: number;
  active: number;
  version: number;
}

/** 1 in = 2.54 cm exactly, so 1 in³ = 0.016387064 L. */
const litresInCubicInch = 0.016387064;

export const boxFromRow = (row: BoxRow): Box => ({
  id: row.id,
  name: row.name,
  lengthIn: row.length_in,
  widthIn: row.width_in,
  heightIn: row.height_in,
  foamIn: row.foam_in,
  active: Boolean(row.active),
  volumeL: Math.round(row.length_in * row.width_in * row.height_in * litresInCubicInch * 10) / 10,
  version: row.version,
});

export const boxToRow = (box: BoxNew): Record<string, unknown> => ({
  name: box.name,
  length_in: box.lengthIn,
  width_in: box.widthIn,
  height_in: box.heightIn,
  foam_in: box.foamIn,
  active: box.active,
});

export async function listCarriers(db: Knex): Promise<Carrier[]> {
  const rows = await db<{ id: number; name: string; hub_id: number }>('carriers').orderBy('id');
  return rows.map((row) => ({ id: row.id, name: row.name, hubId: row.hub_id }));
}

export const listHubs = (db: Knex): Promise<Hub[]> =>
  db<Hub>('hubs').select('id', 'name', 'city', 'state', 'lat', 'lon', 'zone').orderBy('id');
