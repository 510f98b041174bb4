import * as z from 'zod';
import { instant, plainDate, prose, service } from './common';

export const tokenParams = z.object({ token: z.string().min(16).max(200) });

export const arrivalStep = z.object({
  key: z.enum(['day-chosen', 'on-a-run', 'handed-over', 'at-counter', 'collected']),
  state: z.enum(['done', 'now', 'next']),
  text: z.string(),
  at: instant.nullable(),
});

/** What the buyer sees; nothing of the breeder's or other parcels' business is in it. */
export const arrival = z.object({
  token: z.string(),
  code: z.string(),
  what: z.string(),
  breederName: z.string(),
  breederPhone: z.string().nullable(),
  buyerName: z.string(),
  service,
  /** `planned`: the date stands; `open`: not chosen yet; `on-hold`: taken off its day; `over`: arrived or cancelled. */
  status: z.enum(['open', 'planned', 'on-hold', 'arrived', 'cancelled']),
  arrivalDate: plainDate.nullable(),
  /** First and last minute to collect on the arrival day, as instants. */
  collectFrom: instant.nullable(),
  collectBy: instant.nullable(),
  place: z.object({
    name: z.string(),
    street: z.string(),
    city: z.string(),
    state: z.string(),
    postalCode: z.string(),
    zone: z.string(),
    hours: z.string().nullable(),
  }),
  bring: z.array(z.string()),
  steps: z.array(arrivalStep),
  /** Mornings that could come into question, with the buyer's word (null: not said). */
  mornings: z.array(z.object({ date: plainDate, suits: z.boolean().nullable(), offered: z.boolean() })),
  trackingNumber: z.string().nullable(),
  report: z.object({ outcome: z.string(), text: z.string(), at: instant }).nullable(),
  calendarUrl: z.string(),
});
export type Arrival = z.infer<typeof arrival>;

export const morningsBody = z.object({
  mornings: z.array(z.object({ date: plainDate, suits: z.boolean() })).max(60),
});
export type MorningsBody = z.infer<typeof morningsBody>;

export const reportBody = z.object({
  outcome: z.enum(['arrived-well', 'arrived-weak', 'doa', 'not-arrived']),
  text: prose(1000).default(''),
});
export type ReportBody = z.input<typeof reportBody>;

export const arrivalSummary = z.object({
  token: z.string(),
  code: z.string(),
  what: z.string(),
  arrivalDate: plainDate.nullable(),
  place: z.string(),
  status: arrival.shape.status,
});
/** `GET /api/arrivals`: a signed-in buyer's own. */
export const arrivalList = z.array(arrivalSummary);
export type ArrivalList = z.infer<typeof arrivalList>;
