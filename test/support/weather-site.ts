import { createForecastFake, type ForecastFake } from '@api/fakes/forecast/forecast-fake';
import { createTestSite, type TestSite } from './test-site';

export interface WeatherSite extends TestSite {
  readonly weather: ForecastFake;
}

/**
 * A test site whose forecasts come from a stand-in over a socket: every day everywhere from 47 to 60 °F, which suits every species (with a heat pack)
 * of the small circle, until `weather.script` says otherwise. Its clock follows the site's.
 */
export async function createWeatherSite(now = '2026-12-01T12:00:00.000Z'): Promise<WeatherSite> {
  let nowMs = Date.parse(now);
  const weather = createForecastFake({ seed: 1, now: () => nowMs });
  const port = await weather.listen(0);
  weather.script({ steady: { lowF: 47, highF: 60 } });
  const site = await createTestSite({ now, env: { FORECAST_URL: `http://127.0.0.1:${port}` } });
  return {
    ...site,
    weather,
    setNow: (iso) => {
      nowMs = Date.parse(iso);
      site.setNow(iso);
    },
    close: async () => {
      await site.close();
      await weather.close();
    },
  };
}

/** A parcel of one corn snake for a buyer in Phoenix, ready today, as a breeder would enter it. */
export function parcelBody(site: TestSite, changes: Record<string, unknown> = {}): Record<string, unknown> {
  return {
    buyer: { name: 'Bo Buyer', email: 'buyer@example.org', phone: null },
    contents: [{ speciesId: site.ids.cornSnake, quantity: 1, massG: 160 }],
    boxId: site.ids.smallBox,
    service: 'hold',
    holdCounterId: site.ids.phoenixCounter,
    readyFrom: '2026-12-01',
    latestDate: '2026-12-18',
    ...changes,
  };
}
