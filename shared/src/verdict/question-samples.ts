import type { Box, Counter, Hub } from '../contract/places';
import { addDays } from '../calendar/add-days';
import { blackoutCalendar, type BlackoutRule } from '../calendar/blackout-calendar';
import type { OutdoorForecast } from '../forecast/outdoor-forecast';
import { defaultPolicy } from '../policy/policy';
import type { SpeciesLimits } from './contents-limits';
import { calendarReachDays, type DayQuestion } from './day-question';

const everyWeekday = (minute: number) => ({
  '1': minute,
  '2': minute,
  '3': minute,
  '4': minute,
  '5': minute,
});

/** A counter that works Monday to Friday with a cut-off at 17:00. */
export function sampleCounter(
  id: number,
  city: string,
  state: string,
  zone: string,
  changes: Partial<Counter> = {},
): Counter {
  const hours = { openMinute: 480, closeMinute: 1080 };
  return {
    id,
    carrierId: 1,
    name: `${city} counter`,
    street: '1 Ramp Road',
    city,
    state,
    postalCode: '78000',
    lat: 30,
    lon: -98,
    zone,
    canDropOff: true,
    canHold: true,
    workingDays: [1, 2, 3, 4, 5],
    cutOffMinutes: everyWeekday(1020),
    openingHours: { '1': hours, '2': hours, '3': hours, '4': hours, '5': hours },
    commitMinute: 540,
    active: true,
    version: 1,
    ...changes,
  };
}

export const texas = sampleCounter(1, 'San Antonio', 'TX', 'America/Chicago');
export const phoenix = sampleCounter(2, 'Phoenix', 'AZ', 'America/Phoenix');
export const denver = sampleCounter(3, 'Denver', 'CO', 'America/Denver');

const hub: Hub = {
  id: 1,
  name: 'Larkspur sort hub',
  city: 'Indianapolis',
  state: 'IN',
  lat: 39.7,
  lon: -86.3,
  zone: 'America/Indiana/Indianapolis',
};
const box: Box = {
  id: 1,
  name: 'Small box',
  lengthIn: 12,
  widthIn: 9,
  heightIn: 6,
  foamIn: 0.75,
  active: true,
  volumeL: 10.6,
  version: 1,
};

export const cornSnake: SpeciesLimits = {
  id: 1,
  commonName: 'corn snake',
  bandLowF: 60,
  bandHighF: 86,
  enduranceLowF: 48,
  enduranceHighF: 92,
  outdoorLowF: null,
  outdoorHighF: null,
};

/** A forecast of one temperature for 190 hours from six hours before `now`; `at` changes single hours. */
export function sampleForecast(
  zone: string,
  now: string,
  tempF: number,
  changes: Partial<OutdoorForecast> & {
    readonly at?: (isoHour: string, tempF: number) => number | null;
  } = {},
): OutdoorForecast {
  const { at, ...rest } = changes;
  const startMs = Math.floor(Date.parse(now) / 3_600_000) * 3_600_000 - 6 * 3_600_000;
  const hourOf = (index: number) => new Date(startMs + index * 3_600_000).toISOString();
  return {
    zone,
    startMs,
    tempsF: Array.from({ length: 196 }, (_, index) => (at ? at(hourOf(index), tempF) : tempF)),
    issuedAt: now,
    fetchedAt: now,
    alerts: [],
    ...rest,
  };
}

/** A corn snake from San Antonio to Phoenix in mild weather (72 °F everywhere), asked on Tuesday, December 1, 2026 at 06:00 in Texas. */
export function sampleQuestion(
  changes: Partial<DayQuestion> & { readonly blackouts?: readonly BlackoutRule[] } = {},
): DayQuestion {
  const { blackouts = [], ...rest } = changes;
  const now = changes.now ?? '2026-12-01T12:00:00.000Z';
  const shipDate = changes.shipDate ?? '2026-12-02';
  const destination = changes.destination ?? { kind: 'hold' as const, counter: phoenix };
  const zone = destination.kind === 'hold' ? destination.counter.zone : destination.door.zone;
  return {
    now,
    shipDate,
    service: destination.kind,
    contents: [{ species: cornSnake, quantity: 1, massG: 160 }],
    box,
    origin: texas,
    hub,
    destination,
    readyFrom: null,
    latestDate: null,
    lastMealDate: null,
    mornings: [],
    breederDaysAway: [],
    calendar: blackoutCalendar(blackouts, addDays(shipDate, -30), addDays(shipDate, calendarReachDays + 30)),
    policy: defaultPolicy,
    weather: {
      origin: sampleForecast(texas.zone, now, 72),
      hub: sampleForecast(hub.zone, now, 72),
      destination: sampleForecast(zone, now, 72),
    },
    ...rest,
  };
}
