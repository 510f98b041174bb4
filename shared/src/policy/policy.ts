import * as z from 'zod';

const rail = z.object({ lowF: z.number(), highF: z.number() });

/**
 * The circle's settings that the computation rests on. Each default says whether it is sourced or an assumption;
 * stored as versions in the database, so a verdict can name the one it was made under.
 */
export const policySchema = z.object({
  circleName: z.string(),
  circleZone: z.string(),
  /** Fewest working days after the arrival; 0 lets a slackless day be `tight`, 1 makes it `shut`. Assumption. */
  minSlackDays: z.number().int().min(0).max(2),
  /** Outdoor limits at either end. Common practice, no source (from memory). */
  guardRails: z.object({ hold: rail, door: rail }),
  /** Outdoor limits at the sort hub overnight, where the box is mostly indoors. Assumption. */
  hubRail: rail,
  /** Days a reptile is not fed before travelling. Common practice, no source. */
  fastDays: z.number().int().min(0).max(30),
  /** A forecast issued longer ago than this is never `open`. Assumption. */
  forecastMaxAgeHours: z.number().positive(),
  /**
   * One standard deviation of the forecast temperature error by lead day 0..7, in °F. Day 1 from NOAA/NSSL's
   * verification tables (RMSE 3.80 °F for 12-24 h highs), the others an assumption.
   */
  sigmaF: z.array(z.number().positive()).min(1),
  /** A heat pack is considered when a high along the route is under this. Common practice, no source. */
  heatPackBelowF: z.number(),
  /** A cold pack is considered when a high along the route is over this. From memory, no source. */
  coldPackAboveF: z.number(),
  /** Hours a heat pack must last beyond the planned time in the box. Assumption. */
  heatPackSpareHours: z.number(),
  /** Weather alerts that shut a day while in force anywhere on the route; compared without case. Assumption. */
  shutAlerts: z.array(z.string()),
  /** Minutes from collecting to the hand-over; a parcel is packed 60 min before it is collected. Assumption. */
  packedBeforeCutOffMinutes: z.number().int(),
  /** Shipping later than this many days out is not offered at all. Assumption. */
  horizonDays: z.number().int(),
  pooling: z.object({
    /** Fixed cost of a run (the coordinator's time at the counter), in cents. Assumption. */
    runFixedCents: z.number().int(),
    /** Value of a coordinator's driving minute on top of the mileage, in cents. Assumption. */
    driverMinuteCents: z.number().int(),
    /** What an unplaced parcel counts as, in cents; large, so that placing always wins. Assumption. */
    unplacedCents: z.number().int(),
    /** What each day later than a parcel's first day counts as, in cents. Assumption. */
    dayLaterCents: z.number().int(),
    /** What riding on a `tight` day counts as, in cents. Assumption. */
    tightCents: z.number().int(),
    /** Road over straight line (Ballou et al. 2002: 1.20; Boscoe et al. 2012: 1.417; from memory). */
    circuity: z.number().min(1),
    /** Minutes handed over must be done before the cut-off. Assumption. */
    cutOffSlackMinutes: z.number().int(),
    /** IRS business mileage rate 2026, 72.5 cents a mile: what driving alone is valued at. */
    aloneCentsPerMile: z.number(),
  }),
});
export type Policy = z.infer<typeof policySchema>;

/** The policy a new circle starts with. */
export const defaultPolicy: Policy = {
  circleName: 'Hill Country circle',
  circleZone: 'America/Chicago',
  minSlackDays: 0,
  guardRails: { hold: { lowF: 38, highF: 90 }, door: { lowF: 40, highF: 85 } },
  hubRail: { lowF: 10, highF: 95 },
  fastDays: 3,
  forecastMaxAgeHours: 12,
  sigmaF: [3.0, 3.8, 4.2, 4.7, 5.3, 6.0, 6.8, 7.6],
  heatPackBelowF: 70,
  coldPackAboveF: 80,
  heatPackSpareHours: 24,
  shutAlerts: [
    'Blizzard Warning',
    'Ice Storm Warning',
    'Winter Storm Warning',
    'Extreme Cold Warning',
    'Wind Chill Warning',
    'Extreme Heat Warning',
    'Excessive Heat Warning',
    'Hurricane Warning',
    'Tropical Storm Warning',
    'Tornado Warning',
    'Flash Flood Warning',
    'Severe Thunderstorm Warning',
    'Freeze Warning',
    'Hard Freeze Warning',
    'High Wind Warning',
  ],
  packedBeforeCutOffMinutes: 240,
  horizonDays: 60,
  pooling: {
    runFixedCents: 1200,
    driverMinuteCents: 25,
    unplacedCents: 50000,
    dayLaterCents: 40,
    tightCents: 300,
    circuity: 1.3,
    cutOffSlackMinutes: 30,
    aloneCentsPerMile: 72.5,
  },
};
