import * as z from 'zod';
import { id, instant, plainDate, prose, version } from './common';
import { verdict } from './days';

export const runStates = [
  'proposed',
  'confirmed',
  'underway',
  'handed-over',
  'closed',
  'called-off',
] as const;
export const runState = z.enum(runStates);
export type RunState = z.infer<typeof runState>;

export const runParcel = z.object({
  id,
  code: z.string(),
  state: z.string(),
  breederId: id,
  breederName: z.string(),
  what: z.string(),
  destination: z.string(),
  volumeL: z.number(),
  verdict: verdict.nullable(),
  pinned: z.boolean(),
  shareCents: z.number().int(),
});
export type RunParcel = z.infer<typeof runParcel>;

/** A stop as planned. Times are instants; the clock is the circle's zone. */
export const runStop = z.object({
  seq: z.number().int().positive(),
  breederId: id,
  breederName: z.string(),
  businessName: z.string().nullable(),
  street: z.string().nullable(),
  city: z.string().nullable(),
  phone: z.string().nullable(),
  lat: z.number(),
  lon: z.number(),
  arriveAt: instant,
  leaveAt: instant,
  waitMinutes: z.number(),
  driveMinutes: z.number(),
  miles: z.number(),
  /** What this breeder would pay to drive to the counter and back alone, at the circle's present rates. */
  aloneCents: z.number().int(),
  parcelIds: z.array(id),
});
export type RunStop = z.infer<typeof runStop>;

export const run = z.object({
  id,
  state: runState,
  date: plainDate,
  zone: z.string(),
  coordinator: z.object({ id, name: z.string(), capacityL: z.number(), lat: z.number(), lon: z.number() }),
  counter: z.object({
    id,
    name: z.string(),
    city: z.string(),
    state: z.string(),
    lat: z.number(),
    lon: z.number(),
  }),
  departAt: instant,
  arriveAt: instant,
  cutOffAt: instant,
  slackMinutes: z.number(),
  driveMinutes: z.number(),
  miles: z.number(),
  /** Driving from the last stop to the counter. */
  lastLegMinutes: z.number(),
  loadL: z.number(),
  fixedCents: z.number().int(),
  drivingCents: z.number().int(),
  costCents: z.number().int(),
  /** What its breeders would pay if each drove to the counter and back alone. */
  aloneCents: z.number().int(),
  stops: z.array(runStop),
  parcels: z.array(runParcel),
  /** Plain sentences about what is wrong with the run as it stands; empty when it can be driven. */
  problems: z.array(z.string()),
  note: z.string(),
  version,
});
export type Run = z.infer<typeof run>;

export const runListQuery = z.object({
  from: plainDate.optional(),
  to: plainDate.optional(),
  state: z.string().optional(),
});
export const runList = z.array(run);

/** Why a parcel found no place, and the cheapest thing that would help. */
export const unplaced = z.object({
  parcelId: id,
  code: z.string(),
  what: z.string(),
  destination: z.string(),
  reason: z.enum([
    'no-safe-day',
    'weather-unknown',
    'no-driver',
    'no-room',
    'too-late',
    'too-costly',
    'not-tried',
  ]),
  text: z.string(),
  help: z.string().nullable(),
});
export type Unplaced = z.infer<typeof unplaced>;

/** `POST /api/runs/proposals` and what it answers. */
export const proposalRequest = z.object({ from: plainDate.optional(), to: plainDate.optional() }).default({});
export const proposal = z.object({
  at: instant,
  runs: z.array(run),
  unplaced: z.array(unplaced),
  /** What the runs cost in money, fixed and driving. */
  costCents: z.number().int(),
  /** Objective of the plan, its lower bound and the distance between them as a fraction of the cost; all in cents. */
  objectiveCents: z.number(),
  boundCents: z.number(),
  gap: z.number().min(0),
  /** `proven`: the bound holds for the true cost; `estimate`: it does not have to. */
  boundKind: z.enum(['proven', 'estimate']),
  aloneCents: z.number().int(),
  aloneMinutes: z.number(),
  driveMinutes: z.number(),
  seconds: z.number(),
});
export type Proposal = z.infer<typeof proposal>;

/** `PATCH /api/runs/:id`: put parcels in or out, pin, note; the answer is the run with its consequences. */
export const runPatch = z
  .object({
    addParcelIds: z.array(id).max(200),
    removeParcelIds: z.array(id).max(200),
    pin: z.array(z.object({ parcelId: id, pinned: z.boolean() })).max(200),
    note: prose(1000),
  })
  .partial();
export type RunPatch = z.input<typeof runPatch>;

/** `POST /api/runs/:id/preview` with the same body: what it would cost and break, nothing saved. */
export const runPreview = z.object({
  before: run,
  after: run,
  costChangeCents: z.number().int(),
  problems: z.array(z.string()),
});
export type RunPreview = z.infer<typeof runPreview>;

/** `POST /api/runs` by hand: an empty proposed run on a day. */
export const runNew = z.object({
  coordinatorId: id,
  date: plainDate,
  counterId: id.optional(),
  parcelIds: z.array(id).max(200).default([]),
});
export type RunNew = z.input<typeof runNew>;

export const departureBody = z.object({ aboardParcelIds: z.array(id).optional() }).default({});
export const handOverBody = z
  .object({
    tracking: z.array(z.object({ parcelId: id, number: z.string().trim().min(1).max(60) })).default([]),
  })
  .default({ tracking: [] });
export const callOffBody = z.object({ reason: z.string().trim().min(3, 'Say why.').max(500) });
