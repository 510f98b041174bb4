import * as z from 'zod';
import { email, id, instant, line, plainDate, prose, service, stateCode, version, zipCode } from './common';
import { contentLine, contents, dayVerdict } from './days';

export const parcelStates = [
  'draft',
  'seeking',
  'booked',
  'packed',
  'aboard',
  'handed-over',
  'arrived',
  'closed',
  'on-hold',
  'cancelled',
] as const;
export const parcelState = z.enum(parcelStates);
export type ParcelState = z.infer<typeof parcelState>;

export const buyerNew = z.object({
  name: line(120, "The buyer's name"),
  email,
  phone: line(30).nullable().default(null),
});

export const doorAddress = z.object({
  street: line(160, 'The street'),
  city: line(80, 'The city'),
  state: stateCode,
  postalCode: zipCode,
});

const shape = {
  buyer: buyerNew,
  contents,
  boxId: z.number({ error: 'Choose a box.' }).int().positive('Choose a box.'),
  service,
  /** For hold service: the counter where the buyer collects. */
  holdCounterId: id.nullable().default(null),
  /** For door service: the buyer's address. */
  door: doorAddress.nullable().default(null),
  readyFrom: plainDate,
  latestDate: plainDate,
  lastMealDate: plainDate.nullable().default(null),
  note: prose(1000).default(''),
};

type Spans = {
  service?: 'hold' | 'door';
  holdCounterId?: number | null;
  door?: unknown;
  readyFrom?: string;
  latestDate?: string;
};
const consistent = (parcel: Spans, ctx: z.RefinementCtx) => {
  if (parcel.service === 'hold' && parcel.holdCounterId == null)
    ctx.addIssue({
      code: 'custom',
      path: ['holdCounterId'],
      message: 'Choose the counter where the buyer collects.',
    });
  if (parcel.service === 'door' && parcel.door == null)
    ctx.addIssue({ code: 'custom', path: ['door'], message: "Enter the buyer's address." });
  if (parcel.readyFrom && parcel.latestDate && parcel.readyFrom > parcel.latestDate)
    ctx.addIssue({ code: 'custom', path: ['latestDate'], message: 'The latest day is before the first.' });
};

/** `POST /api/parcels`. A coordinator or admin who enters one for a breeder names the breeder. */
export const parcelNew = z
  .object({ ...shape, breederId: id.optional(), dropOffCounterId: id.optional() })
  .superRefine(consistent);
export type ParcelNew = z.input<typeof parcelNew>;

/** `PATCH /api/parcels/:id`: any of the fields, or a move to another state by its name. */
export const parcelPatch = z
  .object({
    buyer: buyerNew,
    contents,
    boxId: shape.boxId,
    service,
    holdCounterId: id.nullable(),
    door: doorAddress.nullable(),
    readyFrom: plainDate,
    latestDate: plainDate,
    lastMealDate: plainDate.nullable(),
    note: prose(1000),
    dropOffCounterId: id,
    state: z.enum(['packed', 'booked', 'cancelled', 'closed']),
    trackingNumber: line(60).nullable(),
  })
  .partial();
export type ParcelPatch = z.input<typeof parcelPatch>;

export const parcel = z.object({
  id,
  code: z.string(),
  state: parcelState,
  breeder: z.object({ id, name: z.string(), businessName: z.string().nullable() }),
  buyer: z.object({ id, name: z.string(), email: z.string(), phone: z.string().nullable() }),
  contents: z.array(contentLine.extend({ commonName: z.string(), scientificName: z.string() })),
  totalMassG: z.number(),
  box: z.object({ id, name: z.string(), volumeL: z.number() }),
  service,
  dropOff: z.object({
    counterId: id,
    name: z.string(),
    city: z.string(),
    state: z.string(),
    zone: z.string(),
  }),
  destination: z.object({
    counterId: id.nullable(),
    name: z.string(),
    street: z.string(),
    city: z.string(),
    state: z.string(),
    postalCode: z.string(),
    zone: z.string(),
  }),
  readyFrom: plainDate,
  latestDate: plainDate,
  lastMealDate: plainDate.nullable(),
  /** The ship day it is booked on, or null. */
  shipDate: plainDate.nullable(),
  arrivalDate: plainDate.nullable(),
  /** The span it was left open for (state `seeking`). */
  flexible: z.object({ from: plainDate, to: plainDate }).nullable(),
  acceptedTight: z.string().nullable(),
  /** Why it is on hold, in a sentence; null otherwise. */
  holdReason: z.string().nullable(),
  run: z.object({ id, state: z.string(), date: plainDate, coordinatorName: z.string() }).nullable(),
  shareCents: z.number().int().nullable(),
  trackingNumber: z.string().nullable(),
  arrivalUrl: z.string(),
  mornings: z.array(z.object({ date: plainDate, suits: z.boolean() })),
  note: z.string(),
  /** What the buyer reported of the arrival; null until then. */
  report: z
    .object({
      outcome: z.enum(['arrived-well', 'arrived-weak', 'doa', 'not-arrived']),
      text: z.string(),
      at: instant,
    })
    .nullable(),
  /** The verdict it was booked on, as it stood then. */
  bookedVerdict: dayVerdict.nullable(),
  createdAt: instant,
  updatedAt: instant,
  version,
});
export type Parcel = z.infer<typeof parcel>;

export const parcelListQuery = z.object({
  state: z.string().optional(),
  q: z.string().max(100).optional(),
  breederId: z.coerce.number().int().positive().optional(),
});
export const parcelList = z.array(parcel);

/** `PUT /api/parcels/:id/booking`. `acceptTight` is the breeder's acceptance in their own words (10 characters at least). */
export const booking = z.union([
  z.object({
    date: plainDate,
    acceptTight: z.string().trim().min(10, 'Say in a few words that you accept it.').max(500).optional(),
  }),
  z.object({
    flexible: z
      .object({ from: plainDate, to: plainDate })
      .refine((span) => span.from <= span.to, { path: ['to'], message: 'The last day is before the first.' }),
  }),
]);
export type Booking = z.input<typeof booking>;

export const historyEntry = z.object({
  id,
  at: instant,
  who: z.string(),
  action: z.string(),
  text: z.string(),
});
export type HistoryEntry = z.infer<typeof historyEntry>;
