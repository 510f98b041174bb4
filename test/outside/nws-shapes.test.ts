import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { isAppError } from '@shared/errors';
import { localDayRange } from '@shared/forecast/local-day-range';
import { parseAlerts } from '@shared/forecast/parse-alerts';
import { parseGrid } from '@shared/forecast/parse-grid';
import { parseHourly } from '@shared/forecast/parse-hourly';
import { parsePoints } from '@shared/forecast/parse-points';

/**
 * Answers of the public weather service in the shape its API documents (OpenAPI 1.9 of api.weather.gov, schemas
 * GridpointGeoJson, GridpointHourlyForecast, AlertCollectionGeoJson, PointGeoJson). The small ones under
 * test/fixtures are our own with invented values; captured ones are read where they lie beside the project.
 */
const fixture = (name: string): unknown =>
  JSON.parse(readFileSync(join(__dirname, '../fixtures', name), 'utf8'));

describe('answers in the documented shape', () => {
  it('points lead to the grid', () => {
    expect(parsePoints(fixture('ok/nws-points.json'))).toEqual({
      gridUrl: 'https://api.weather.gov/gridpoints/PSR/161,57',
      hourlyUrl: 'https://api.weather.gov/gridpoints/PSR/161,57/forecast/hourly',
      zone: 'America/Phoenix',
    });
  });

  it('a grid with merged hours, all three forms of interval, a null and a hole is spread by the hour', () => {
    const series = parseGrid(fixture('ok/nws-grid-merged.json'));
    expect(series.startMs).toBe(Date.parse('2026-12-01T06:00:00Z'));
    expect(series.issuedAt).toBe('2026-12-01T11:42:10.000Z');
    // Read off the fixture by hand: 06 52; 07–09 51; 10–11 50; 12–13 49; 14 null; 15 55; 16 none; 17 63; 18–18 next day 66.
    expect(series.tempsF.slice(0, 12)).toEqual([52, 51, 51, 51, 50, 50, 49, 49, null, 55, null, 63]);
    expect(series.tempsF.slice(12)).toEqual(new Array(25).fill(66));
  });

  it('its local day begins at the midnight of the place, 07:00Z in Phoenix', () => {
    const series = parseGrid(fixture('ok/nws-grid-merged.json'));
    const forecast = { ...series, zone: 'America/Phoenix', fetchedAt: series.issuedAt, alerts: null };
    expect(localDayRange(forecast, '2026-12-01')).toEqual({
      lowF: 49,
      lowAtMs: Date.parse('2026-12-01T12:00:00Z'),
      highF: 66,
      highAtMs: Date.parse('2026-12-01T18:00:00Z'),
      hours: 24,
      missingHours: 2,
      longestGapHours: 1,
    });
    // 30 November has only its last hour.
    expect(localDayRange(forecast, '2026-11-30')).toMatchObject({ lowF: 52, highF: 52, missingHours: 23 });
  });

  it('older captures name the unit unit:degC and number the grid', () => {
    expect(parseGrid(fixture('ok/nws-grid-old-unit.json')).tempsF).toEqual([52, 51, 51, 51]);
  });

  it.each(['ok/nws-hourly-numbers.json', 'ok/nws-hourly-quantities.json'])(
    '%s gives the same hours',
    (name) => {
      const series = parseHourly(fixture(name));
      expect(series.startMs).toBe(Date.parse('2026-12-01T12:00:00Z'));
      expect(series.tempsF).toEqual([49, 51]);
    },
  );

  it('alerts run from onset or effective to end or expiry; tests and withdrawals are no alerts', () => {
    const rows = parseAlerts(fixture('ok/nws-alerts.json')).map(({ event, from, to }) => [event, from, to]);
    expect(rows).toEqual([
      ['Freeze Warning', '2026-12-02T07:00:00.000Z', '2026-12-02T16:00:00.000Z'],
      ['Extreme Cold Warning', '2026-12-01T12:00:00.000Z', '2026-12-02T16:00:00.000Z'],
      ['Flood Warning', '2026-12-01T11:00:00.000Z', '2026-12-01T20:00:00.000Z'],
    ]);
  });
});

describe('answers that cannot be read', () => {
  it.each([
    ['not-ok/nws-problem-500.json', parseGrid],
    ['not-ok/nws-problem-500.json', parsePoints],
    ['not-ok/nws-problem-500.json', parseAlerts],
    ['not-ok/nws-problem-500.json', parseHourly],
    ['not-ok/nws-grid-empty-layer.json', parseGrid],
    ['not-ok/nws-grid-text-value.json', parseGrid],
    ['not-ok/nws-grid-no-duration.json', parseGrid],
    ['not-ok/nws-points-without-grid.json', parsePoints],
    ['not-ok/nws-alert-without-expiry.json', parseAlerts],
  ] as const)('%s is refused in words', (name, parse) => {
    let thrown: unknown = null;
    try {
      parse(fixture(name));
    } catch (error) {
      thrown = error;
    }
    expect(isAppError(thrown, 'forecast-unavailable')).toBe(true);
    expect((thrown as Error).message).toMatch(/from the forecast service cannot be read/);
  });
});

const captured = join(__dirname, '../../../shared/data/nws');
/** The captures' times are templates, filled in here with this as now (so that their odd seconds make whole hours). */
const nowMs = Date.parse('2026-12-01T12:35:22Z');
const hourMs = 3_600_000;
const unitMs: Readonly<Record<string, number>> = {
  second: 1000,
  minute: 60_000,
  hour: hourMs,
  day: 24 * hourMs,
};

/** `date:now -4470 seconds / PT1H`, `date:now:hour +3 hours / PT2H`, `date:today 16:00:-5 +24 hours` as ISO text. */
function fillIn(template: string): string {
  const [moment = '', duration] = template.slice('date:'.length).split(' / ');
  const day = /^today (\d+:\d+):(-\d+)/.exec(moment);
  const offset = day ? `-${String(-Number(day[2])).padStart(2, '0')}:00` : '';
  const baseMs = day
    ? Date.parse(`2026-12-01T${day[1]}:00${offset}`)
    : moment.startsWith('now:hour')
      ? Math.floor(nowMs / hourMs) * hourMs
      : nowMs;
  const shift = /([+-]?\d+) (second|minute|hour|day)s?$/.exec(moment);
  const iso = new Date(
    baseMs + (shift ? Number(shift[1]) * (unitMs[shift[2] ?? ''] ?? Number.NaN) : 0),
  ).toISOString();
  return duration === undefined ? iso : `${iso}/${duration}`;
}

const readCaptured = (name: string): unknown =>
  JSON.parse(readFileSync(join(captured, name), 'utf8'), (_key, value: unknown) =>
    typeof value === 'string' && value.startsWith('date:') ? fillIn(value) : value,
  );

/* Where the captures are not there, the small fixtures above stand for them, and the title says so. */
if (existsSync(captured)) {
  describe('captured answers of the service (US Government work, beside the project)', () => {
    it('the points of Little Rock lead to its grid', () => {
      const address = parsePoints(readCaptured('points_LZK.cc0.json'));
      expect(address.gridUrl).toMatch(/\/gridpoints\/LZK\/83,73$/);
      expect(address.zone).toBe('America/Chicago');
    });

    it('the raw grid of Little Rock, 162 spans, gives 194 whole °F in a row', () => {
      const { startMs, tempsF, issuedAt } = parseGrid(readCaptured('gridpoint_raw_LZK_83_73.cc0.json'));
      expect(issuedAt).toBe('2024-02-20T17:36:55.000Z');
      expect(startMs).toBe(Date.parse('2026-12-01T12:00:00Z'));
      // The last span starts at hour 193 and lasts one.
      expect(tempsF).toHaveLength(194);
      for (const tempF of tempsF) expect(tempF).toBe(Math.round(tempF ?? Number.NaN));
      // 2.22, 1.67, 2.78 °C, … as they stand in the file; hours 48 to 51 are one span of 14.44 °C.
      expect(tempsF.slice(0, 3)).toEqual([36, 35, 37]);
      expect(tempsF.slice(47, 53)).toEqual([59, 58, 58, 58, 58, 61]);
      expect(tempsF.at(-1)).toBe(53);
    });

    it('the hourly forecast of Guam has 156 periods from 77 °F on', () => {
      const { startMs, tempsF } = parseHourly(readCaptured('hourly_GUM_47_48.cc0.json'));
      expect(startMs).toBe(Date.parse('2026-12-01T12:00:00Z'));
      expect(tempsF.slice(0, 2)).toEqual([77, 76]);
      expect(tempsF).toHaveLength(156);
    });

    it('all 38 alerts have a window that runs forwards', () => {
      const alerts = parseAlerts(readCaptured('alerts_active.cc0.json'));
      expect(alerts).toHaveLength(38);
      for (const alert of alerts) expect(Date.parse(alert.to)).toBeGreaterThan(Date.parse(alert.from));
      // The first one ends in ten minutes though its message expires in an hour.
      expect(alerts[0]).toMatchObject({ event: 'Wind Advisory', to: '2026-12-01T12:45:22.000Z' });
    });

    it('a captured problem is refused', () => {
      expect(() => parseGrid(readCaptured('problem_500.cc0.json'))).toThrow(/cannot be read/);
    });
  });
} else {
  describe('captured answers of the service are not beside the project', () => {
    it('so the small fixtures stand for them', () => {
      expect(parseGrid(fixture('ok/nws-grid-merged.json')).tempsF).toHaveLength(37);
    });
  });
}
