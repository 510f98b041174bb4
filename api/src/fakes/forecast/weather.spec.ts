import fc from 'fast-check';
import { climateNormals } from './climate-normals';
import { usZoneAt } from './us-grid';
import { weatherAt } from './weather';

const hourMs = 3_600_000;
const dayMs = 24 * hourMs;
const cityAt = (code: string) => {
  const city = climateNormals.find((normal) => normal.code === code);
  if (!city) throw new Error(`no ${code}`);
  return city;
};
/** Mean daily low and high of a month over six years, on solar days. */
function monthOf(code: string, month: number) {
  const city = cityAt(code);
  const { trueF } = weatherAt(1, city.lat, city.lon);
  const days = Array.from({ length: 6 * 28 }, (_, index) => {
    const midnight =
      Date.UTC(2024 + Math.floor(index / 28), month - 1, 1 + (index % 28)) - (city.lon / 15) * hourMs;
    const temps = Array.from({ length: 24 }, (_hour, hour) => trueF(midnight + hour * hourMs));
    return { low: Math.min(...temps), high: Math.max(...temps) };
  });
  const mean = (pick: (day: { low: number; high: number }) => number) =>
    days.reduce((sum, day) => sum + pick(day), 0) / days.length;
  return { days, low: mean((day) => day.low), high: mean((day) => day.high) };
}

describe('invented weather', () => {
  // Climate in round numbers, from memory: it has to look right, not to be right.
  it.each([
    ['SAT', 1, 36, 46, 58, 70],
    ['SAT', 7, 71, 79, 90, 99],
    ['MSP', 1, 2, 16, 19, 33],
    ['MIA', 1, 57, 66, 72, 81],
    ['PHX', 7, 79, 89, 100, 110],
    ['HNL', 1, 64, 70, 77, 83],
    ['FAI', 1, -25, -10, -6, 10],
    ['SJU', 7, 75, 81, 86, 92],
  ])(
    'in %s in month %i has lows of %i to %i and highs of %i to %i on average',
    (code, month, low0, low1, high0, high1) => {
      const { low, high } = monthOf(code, month);
      expect(low).toBeGreaterThan(low0);
      expect(low).toBeLessThan(low1);
      expect(high).toBeGreaterThan(high0);
      expect(high).toBeLessThan(high1);
    },
  );

  it('is colder in Minneapolis than in Miami every single day of January', () => {
    const [north, south] = [monthOf('MSP', 1).days, monthOf('MIA', 1).days];
    expect(north.every((day, index) => day.high < (south[index]?.high ?? 0))).toBe(true);
  });

  it('passes 95 °F in Phoenix on most days of July', () => {
    const { days } = monthOf('PHX', 7);
    expect(days.filter((day) => day.high > 95).length).toBeGreaterThan(days.length * 0.9);
  });

  it('moves through fronts: within a San Antonio December the days differ by 15 °F and more', () => {
    const highs = monthOf('SAT', 12)
      .days.slice(0, 28)
      .map((day) => day.high);
    expect(Math.max(...highs) - Math.min(...highs)).toBeGreaterThan(15);
  });

  it('brings a front to Indianapolis before Philadelphia', () => {
    const [west, east] = [cityAt('IND'), cityAt('PHL')].map((city) => weatherAt(1, city.lat, city.lon));
    const hours = Array.from({ length: 24 * 60 }, (_, hour) => Date.UTC(2026, 11, 1) + hour * hourMs);
    const together = (lagHours: number) =>
      hours.reduce(
        (sum, at) => sum + (west?.frontAt(at) ?? 0) * (east?.frontAt(at + lagHours * hourMs) ?? 0),
        0,
      );
    expect(together(24)).toBeGreaterThan(together(-24));
    expect(together(24)).toBeGreaterThan(together(0));
  });

  it('stays between −45 and 125 °F anywhere at any hour, and never jumps', () => {
    const place = fc.constantFrom(...climateNormals);
    const at = fc.integer({ min: Date.UTC(2020, 0, 1) / hourMs, max: Date.UTC(2035, 0, 1) / hourMs });
    fc.assert(
      fc.property(place, at, fc.integer({ min: 0, max: 1000 }), ({ lat, lon }, hour, seed) => {
        const { forecastF } = weatherAt(seed, lat, lon);
        const temps = [0, 1, 2].map((step) => forecastF((hour + step) * hourMs, (hour - 30) * hourMs));
        expect(Math.min(...temps)).toBeGreaterThanOrEqual(-45);
        expect(Math.max(...temps)).toBeLessThanOrEqual(125);
        expect(Math.max(...temps) - Math.min(...temps)).toBeLessThan(20);
      }),
    );
  });

  it('is the same for the same seed and hour, in whatever order it is asked for', () => {
    const hours = Array.from({ length: 50 }, (_, index) => Date.UTC(2026, 11, 1) + index * 5 * hourMs);
    const read = (order: readonly number[]) => {
      const { forecastF } = weatherAt(3, 39.72, -86.29);
      return new Map(order.map((at) => [at, forecastF(at, Date.UTC(2026, 11, 1))]));
    };
    const forwards = read(hours);
    const backwards = read(hours.toReversed());
    expect(hours.map((at) => forwards.get(at))).toEqual(hours.map((at) => backwards.get(at)));
    expect(weatherAt(4, 39.72, -86.29).trueF(hours[0] ?? 0)).not.toBe(
      weatherAt(3, 39.72, -86.29).trueF(hours[0] ?? 0),
    );
  });

  it('is forecast better the nearer it is', () => {
    const errors = (leadDays: number) => {
      const list = climateNormals.flatMap(({ lat, lon }) => {
        const weather = weatherAt(1, lat, lon);
        return Array.from({ length: 40 }, (_, index) => {
          const at = Date.UTC(2026, 0, 1 + index * 9);
          return weather.forecastF(at, at - leadDays * dayMs) - weather.trueF(at);
        });
      });
      return Math.sqrt(list.reduce((sum, error) => sum + error ** 2, 0) / list.length);
    };
    const [now = 0, day = 0, three = 0, seven = 0] = [0, 1, 3, 7].map(errors);
    expect(now).toBe(0);
    expect(day).toBeGreaterThan(0.8);
    expect(three).toBeGreaterThan(day);
    expect(seven).toBeGreaterThan(three);
    expect(seven).toBeLessThan(8);
  });

  it('changes only a little from one issue to the next', () => {
    const { forecastF } = weatherAt(1, 29.53, -98.47);
    const at = Date.UTC(2026, 11, 6, 12);
    for (let issue = at - 6 * dayMs; issue < at; issue += hourMs)
      expect(Math.abs(forecastF(at, issue + hourMs) - forecastF(at, issue))).toBeLessThan(1.5);
  });
});

describe('the zone of a place', () => {
  // Zones as in the IANA time zone database for these cities; the position is the city's airport or centre.
  it.each([
    ['San Antonio', 29.53, -98.47, 'America/Chicago'], ['El Paso', 31.81, -106.38, 'America/Denver'],
    ['Phoenix', 33.43, -112.01, 'America/Phoenix'], ['Denver', 39.85, -104.67, 'America/Denver'],
    ['Los Angeles', 33.94, -118.4, 'America/Los_Angeles'], ['San Diego', 32.73, -117.18, 'America/Los_Angeles'],
    ['Las Vegas', 36.08, -115.15, 'America/Los_Angeles'], ['Boise', 43.57, -116.22, 'America/Boise'],
    ['Salt Lake City', 40.78, -111.97, 'America/Denver'], ['Seattle', 47.45, -122.31, 'America/Los_Angeles'],
    ['Minneapolis', 44.88, -93.23, 'America/Chicago'], ['Chicago', 41.96, -87.93, 'America/Chicago'],
    ['Indianapolis', 39.72, -86.29, 'America/Indiana/Indianapolis'], ['Detroit', 42.23, -83.33, 'America/Detroit'],
    ['Louisville', 38.17, -85.73, 'America/Kentucky/Louisville'], ['Nashville', 36.12, -86.69, 'America/Chicago'],
    ['Atlanta', 33.63, -84.44, 'America/New_York'], ['Miami', 25.79, -80.32, 'America/New_York'],
    ['Pensacola', 30.47, -87.19, 'America/Chicago'], ['Buffalo', 42.94, -78.73, 'America/New_York'],
    ['Boston', 42.36, -71.01, 'America/New_York'], ['Anchorage', 61.17, -150.02, 'America/Anchorage'],
    ['Juneau', 58.36, -134.58, 'America/Juneau'], ['Honolulu', 21.32, -157.93, 'Pacific/Honolulu'],
    ['San Juan', 18.43, -66.0, 'America/Puerto_Rico'], ['Hagåtña', 13.48, 144.8, 'Pacific/Guam'],
  ] as const)('%s is right', (_city, lat, lon, zone) => {
    expect(usZoneAt({ lat, lon })).toBe(zone);
  }); // prettier-ignore

  it.each([
    ['London', 51.5, -0.12],
    ['Monterrey', 25.67, -100.31],
    ['Calgary', 51.05, -114.07],
    ['the Atlantic', 35, -50],
  ])('%s is not in the country', (_place, lat, lon) => {
    expect(usZoneAt({ lat, lon })).toBeNull();
  });
});
