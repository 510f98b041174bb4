import { climateNormals } from './climate-normals';
import { ForecastScript } from './forecast-script';
import { eventsAt } from './severe-weather';

describe('severe weather', () => {
  it('over a year are rare, well formed and fit the season', () => {
    const seen = new Map<string, number>();
    const cities = climateNormals.filter((_, index) => index % 4 === 0);
    for (const { lat, lon } of cities)
      for (let day = 0; day < 365; day += 6) {
        const at = Date.UTC(2026, 6, 1 + day, 12);
        for (const event of eventsAt(new ForecastScript(), 5, { lat, lon }, at)) {
          seen.set(event.event, (seen.get(event.event) ?? 0) + 1);
          expect(event.toMs).toBeGreaterThan(at);
          expect(event.toMs).toBeGreaterThan(event.fromMs);
          const month = new Date(event.fromMs).getUTCMonth();
          if (event.event.includes('Heat')) expect(month >= 3 && month <= 9).toBe(true);
          if (event.event.includes('Cold')) expect(month <= 3 || month >= 9).toBe(true);
        }
      }
    expect(new Set(seen.keys())).toEqual(
      new Set([
        'Extreme Cold Warning',
        'Freeze Warning',
        'Winter Storm Warning',
        'Extreme Heat Warning',
        'Wind Advisory',
      ]),
    );
    const asked = cities.length * Math.ceil(365 / 6);
    const total = [...seen.values()].reduce((sum, count) => sum + count, 0);
    expect(total / asked).toBeLessThan(0.15);
  });
});
