import * as z from 'zod';
import { id, instant, plainDate } from './common';

/** `GET /api/health`: for anybody, so it names no person and no place. */
export const health = z.object({
  status: z.enum(['ok', 'degraded']),
  database: z.enum(['ok', 'failing']),
  mailQueue: z.object({ waiting: z.number().int(), failed: z.number().int() }),
  forecasts: z.object({
    places: z.number().int(),
    oldestMinutes: z.number().nullable(),
    newestMinutes: z.number().nullable(),
  }),
  version: z.string(),
});
export type Health = z.infer<typeof health>;

/** `GET /api/desk` (admin): what needs attention. */
export const desk = z.object({
  forecasts: z.array(
    z.object({
      place: z.string(),
      issuedAt: instant.nullable(),
      fetchedAt: instant.nullable(),
      problem: z.string().nullable(),
    }),
  ),
  failedMail: z.array(z.object({ id, to: z.string(), subject: z.string(), error: z.string(), at: instant })),
  mailWaiting: z.number().int(),
  runs: z.array(z.object({ id, date: plainDate, text: z.string() })),
  parcels: z.array(z.object({ id, code: z.string(), text: z.string() })),
  counts: z.object({ people: z.number().int(), parcels: z.number().int(), runs: z.number().int() }),
});
export type Desk = z.infer<typeof desk>;
