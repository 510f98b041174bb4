import { DateTime } from 'luxon';
import { monthly } from './climate';
import type { ForecastScript } from './forecast-script';
import { stamp } from './grid-answer';
import { hashText } from './smooth-noise';
import type { Position } from './us-grid';
import { weatherAt, type PointWeather } from './weather';
import { issueTime } from './issue';

const hourMs = 3_600_000;
/** Warnings go out up to two days ahead. */
const aheadHours = 48;
/** They are given for a whole county, here for a half degree. */
const countyDegrees = 0.5;

export interface SevereEvent {
  readonly event: string;
  readonly severity: string;
  readonly fromMs: number;
  readonly toMs: number;
  /** False: no end is announced. */
  readonly endKnown: boolean;
  readonly headline: string;
  readonly seat: Position;
}

interface Rule {
  readonly event: string;
  readonly severity: string;
  /** Shortest spell worth an alert; breaks up to six hours are bridged. */
  readonly leastHours: number;
  readonly holds: (weather: PointWeather, tempF: number, atMs: number) => boolean;
}

/** From memory and simplified: real criteria differ from office to office. Each is rare in its season. */
const rules: readonly Rule[] = [
  {
    event: 'Extreme Cold Warning',
    severity: 'Extreme',
    leastHours: 4,
    holds: ({ climate }, tempF) =>
      tempF <= clamp((climate.lowsF[0] ?? 0) - 1.9 * climate.winterSwingF, -35, 18),
  },
  {
    event: 'Freeze Warning',
    severity: 'Moderate',
    leastHours: 2,
    holds: ({ climate }, tempF, atMs) => tempF <= 31 && monthly(climate.lowsF, atMs) >= 36,
  },
  {
    event: 'Winter Storm Warning',
    severity: 'Severe',
    leastHours: 6,
    holds: (weather, tempF, atMs) => tempF > 5 && tempF <= 32 && weather.wetnessAt(atMs) > 0.86,
  },
  {
    event: 'Extreme Heat Warning',
    severity: 'Severe',
    leastHours: 3,
    holds: ({ climate }, tempF) =>
      tempF >= Math.max(100, Math.max(...climate.highsF) + 1.5 * climate.summerSwingF),
  },
  {
    event: 'Wind Advisory',
    severity: 'Moderate',
    leastHours: 5,
    holds: (weather, _tempF, atMs) =>
      Math.abs(weather.frontAt(atMs + 3 * hourMs) - weather.frontAt(atMs - 3 * hourMs)) > 1.1,
  },
];

const clamp = (value: number, least: number, most: number) => Math.max(least, Math.min(most, value));

/** What is in force or announced at a place now: from the forecast's weather, and from the script. */
export function eventsAt(
  script: ForecastScript,
  seed: number,
  place: Position,
  nowMs: number,
): SevereEvent[] {
  const seat = { lat: middle(place.lat), lon: middle(place.lon) };
  const derived = script.steady ? [] : derivedEvents(script, seed, seat, nowMs);
  const scripted = script.alertsAt(place).map((alert) => ({
    event: alert.event,
    severity: alert.severity,
    fromMs: Date.parse(alert.fromIso),
    toMs: Date.parse(alert.toIso),
    endKnown: !alert.openEnded,
    headline: alert.headline ?? `${alert.event} in force`,
    seat: { lat: alert.lat, lon: alert.lon },
  }));
  return [...derived, ...scripted].filter((event) => event.toMs > nowMs);
}

const middle = (degrees: number) => (Math.floor(degrees / countyDegrees) + 0.5) * countyDegrees;

function derivedEvents(script: ForecastScript, seed: number, seat: Position, nowMs: number): SevereEvent[] {
  const weather = weatherAt(seed, seat.lat, seat.lon, script.seasonShiftMs);
  const { issuedMs } = issueTime(nowMs);
  const hours = Array.from({ length: 24 + aheadHours }, (_, index) => {
    const atMs = issuedMs + (index - 24) * hourMs;
    return { atMs, tempF: weather.forecastF(atMs, issuedMs) + script.deltaF(seat, atMs) };
  });
  return rules.flatMap((rule) => {
    const held = hours.filter(({ atMs, tempF }) => rule.holds(weather, tempF, atMs)).map(({ atMs }) => atMs);
    return spells(held)
      .filter(({ fromMs, toMs }) => toMs - fromMs >= rule.leastHours * hourMs)
      .map((span) => {
        const { event, severity } = rule;
        return { ...span, event, severity, endKnown: true, headline: `${event} issued for the area`, seat };
      });
  });
}

/** Hours in a row as spans, over breaks of up to six hours. */
function spells(hours: readonly number[]): { fromMs: number; toMs: number }[] {
  const found: { fromMs: number; toMs: number }[] = [];
  for (const atMs of hours) {
    const last = found.at(-1);
    if (last && atMs - last.toMs <= 6 * hourMs) last.toMs = atMs + hourMs;
    else found.push({ fromMs: atMs, toMs: atMs + hourMs });
  }
  return found;
}

/** `/alerts/active?point=…` in the documented shape: geometry null, times with the place's offset. */
export function alertsAnswer(
  base: string,
  events: readonly SevereEvent[],
  zone: string,
  nowMs: number,
): object {
  const local = (ms: number) => DateTime.fromMillis(ms, { zone }).toISO({ suppressMilliseconds: true });
  const { issuedMs } = issueTime(nowMs);
  const features = events.map((event) => {
    const day = DateTime.fromMillis(event.fromMs, { zone }).toISODate();
    const id = `urn:oid:2.49.0.1.840.0.${hashText(`${event.event} ${day} ${event.seat.lat},${event.seat.lon}`)}.001.1`;
    // The message is renewed every eight hours, often before the event itself is over.
    const expires = event.endKnown ? Math.min(event.toMs, issuedMs + 8 * hourMs) : event.toMs;
    return {
      id: `${base}/alerts/${id}`,
      type: 'Feature',
      geometry: null,
      properties: {
        '@type': 'wx:Alert',
        id,
        areaDesc: 'The area round the point',
        sent: local(issuedMs),
        effective: local(issuedMs),
        onset: local(event.fromMs),
        expires: local(expires),
        ends: event.endKnown ? local(event.toMs) : null,
        status: 'Actual',
        messageType: 'Alert',
        category: 'Met',
        severity: event.severity,
        certainty: 'Likely',
        urgency: 'Expected',
        event: event.event,
        headline: event.headline,
      },
    };
  });
  return {
    type: 'FeatureCollection',
    features,
    title: 'Current watches, warnings, and advisories',
    updated: stamp(issuedMs),
  };
}
