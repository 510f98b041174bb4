import { addDays } from '@shared/calendar/add-days';
import type { DayVerdict, Parcel, ParcelState } from '@shared/contract';

/** A parcel as stored, with what the joins bring along. Stays inside this feature's queries and writes. */
export interface ParcelRow {
  id: number;
  code: string;
  state: ParcelState;
  breeder_id: number;
  buyer_id: number;
  buyer_name: string;
  buyer_phone: string | null;
  drop_off_counter_id: number;
  service: 'hold' | 'door';
  hold_counter_id: number | null;
  door_street: string | null;
  door_city: string | null;
  door_state: string | null;
  door_postal_code: string | null;
  door_lat: number | null;
  door_lon: number | null;
  door_zone: string | null;
  box_id: number;
  ready_from: string;
  latest_date: string;
  last_meal_date: string | null;
  ship_date: string | null;
  flexible_from: string | null;
  flexible_to: string | null;
  accepted_tight: string | null;
  hold_reason: string | null;
  share_cents: number | null;
  tracking_number: string | null;
  arrival_token: string;
  report_outcome: NonNullable<Parcel['report']>['outcome'] | null;
  report_text: string | null;
  report_at: string | null;
  note: string;
  created_at: string;
  updated_at: string;
  version: number;
}

export interface JoinedRow extends ParcelRow {
  breeder_name: string;
  breeder_business: string | null;
  buyer_email: string;
  box_name: string;
  box_length_in: number;
  box_width_in: number;
  box_height_in: number;
  drop_name: string;
  drop_city: string;
  drop_state: string;
  drop_zone: string;
  hold_name: string | null;
  hold_street: string | null;
  hold_city: string | null;
  hold_state: string | null;
  hold_postal_code: string | null;
  hold_zone: string | null;
  run_id: number | null;
  run_state: string | null;
  run_date: string | null;
  run_coordinator: string | null;
}

export interface ContentRow {
  parcel_id: number;
  species_id: number;
  quantity: number;
  mass_g: number;
  common_name: string;
  scientific_name: string;
}

export interface MorningRow {
  parcel_id: number;
  date: string;
  suits: number | boolean;
}

export interface VerdictRow {
  parcel_id: number;
  ship_date: string;
  verdict: string;
}

/** What hangs on parcels, by parcel id. */
export interface ParcelParts {
  readonly contents: ReadonlyMap<number, ContentRow[]>;
  readonly mornings: ReadonlyMap<number, MorningRow[]>;
  /** The newest booking verdict of each. */
  readonly verdicts: ReadonlyMap<number, VerdictRow[]>;
}

/** One cubic inch in litres (2.54 cm to the third power). */
const cubicInchL = 0.016387064;

/** A row and its parts as the wire's parcel. */
export function toParcel(row: JoinedRow, parts: ParcelParts, publicUrl: string): Parcel {
  const contents = parts.contents.get(row.id) ?? [];
  const [verdict] = parts.verdicts.get(row.id) ?? [];
  return {
    id: row.id,
    code: row.code,
    state: row.state,
    breeder: { id: row.breeder_id, name: row.breeder_name, businessName: row.breeder_business },
    buyer: { id: row.buyer_id, name: row.buyer_name, email: row.buyer_email, phone: row.buyer_phone },
    contents: contents.map((line) => ({
      speciesId: line.species_id,
      quantity: line.quantity,
      massG: line.mass_g,
      commonName: line.common_name,
      scientificName: line.scientific_name,
    })),
    totalMassG: contents.reduce((sum, line) => sum + line.quantity * line.mass_g, 0),
    box: {
      id: row.box_id,
      name: row.box_name,
      volumeL: row.box_length_in * row.box_width_in * row.box_height_in * cubicInchL,
    },
    service: row.service,
    dropOff: {
      counterId: row.drop_off_counter_id,
      name: row.drop_name,
      city: row.drop_city,
      state: row.drop_state,
      zone: row.drop_zone,
    },
    destination: destinationOf(row),
    readyFrom: row.ready_from,
    latestDate: row.latest_date,
    lastMealDate: row.last_meal_date,
    shipDate: row.ship_date,
    arrivalDate: row.ship_date === null ? null : addDays(row.ship_date, 1),
    flexible: row.flexible_from && row.flexible_to ? { from: row.flexible_from, to: row.flexible_to } : null,
    acceptedTight: row.accepted_tight,
    holdReason: row.hold_reason,
    run:
      row.run_id === null
        ? null
        : {
            id: row.run_id,
            state: row.run_state ?? '',
            date: row.run_date ?? '',
            coordinatorName: row.run_coordinator ?? '',
          },
    shareCents: row.share_cents,
    trackingNumber: row.tracking_number,
    arrivalUrl: `${publicUrl.replace(/\/$/, '')}/arrival/${row.arrival_token}`,
    mornings: (parts.mornings.get(row.id) ?? []).map(({ date, suits }) => ({ date, suits: Boolean(suits) })),
    note: row.note,
    report: reportOf(row),
    bookedVerdict:
      verdict && verdict.ship_date === row.ship_date ? (JSON.parse(verdict.verdict) as DayVerdict) : null,
    createdAt: row.created_at,
    updatedAt: row.updated_at,
    version: row.version,
  };
}

function destinationOf(row: JoinedRow): Parcel['destination'] {
  if (row.service === 'door')
    return {
      counterId: null,
      name: "Buyer's door",
      street: row.door_street ?? '',
      city: row.door_city ?? '',
      state: row.door_state ?? '',
      postalCode: row.door_postal_code ?? '',
      zone: row.door_zone ?? '',
    };
  return {
    counterId: row.hold_counter_id,
    name: row.hold_name ?? '',
    street: row.hold_street ?? '',
    city: row.hold_city ?? '',
    state: row.hold_state ?? '',
    postalCode: row.hold_postal_code ?? '',
    zone: row.hold_zone ?? '',
  };
}

function reportOf(row: ParcelRow): Parcel['report'] {
  if (row.report_outcome === null || row.report_at === null) return null;
  return { outcome: row.report_outcome, text: row.report_text ?? '', at: row.report_at };
}
