import * as z from 'zod';
import { id, instant, line, plainDate, prose, stateCode, version } from './common';

export const blackoutScope = z.enum(['everywhere', 'carrier', 'state', 'counter']);
export type BlackoutScope = z.infer<typeof blackoutScope>;

const shape = {
  title: line(120, 'The title'),
  /** `date`: one day; `range`: both ends count; `yearly`: RFC 5545 RRULE lines, joined by newlines. */
  kind: z.enum(['date', 'range', 'yearly']),
  startDate: plainDate.nullable(),
  endDate: plainDate.nullable(),
  rules: z.string().trim().max(1000).nullable(),
  /** Single days taken out again ("lifted") of a range or a yearly rule. */
  liftedDates: z.array(plainDate).max(200),
  scope: blackoutScope,
  carrierId: id.nullable(),
  state: stateCode.nullable(),
  counterId: id.nullable(),
  note: prose(500),
};

type Body = {
  kind: 'date' | 'range' | 'yearly';
  startDate: string | null;
  endDate: string | null;
  rules: string | null;
  scope: BlackoutScope;
  carrierId: number | null;
  state: string | null;
  counterId: number | null;
};
const rruleLine = /^(RRULE:)?FREQ=YEARLY(;[A-Z]+=[A-Z0-9,+-]+)*$/;
const consistent = (b: Body, ctx: z.RefinementCtx) => {
  const say = (path: string, message: string) => ctx.addIssue({ code: 'custom', path: [path], message });
  if (b.kind !== 'yearly' && !b.startDate) say('startDate', 'Choose the day.');
  if (b.kind === 'range' && !b.endDate) say('endDate', 'Choose the last day.');
  if (b.kind === 'range' && b.startDate && b.endDate && b.endDate < b.startDate)
    say('endDate', 'The last day is before the first.');
  if (b.kind === 'yearly' && !b.rules) say('rules', 'Say which day of the year it is.');
  if (b.kind === 'yearly' && b.rules && !b.rules.split('\n').every((text) => rruleLine.test(text.trim())))
    say('rules', 'Use yearly recurrence rules, one a line, like FREQ=YEARLY;BYMONTH=7;BYMONTHDAY=4.');
  if (b.scope === 'carrier' && !b.carrierId) say('carrierId', 'Choose the carrier.');
  if (b.scope === 'state' && !b.state) say('state', 'Choose the state.');
  if (b.scope === 'counter' && !b.counterId) say('counterId', 'Choose the counter.');
};

export const blackout = z.object({
  id,
  ...shape,
  source: z.enum(['federal-holiday', 'admin']),
  createdAt: instant,
  version,
});
export type Blackout = z.infer<typeof blackout>;

export const blackoutNew = z
  .object({
    ...shape,
    startDate: shape.startDate.default(null),
    endDate: shape.endDate.default(null),
    rules: shape.rules.default(null),
    liftedDates: shape.liftedDates.default([]),
    carrierId: shape.carrierId.default(null),
    state: shape.state.default(null),
    counterId: shape.counterId.default(null),
    note: shape.note.default(''),
  })
  .superRefine(consistent);
export type BlackoutNew = z.input<typeof blackoutNew>;

export const blackoutPatch = z.object(shape).partial();
export type BlackoutPatch = z.input<typeof blackoutPatch>;

/** `GET /api/blackouts?from&to`: the rules, and each covered day in the window. */
export const blackoutQuery = z.object({ from: plainDate.optional(), to: plainDate.optional() });
export const blackoutList = z.object({
  blackouts: z.array(blackout),
  days: z.array(z.object({ date: plainDate, blackoutId: id })),
});
export type BlackoutList = z.infer<typeof blackoutList>;

/** `POST /api/blackouts/preview`: `replaces` names the one being edited, `remove` previews taking it away. */
export const previewRequest = z.object({ blackout: blackoutNew.nullable(), replaces: id.optional() });
export const blackoutPreview = z.object({
  days: z.array(plainDate),
  parcels: z.array(
    z.object({
      id,
      code: z.string(),
      what: z.string(),
      breederName: z.string(),
      buyerName: z.string(),
      shipDate: plainDate,
      text: z.string(),
    }),
  ),
  runs: z.array(z.object({ id, date: plainDate, coordinatorName: z.string(), parcels: z.number().int() })),
  people: z.array(z.object({ name: z.string(), role: z.string() })),
});
export type BlackoutPreview = z.infer<typeof blackoutPreview>;
