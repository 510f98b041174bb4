import { addDays } from '../calendar/add-days';
import { cutOffInstant } from '../calendar/cut-off-instant';
import { localInstant } from '../calendar/local-instant';
import { isoWeekday } from '../calendar/iso-weekday';
import type { Policy } from '../policy/policy';
import type { DayQuestion } from '../verdict/day-question';

export type PlaceRole = 'origin' | 'hub' | 'destination';
export type LegKind =
  | 'packed'
  | 'vehicle'
  | 'drop-off'
  | 'linehaul-out'
  | 'hub'
  | 'linehaul-in'
  | 'station'
  | 'held'
  | 'truck'
  | 'late';

/** A stretch of a journey: round the box is exposure · outdoor + (1 − exposure) · indoor. Instants are UTC epoch ms. */
export interface Leg {
  readonly kind: LegKind;
  /** Whose outdoor forecast applies. */
  readonly role: PlaceRole;
  readonly startMs: number;
  readonly endMs: number;
  readonly exposure: number;
  readonly indoorF: number;
  /** Heat that a cabin adds while it is warmer outdoors than `cabinAboveF`; 0 nearly everywhere. */
  readonly cabinF: number;
  readonly cabinAboveF: number;
}

type Surroundings = Policy['journey']['packed'];
/** On a day without a cut-off the afternoon stands in, so that the weather of a shut day can still be shown. */
const usualCutOffMinute = 17 * 60;

/**
 * The legs of a parcel shipped on a day, each on the clock of its place, in order and without a gap (design 5.2). A leg whose
 * hour is over before it begins takes no time: a cut-off after the counter's usual departure, a counter that is ready before
 * the usual arrival at the station, a drop-off so far west that the sort hub's midnight has passed.
 */
export function journeyLegs(question: DayQuestion): Leg[] {
  const { shipDate, origin, hub, policy } = question;
  const { journey } = policy;
  const arrivalDate = addDays(shipDate, 1);
  const cutOffMs = cutOffInstant(origin, shipDate) ?? localInstant(shipDate, usualCutOffMinute, origin.zone);
  const handOverMs = cutOffMs - journey.handOverBeforeCutOffMinutes * 60_000;
  const collectedMs = cutOffMs - policy.packedBeforeCutOffMinutes * 60_000;
  const to = endOf(question, arrivalDate);
  const at = (minute: number, zone: string, date = arrivalDate) => localInstant(date, minute, zone);
  const stretches: [LegKind, PlaceRole, number, Surroundings][] = [
    ['packed', 'origin', collectedMs, journey.packed],
    ['vehicle', 'origin', handOverMs, journey.vehicle],
    ['drop-off', 'origin', at(journey.dropOffUntilMinute, origin.zone, shipDate), journey.dropOff],
    ['linehaul-out', 'hub', at(0, hub.zone), journey.linehaulOut],
    ['hub', 'hub', at(journey.hubUntilMinute, hub.zone), journey.hub],
    ['linehaul-in', 'destination', at(journey.linehaulInUntilMinute, to.zone), journey.linehaulIn],
    ...to.last,
  ];
  const startMs = collectedMs - journey.packedBeforeCollectionMinutes * 60_000;
  let reachedMs = startMs;
  return stretches.map(([kind, role, plannedMs, around]) => {
    const legStartMs = reachedMs;
    reachedMs = Math.max(reachedMs, plannedMs);
    const cabin = kind === 'truck' ? journey.truck : { cabinF: 0, cabinAboveF: 0 };
    const { cabinF, cabinAboveF } = cabin;
    return { kind, role, startMs: legStartMs, endMs: reachedMs, ...around, cabinF, cabinAboveF };
  });
}

/** The zone of the end, and the legs there. */
function endOf({ destination, policy }: DayQuestion, arrivalDate: string) {
  const { journey } = policy;
  if (destination.kind === 'door') {
    const { zone } = destination.door;
    const untilMs = localInstant(arrivalDate, journey.truckUntilMinute, zone);
    const { exposure, indoorF } = journey.truck;
    return {
      zone,
      last: [['truck', 'destination', untilMs, { exposure, indoorF }]] as [
        LegKind,
        PlaceRole,
        number,
        Surroundings,
      ][],
    };
  }
  const { zone, commitMinute, openingHours } = destination.counter;
  const opens =
    openingHours[String(isoWeekday(arrivalDate)) as keyof typeof openingHours]?.openMinute ?? commitMinute;
  const readyMs = localInstant(arrivalDate, commitMinute, zone);
  const collectedMs =
    localInstant(arrivalDate, Math.max(commitMinute, opens), zone) + journey.heldMinutes * 60_000;
  const last: [LegKind, PlaceRole, number, Surroundings][] = [
    ['station', 'destination', readyMs, journey.station],
    ['held', 'destination', collectedMs, journey.held],
  ];
  return { zone, last };
}

/** The journey a day late: so many hours more at the sort hub or at the destination's station, everything after it later. */
export function lateLegs(
  legs: readonly Leg[],
  where: 'hub' | 'destination',
  late: Policy['journey']['late'],
): Leg[] {
  const addedMs = late.hours * 3_600_000;
  const index = where === 'hub' ? legs.findIndex(({ kind }) => kind === 'hub') : lastAtStation(legs);
  const rests = legs[index];
  if (!rests) return [...legs];
  const around = where === 'hub' ? late.hub : late.station;
  const extra: Leg = {
    ...rests,
    kind: 'late',
    startMs: rests.endMs,
    endMs: rests.endMs + addedMs,
    ...around,
    cabinF: 0,
    cabinAboveF: 0,
  };
  const later = legs
    .slice(index + 1)
    .map((leg) => ({ ...leg, startMs: leg.startMs + addedMs, endMs: leg.endMs + addedMs }));
  return [...legs.slice(0, index + 1), extra, ...later];
}

/** A late parcel rests at the station before it is held or put on the truck. */
function lastAtStation(legs: readonly Leg[]): number {
  const station = legs.findIndex(({ kind }) => kind === 'station');
  return station >= 0 ? station : legs.findIndex(({ kind }) => kind === 'linehaul-in');
}
