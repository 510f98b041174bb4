import * as z from 'zod';
import { id, instant, plainDate, service, zipCode } from './common';

export const verdicts = ['open', 'tight', 'shut', 'far'] as const;
export const verdict = z.enum(verdicts);
export type Verdict = z.infer<typeof verdict>;

export const pack = z.enum(['none', 'heat-40', 'heat-72', 'cold']);
export type Pack = z.infer<typeof pack>;

/**
 * One reason behind a verdict, as data. `values` holds the numbers, the places and the hours it comes from;
 * `text` is the sentence that `reasonText` makes of it.
 */
export const reason = z.object({
  code: z.string(),
  verdict,
  text: z.string(),
  values: z.record(z.string(), z.union([z.string(), z.number(), z.boolean(), z.null()])),
});
export type Reason = z.infer<typeof reason>;

export const rangeF = z.object({ lowF: z.number(), highF: z.number() });
export type RangeF = z.infer<typeof rangeF>;

export const legKind = z.enum([
  'packed',
  'vehicle',
  'drop-off',
  'linehaul-out',
  'hub',
  'linehaul-in',
  'station',
  'held',
  'truck',
  'late',
]);

/** A point of the box trace. `tempF` with its ribbon is null past the planned end, `lateF` where there is no late case. */
export const traceRow = z.object({
  at: instant,
  tempF: z.number().nullable(),
  lowF: z.number().nullable(),
  highF: z.number().nullable(),
  lateF: z.number().nullable(),
  leg: legKind,
  place: z.string(),
  zone: z.string(),
});
export type TraceRow = z.infer<typeof traceRow>;

/** One day of the fourteen-day strip. `chance`, `lateChance` and `inBox` are null where the weather is not known. */
export const dayVerdict = z.object({
  date: plainDate,
  verdict,
  chance: z.number().min(0).max(1).nullable(),
  lateChance: z.number().min(0).max(1).nullable(),
  slackDays: z.number().int().min(0),
  pack,
  /** When and where it is planned to be ready for the buyer; `at` is UTC, `zone` the clock of the place. */
  arrival: z.object({ at: instant, place: z.string(), zone: z.string() }),
  outdoor: rangeF.nullable(),
  inBox: rangeF.nullable(),
  reasons: z.array(reason),
  leadDays: z.number().int(),
  /** Issue time of the oldest forecast used; null when there is none. */
  forecastAt: instant.nullable(),
  /** The air in the box along the journey, when it was asked for. */
  trace: z.array(traceRow).optional(),
  /** A run that already goes that day from the same counter, with the room left; null when there is none. */
  run: z.object({ id, state: z.string(), roomL: z.number() }).nullable().default(null),
});
export type DayVerdict = z.infer<typeof dayVerdict>;

/** What lies in the box: `massG` is one animal's mass in grams, the line weighs `quantity * massG`. */
export const contentLine = z.object({
  speciesId: z.number({ error: 'Choose a species.' }).int().positive('Choose a species.'),
  quantity: z
    .number({ error: 'How many?' })
    .int('Whole animals only.')
    .min(1, 'At least one.')
    .max(50, 'At most 50 in one box.'),
  massG: z
    .number({ error: 'Enter the mass of one animal.' })
    .positive('Enter the mass of one animal.')
    .max(50000, 'At most 50 kg.'),
});
export type ContentLine = z.infer<typeof contentLine>;
export const contents = z
  .array(contentLine)
  .min(1, 'Say what is in the box.')
  .max(10, 'At most ten kinds in one box.');

export const routeCheck = z.object({
  destination: z.union([z.object({ postalCode: zipCode }), z.object({ counterId: id })]),
  service,
  contents,
  boxId: id,
  /** Where the parcel would be dropped off; the breeder's own counter when left out. */
  dropOffCounterId: id.optional(),
  from: plainDate.optional(),
  days: z.number().int().min(1).max(28).default(14),
  trace: z.boolean().default(false),
});
export type RouteCheck = z.input<typeof routeCheck>;

/** What the strip needs beside the days: the band of the contents and the places of the route. */
export const daysAnswer = z.object({
  days: z.array(dayVerdict),
  band: rangeF.nullable(),
  /** The wider limits that the contents may meet once, for the late case. */
  endurance: rangeF.optional(),
  route: z.object({
    origin: z.string(),
    hub: z.string(),
    destination: z.string(),
    originZone: z.string(),
    destinationZone: z.string(),
  }),
  /** Age of the oldest forecast used, in minutes; null without any. */
  forecastAgeMinutes: z.number().nullable(),
});
export type DaysAnswer = z.infer<typeof daysAnswer>;
