import * as z from 'zod';
import { milesBetween } from './climate';

const where = { lat: z.number(), lon: z.number(), radiusMiles: z.number().positive().default(50) };
const when = { fromIso: z.iso.datetime({ offset: true }), toIso: z.iso.datetime({ offset: true }) };
const outageKinds = [
  'none',
  '500',
  '503',
  '404',
  '429',
  'timeout',
  'malformed',
  'not-json',
  'refuse',
  'huge',
] as const;

/** What a test may ask of the fake, in one POST to /__script; members may stand together. */
export const scriptChange = z.strictObject({
  /** Forget everything scripted before, and the log. Applied first. */
  reset: z.literal(true).optional(),
  /** Makes it `deltaF` degrees warmer or, negative, colder in a circle for a time (start counts, end does not). */
  coldSnap: z.strictObject({ ...where, ...when, deltaF: z.number() }).optional(),
  /** Every day everywhere from `lowF` (06:00 solar time) to `highF` (15:00), no fronts, no alerts; null ends it. */
  steady: z.strictObject({ lowF: z.number(), highF: z.number() }).nullable().optional(),
  /** Hours without a value. */
  gap: z.strictObject({ ...where, ...when }).optional(),
  alert: z
    .strictObject({
      ...where,
      ...when,
      event: z.string(),
      severity: z.enum(['Extreme', 'Severe', 'Moderate', 'Minor', 'Unknown']).default('Severe'),
      headline: z.string().optional(),
      /** Announces no `ends`: `toIso` is then only when the message expires. */
      openEnded: z.boolean().default(false),
    })
    .optional(),
  /** How requests fail from now on; with `count` only so many, with `only` one kind of request. */
  outage: z.enum(outageKinds).optional(),
  count: z.number().int().positive().optional(),
  only: z.enum(['points', 'grid', 'hourly', 'alerts']).optional(),
  /** Renumbers the grid: addresses given out before are 404 from now on. */
  gridMoved: z.literal(true).optional(),
  /** Holds every answer back, so that requests pile up. */
  delayMs: z.number().int().min(0).max(10_000).optional(),
});
export type ScriptChange = z.input<typeof scriptChange>;
type Change = z.output<typeof scriptChange>;

export type Outage = (typeof outageKinds)[number];
export type RequestKind = 'points' | 'grid' | 'hourly' | 'alerts';
export type ScriptedAlert = NonNullable<Change['alert']>;
interface Area {
  readonly lat: number;
  readonly lon: number;
  readonly radiusMiles: number;
}

/** The script as it stands: what tests have asked for so far. */
export class ForecastScript {
  steady: { lowF: number; highF: number } | null = null;
  moves = 0;
  delayMs = 0;
  /** How far ahead in the year the weather's season is; outlives `reset`. */
  readonly seasonShiftMs: number;
  /** Hours that the forecast reaches beyond the usual; outlives `reset`. */
  readonly furtherHours: number;
  /** Rises with every change, so that the fake knows that an answer given before is not current any more. */
  revision = 0;
  private snaps: NonNullable<Change['coldSnap']>[] = [];
  private gaps: NonNullable<Change['gap']>[] = [];
  private alertList: ScriptedAlert[] = [];
  private outage: { kind: Outage; left: number; only: RequestKind | undefined } = {
    kind: 'none',
    left: 0,
    only: undefined,
  };

  constructor(seasonShiftDays = 0, furtherHours = 0) {
    this.seasonShiftMs = seasonShiftDays * 86_400_000;
    this.furtherHours = furtherHours;
  }

  /** Takes over a change; throws a ZodError for one it does not know. */
  apply(input: ScriptChange): void {
    const change = scriptChange.parse(input);
    if (change.reset) this.reset();
    if (change.coldSnap) this.snaps.push(change.coldSnap);
    if (change.gap) this.gaps.push(change.gap);
    if (change.alert) this.alertList.push(change.alert);
    if (change.steady !== undefined) this.steady = change.steady;
    if (change.gridMoved) this.moves += 1;
    if (change.delayMs !== undefined) this.delayMs = change.delayMs;
    if (change.outage)
      this.outage = { kind: change.outage, left: change.count ?? Infinity, only: change.only };
    this.revision += 1;
  }

  /** How this request fails; counts it against the outage. */
  takeOutage(kind: RequestKind): Outage {
    const { outage } = this;
    if (outage.left <= 0 || (outage.only && outage.only !== kind)) return 'none';
    outage.left -= 1;
    return outage.kind;
  }

  /** Degrees that scripted snaps add at a place and hour. */
  deltaF(place: { lat: number; lon: number }, atMs: number): number {
    return this.snaps
      .filter((snap) => covers(snap, place) && during(snap, atMs))
      .reduce((sum, snap) => sum + snap.deltaF, 0);
  }

  isGap(place: { lat: number; lon: number }, atMs: number): boolean {
    return this.gaps.some((gap) => covers(gap, place) && during(gap, atMs));
  }

  alertsAt(place: { lat: number; lon: number }): ScriptedAlert[] {
    return this.alertList.filter((alert) => covers(alert, place));
  }

  private reset(): void {
    Object.assign(this, { steady: null, moves: 0, delayMs: 0, snaps: [], gaps: [], alertList: [] });
    this.outage = { kind: 'none', left: 0, only: undefined };
  }
}

const covers = (area: Area, place: { lat: number; lon: number }) =>
  milesBetween(area, place) <= area.radiusMiles;
const during = (span: { fromIso: string; toIso: string }, atMs: number) =>
  atMs >= Date.parse(span.fromIso) && atMs < Date.parse(span.toIso);
