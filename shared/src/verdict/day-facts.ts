import type { RangeF } from '../contract/days';
import { addDays } from '../calendar/add-days';
import { cutOffInstant } from '../calendar/cut-off-instant';
import { dateAt } from '../calendar/date-at';
import { daysBetween } from '../calendar/days-between';
import type { WorkPlace } from '../calendar/is-working-day';
import { isoWeekday } from '../calendar/iso-weekday';
import { localInstant } from '../calendar/local-instant';
import { slackDays } from '../calendar/slack-days';
import { startOfLocalDay } from '../calendar/start-of-local-day';
import { counterPlace, doorPlace } from '../calendar/work-place';
import { contentsLimits, type ContentsLimits } from './contents-limits';
import type { DayQuestion } from './day-question';
import { placeWeather, type PlaceWeather } from './place-weather';

/** Where the route spends which hours, and what is known of the weather there. */
export interface RoutePlace {
  readonly role: 'origin' | 'hub' | 'destination';
  /** The city, as sentences name it. */
  readonly name: string;
  readonly zone: string;
  readonly weather: PlaceWeather | null;
  /** The hours whose weather counts, UTC epoch ms; `toMs` does not count. */
  readonly fromMs: number;
  readonly toMs: number;
  /** The hours for which an alert counts: while the parcel may be there. */
  readonly alertFromMs: number;
  readonly alertToMs: number;
}

/** What the checks share about one day, worked out once. */
export interface DayFacts extends DayQuestion {
  readonly nowMs: number;
  readonly today: string;
  readonly leadDays: number;
  readonly arrivalDate: string;
  readonly arrivalAtMs: number;
  readonly originWork: WorkPlace;
  readonly destinationWork: WorkPlace;
  readonly destinationName: string;
  readonly destinationCity: string;
  readonly destinationZone: string;
  /** Null: the counter takes nothing on that weekday. */
  readonly cutOffMs: number | null;
  readonly slackDays: number;
  readonly limits: ContentsLimits;
  /** Origin, hub, destination. */
  readonly places: readonly RoutePlace[];
  /** From packing to collecting, by the clocks of the policy and the counter. */
  readonly hoursInBox: number;
  /** Lowest and highest of the route's places and days; null without any forecast. */
  readonly outdoor: RangeF | null;
}

const hour = 60;
/** The sort hub's night, whose weather and alerts count. Assumption; the hub is left well before 06:00 (design 5.2). */
const hubNight = { fromMinute: 20 * hour, toMinute: 6 * hour };

/** What of a day rests on the route alone, whatever is in the box. */
type RouteDay = Omit<DayFacts, keyof DayQuestion | 'limits'>;

// Many parcels share a route, and its clocks cost more than the looks at a parcel. `of` holds all that a day rests on.
const routeDays = new WeakMap<
  object,
  Map<string, { readonly of: readonly unknown[]; readonly day: RouteDay }>
>();
const mostDays = 100;

/** Works out what all checks of one ship day share. Throws RangeError when the calendar does not reach far enough. */
export function dayFacts(question: DayQuestion): DayFacts {
  const day = routeDayOf(question);
  // Field by field: spreading two objects took longer than running the box.
  return {
    now: question.now,
    shipDate: question.shipDate,
    service: question.service,
    contents: question.contents,
    box: question.box,
    origin: question.origin,
    hub: question.hub,
    destination: question.destination,
    readyFrom: question.readyFrom,
    latestDate: question.latestDate,
    lastMealDate: question.lastMealDate,
    mornings: question.mornings,
    breederDaysAway: question.breederDaysAway,
    calendar: question.calendar,
    policy: question.policy,
    weather: question.weather,
    limits: contentsLimits(question.contents),
    nowMs: day.nowMs,
    today: day.today,
    leadDays: day.leadDays,
    arrivalDate: day.arrivalDate,
    arrivalAtMs: day.arrivalAtMs,
    originWork: day.originWork,
    destinationWork: day.destinationWork,
    destinationName: day.destinationName,
    destinationCity: day.destinationCity,
    destinationZone: day.destinationZone,
    cutOffMs: day.cutOffMs,
    slackDays: day.slackDays,
    places: day.places,
    hoursInBox: day.hoursInBox,
    outdoor: day.outdoor,
  };
}

function routeDayOf(question: DayQuestion): RouteDay {
  const { now, origin, hub, destination, policy, weather, calendar, shipDate } = question;
  const end = destination.kind === 'hold' ? destination.counter : destination.door;
  const of = [now, origin, hub, policy, calendar, weather.origin, weather.hub, weather.destination];
  const known = routeDays.get(end) ?? new Map<string, { of: readonly unknown[]; day: RouteDay }>();
  routeDays.set(end, known);
  const key = `${shipDate} ${destination.kind} ${origin.id} ${hub.id}`;
  const there = known.get(key);
  if (there?.of.every((one, index) => one === of[index])) return there.day;
  const day = makeRouteDay(question);
  if (known.size >= mostDays) known.clear();
  known.set(key, { of, day });
  return day;
}

function makeRouteDay(question: DayQuestion): RouteDay {
  const { origin, shipDate, policy, calendar } = question;
  const nowMs = Date.parse(question.now);
  const today = dateAt(nowMs, origin.zone);
  const arrivalDate = addDays(shipDate, 1);
  const to = destinationFacts(question);
  const arrivalAtMs = localInstant(arrivalDate, to.readyMinute, to.zone);
  const cutOffMs = cutOffInstant(origin, shipDate);
  // On a day without a cut-off the verdict is shut anyway; the afternoon stands in so that the weather can still be shown.
  const handOverMs = cutOffMs ?? localInstant(shipDate, 17 * hour, origin.zone);
  const { journey, packedBeforeCutOffMinutes } = policy;
  const packedMs = handOverMs - (packedBeforeCutOffMinutes + journey.packedBeforeCollectionMinutes) * 60_000;
  const collectedMs = localInstant(arrivalDate, to.openMinute, to.zone) + to.heldMinutes * 60_000;
  const places = routePlaces(question, { arrivalDate, packedMs, city: to.city, zone: to.zone });
  return {
    nowMs,
    today,
    leadDays: daysBetween(today, shipDate),
    arrivalDate,
    arrivalAtMs,
    originWork: counterPlace(origin),
    destinationWork: to.work,
    destinationName: to.name,
    destinationCity: to.city,
    destinationZone: to.zone,
    cutOffMs,
    slackDays: slackDays(to.work, arrivalDate, calendar),
    places,
    hoursInBox: (collectedMs - packedMs) / 3_600_000,
    outdoor: outdoorRange(places, shipDate, arrivalDate),
  };
}

function destinationFacts({ destination, origin, shipDate, policy: { journey } }: DayQuestion) {
  if (destination.kind === 'hold') {
    const { counter } = destination;
    const { openingHours, commitMinute } = counter;
    const weekday = String(isoWeekday(addDays(shipDate, 1))) as keyof typeof openingHours;
    return {
      work: counterPlace(counter),
      name: counter.name,
      city: counter.city,
      zone: counter.zone,
      readyMinute: commitMinute,
      openMinute: Math.max(commitMinute, openingHours[weekday]?.openMinute ?? 0),
      heldMinutes: journey.heldMinutes,
    };
  }
  const { door } = destination;
  const byMinute = journey.truckUntilMinute;
  return {
    work: doorPlace(origin.carrierId, door.state),
    name: door.name,
    city: door.city,
    zone: door.zone,
    readyMinute: byMinute,
    openMinute: byMinute,
    heldMinutes: 0,
  };
}

function routePlaces(
  { shipDate, origin, hub, weather, policy }: DayQuestion,
  known: { arrivalDate: string; packedMs: number; city: string; zone: string },
): RoutePlace[] {
  const bucket = (forecast: typeof weather.origin) => (forecast ? placeWeather(forecast) : null);
  const { arrivalDate, packedMs, city, zone } = known;
  // At either end both the ship day and the arrival day count, each as a whole local day (design 5.5).
  const days = (of: string) => ({
    fromMs: startOfLocalDay(shipDate, of),
    toMs: startOfLocalDay(addDays(arrivalDate, 1), of),
  });
  const night = {
    fromMs: localInstant(shipDate, hubNight.fromMinute, hub.zone),
    toMs: localInstant(arrivalDate, hubNight.toMinute, hub.zone),
  };
  const leavesMs = localInstant(shipDate, policy.journey.dropOffUntilMinute, origin.zone);
  const arrivalDay = { alertFromMs: startOfLocalDay(arrivalDate, zone), alertToMs: days(zone).toMs };
  return [
    {
      role: 'origin',
      name: origin.city,
      zone: origin.zone,
      weather: bucket(weather.origin),
      ...days(origin.zone),
      alertFromMs: packedMs,
      alertToMs: leavesMs,
    },
    {
      role: 'hub',
      name: hub.city,
      zone: hub.zone,
      weather: bucket(weather.hub),
      ...night,
      alertFromMs: night.fromMs,
      alertToMs: night.toMs,
    },
    {
      role: 'destination',
      name: city,
      zone,
      weather: bucket(weather.destination),
      ...days(zone),
      ...arrivalDay,
    },
  ];
}

function outdoorRange(places: readonly RoutePlace[], shipDate: string, arrivalDate: string): RangeF | null {
  const ranges = places.flatMap((place) => {
    if (!place.weather) return [];
    const found =
      place.role === 'hub'
        ? [place.weather.window(place.fromMs, place.toMs)]
        : [place.weather.day(shipDate), place.weather.day(arrivalDate)];
    return found.filter((range) => range !== null);
  });
  if (ranges.length === 0) return null;
  return {
    lowF: Math.min(...ranges.map((range) => range.lowF)),
    highF: Math.max(...ranges.map((range) => range.highF)),
  };
}
