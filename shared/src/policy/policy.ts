import * as z from 'zod';

const rail = z.object({ lowF: z.number(), highF: z.number() });
/** How much of the outdoor air a box feels on a leg (0 none, 1 all), and the air of the room or vehicle otherwise. */
const surroundings = z.object({ exposure: z.number().min(0).max(1), indoorF: z.number() });

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
  /** The legs of a journey; clocks are those of the leg's place, minutes after midnight. All assumptions without source. */
  journey: z.object({
    /** A parcel is packed so long before it is collected, in a room. */
    packedBeforeCollectionMinutes: z.number().int().min(0),
    packed: surroundings,
    vehicle: surroundings,
    /** The run hands over so long before the cut-off. */
    handOverBeforeCutOffMinutes: z.number().int().min(0),
    /** At the drop-off counter until this minute. */
    dropOffUntilMinute: z.number().int(),
    dropOff: surroundings,
    /** On the way to the sort hub until the hub's midnight (outdoors as at the hub). */
    linehaulOut: surroundings,
    /** At the sort hub until this minute of the night. */
    hubUntilMinute: z.number().int(),
    hub: surroundings,
    /** On the way to the destination until this minute (outdoors as at the destination). */
    linehaulInUntilMinute: z.number().int(),
    linehaulIn: surroundings,
    /** At the destination's station until the commit time. */
    station: surroundings,
    /** Held at the counter until collected, so many minutes after it is ready and open. */
    held: surroundings,
    heldMinutes: z.number().int().min(0),
    /** Door service: in the truck until this minute; its cabin adds heat while it is warm outdoors. */
    truckUntilMinute: z.number().int(),
    truck: surroundings.extend({ cabinF: z.number(), cabinAboveF: z.number() }),
    /** The late case: so many hours more at the worse of the hub and the destination's station. */
    late: z.object({
      hours: z.number().positive(),
      hub: surroundings,
      station: surroundings,
    }),
  }),
  /** The box as one lump. */
  boxModel: z.object({
    /** Foam, W/m·K: ASTM C578 type I, R 3.85 an inch at 75 °F. */
    foamWPerMK: z.number().positive(),
    /** Corrugated board: thickness an assumption; conductivity within 0.05–0.12 W/m·K (ISO 8302, J. Renew. Mater. 2017). */
    boardMm: z.number().min(0),
    boardWPerMK: z.number().positive(),
    /** Still-air film on each side, m²K/W: ASHRAE, 0.68 h·ft²·°F/Btu for a vertical surface. */
    filmM2KPerW: z.number().min(0),
    /** What the air holes let through, W/K. Assumption. */
    holesWPerK: z.number().min(0),
    /** Heat capacity of the empty box, J/K. Assumption. */
    emptyJPerK: z.number().positive(),
    /** Of the contents, J/kg·K: about that of lizard tissue (Bartholomew & Lasiewski, from memory). */
    contentsJPerKgK: z.number().positive(),
    /** Air in the box when it is closed, °F. Assumption. */
    startF: z.number(),
  }),
  /** Heat packs: 3.2 W for 40 h is the heat of about 62 g of iron; 40 h are common practice, no source. */
  heatPack: z.object({
    powerW: z.number().positive(),
    riseHours: z.number().positive(),
    /** After its rated hours the power falls to nothing over this part of them. Assumption. */
    tailShare: z.number().min(0).max(1),
  }),
  /** Cold pack, melting at 0 °C. Assumption. */
  coldPack: z.object({
    wPerK: z.number().positive(),
    massKg: z.number().positive(),
    latentKJPerKg: z.number().positive(),
  }),
  /** From which chance on a day is open or tight, at the planned arrival and a day late. Assumption. */
  chance: z.object({
    open: z.number().min(0).max(1),
    tight: z.number().min(0).max(1),
    lateOpen: z.number().min(0).max(1),
    lateTight: z.number().min(0).max(1),
  }),
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
  journey: {
    packedBeforeCollectionMinutes: 60,
    packed: { exposure: 0, indoorF: 72 },
    vehicle: { exposure: 0.2, indoorF: 70 },
    handOverBeforeCutOffMinutes: 30,
    dropOffUntilMinute: 20 * 60,
    dropOff: { exposure: 0.1, indoorF: 68 },
    linehaulOut: { exposure: 0.3, indoorF: 60 },
    hubUntilMinute: 210,
    hub: { exposure: 0.5, indoorF: 65 },
    linehaulInUntilMinute: 390,
    linehaulIn: { exposure: 0.3, indoorF: 60 },
    station: { exposure: 0.3, indoorF: 65 },
    held: { exposure: 0.05, indoorF: 70 },
    heldMinutes: 120,
    truckUntilMinute: 720,
    truck: { exposure: 1, indoorF: 70, cabinF: 10, cabinAboveF: 60 },
    late: { hours: 24, hub: { exposure: 0.5, indoorF: 65 }, station: { exposure: 0.6, indoorF: 65 } },
  },
  boxModel: {
    foamWPerMK: 0.0375,
    boardMm: 4,
    boardWPerMK: 0.064,
    filmM2KPerW: 0.12,
    holesWPerK: 0.05,
    emptyJPerK: 500,
    contentsJPerKgK: 3400,
    startF: 75,
  },
  heatPack: { powerW: 3.2, riseHours: 1, tailShare: 0.1 },
  coldPack: { wPerK: 0.08, massKg: 0.225, latentKJPerKg: 334 },
  chance: { open: 0.95, tight: 0.8, lateOpen: 0.8, lateTight: 0.5 },
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
