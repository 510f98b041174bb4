import type { ForecastScript, RequestKind } from './forecast-script';
import { gridAnswer, hourlyAnswer } from './grid-answer';
import { issueFor } from './issue';
import { problem } from './problem-answer';
import { alertsAnswer, eventsAt } from './severe-weather';
import { cellAt, positionOf, usZoneAt, type Position } from './us-grid';

export interface Answer {
  readonly status: number;
  readonly type: string;
  readonly body: string;
  readonly headers: Readonly<Record<string, string>>;
}

export interface Asked {
  readonly method: string;
  /** Scheme, host and port under which the asker reached us. */
  readonly base: string;
  readonly path: string;
  readonly query: URLSearchParams;
  readonly kind: RequestKind | null;
  readonly userAgent: string;
  readonly ifModifiedSince: string | null;
  readonly flags: string;
}

export interface FakeState {
  readonly script: ForecastScript;
  readonly seed: number;
  readonly now: () => number;
}

/** Parameters that the service knows by path; any other is refused. */
const knownParameters: Readonly<Record<RequestKind, readonly string[]>> = {
  points: [],
  grid: [],
  hourly: ['units'],
  alerts: ['point', 'status', 'message_type', 'limit'],
};

/** The answer of the service when it is well. */
export function answerFor(state: FakeState, asked: Asked): Answer {
  if (asked.userAgent === '')
    return { status: 403, type: 'text/html', body: '<h1>Access Denied</h1>', headers: {} };
  if (asked.method !== 'GET' || !asked.kind)
    return problem(404, 'NotFound', `${asked.path} is not a valid resource.`);
  const known = knownParameters[asked.kind];
  const strange = [...asked.query.keys()].filter((name) => !known.includes(name));
  if (strange.length > 0)
    return problem(400, 'BadRequest', 'Bad Request', {
      parameterErrors: strange.map((name) => ({
        parameter: `query.${name}`,
        message: `Query parameter "${name}" is not recognized`,
      })),
    });
  if (asked.kind === 'points') return points(state, asked);
  if (asked.kind === 'alerts') return alerts(state, asked);
  return grid(state, asked);
}

function points(state: FakeState, { path, base }: Asked): Answer {
  const text = path.slice('/points/'.length);
  const place = readPoint(text);
  if (!place) return problem(400, 'InvalidParameter', 'The point is not latitude,longitude.');
  const tidy = tidyPoint(place);
  if (tidy !== text) return moved(`/points/${tidy}`);
  const zone = usZoneAt(place);
  if (!zone) return problem(404, 'InvalidPoint', `Unable to provide data for requested point ${text}`);
  const cell = cellAt(place, state.script.moves);
  const gridUrl = `${base}/gridpoints/${cell.office}/${cell.x},${cell.y}`;
  return json({
    id: `${base}/points/${tidy}`,
    type: 'Feature',
    geometry: { type: 'Point', coordinates: [place.lon, place.lat] },
    properties: {
      '@id': `${base}/points/${tidy}`,
      '@type': 'wx:Point',
      cwa: cell.office,
      gridId: cell.office,
      gridX: cell.x,
      gridY: cell.y,
      forecast: `${gridUrl}/forecast`,
      forecastHourly: `${gridUrl}/forecast/hourly`,
      forecastGridData: gridUrl,
      timeZone: zone,
    },
  });
}

function grid(state: FakeState, asked: Asked): Answer {
  const [, office = '', x = '', y = ''] =
    /^\/gridpoints\/([A-Z]{3})\/(\d+),(\d+)(?:\/forecast\/hourly)?$/.exec(asked.path) ?? [];
  const cell = { office, x: Number(x), y: Number(y) };
  const place = office ? positionOf(cell, state.script.moves) : null;
  const zone = place && usZoneAt(place);
  if (!place || !zone) return problem(404, 'NotFound', 'The requested grid cell was not found.');
  const issue = issueFor(state.script, state.seed, place, state.now());
  // A change of the script is a new edition of the same issue.
  const editionMs = issue.issuedMs + Math.min(3599, state.script.revision) * 1000;
  const headers = {
    'Last-Modified': new Date(editionMs).toUTCString(),
    'Cache-Control': 'public, max-age=3600',
  };
  const since = asked.ifModifiedSince === null ? Number.NaN : Date.parse(asked.ifModifiedSince);
  if (since >= editionMs) return { status: 304, type: 'application/geo+json', body: '', headers };
  const body =
    asked.kind === 'hourly'
      ? hourlyAnswer(issue, zone, asked.flags.includes('forecast_temperature_qv'))
      : gridAnswer(asked.base, cell, place, zone, issue);
  return json(body, headers);
}

function alerts(state: FakeState, { path, query, base }: Asked): Answer {
  if (path !== '/alerts/active') return problem(404, 'NotFound', `${path} is not a valid resource.`);
  const text = query.get('point') ?? '';
  const place = readPoint(text);
  if (!place) return problem(400, 'BadRequest', 'The point is not latitude,longitude.');
  const tidy = tidyPoint(place);
  if (tidy !== text) return moved(`/alerts/active?point=${tidy}`);
  const nowMs = state.now();
  const zone = usZoneAt(place) ?? 'Etc/UTC';
  return json(alertsAnswer(base, eventsAt(state.script, state.seed, place, nowMs), zone, nowMs));
}

const json = (body: object, headers: Record<string, string> = {}): Answer => ({
  status: 200,
  type: 'application/geo+json',
  body: JSON.stringify(body),
  headers,
});

/** A relative address and a problem document, as the service answers. */
const moved = (location: string): Answer => {
  const answer = problem(
    301,
    'AdjustPointPrecision',
    'The precision of latitude/longitude points is limited to 4 decimal digits.',
  );
  return { ...answer, headers: { Location: location } };
};

function readPoint(text: string): Position | null {
  const match = /^(-?\d{1,2}(?:\.\d+)?),(-?\d{1,3}(?:\.\d+)?)$/.exec(text);
  return match ? { lat: Number(match[1]), lon: Number(match[2]) } : null;
}

/** At most four decimals, and none that say nothing. */
const tidyPoint = ({ lat, lon }: Position) =>
  [lat, lon].map((value) => String(Number(value.toFixed(4)))).join(',');
