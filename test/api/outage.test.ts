import type { DaysAnswer } from '@shared/contract';
import type { Caller } from '../support/test-site';
import { createWeatherSite, type WeatherSite } from '../support/weather-site';

/** Wednesday morning in Texas: the forecast reaches past a late arrival of next Monday's parcels. */
let site: WeatherSite;
let breeder: Caller;

beforeEach(async () => {
  site = await createWeatherSite('2026-12-02T12:00:00.000Z');
  breeder = await site.as('breeder@example.org');
});
afterEach(() => site.close());

const check = async (): Promise<DaysAnswer> => {
  const body = {
    destination: { counterId: site.ids.phoenixCounter },
    service: 'hold',
    contents: [{ speciesId: site.ids.cornSnake, quantity: 1, massG: 160 }],
    boxId: site.ids.smallBox,
  };
  return (await breeder.post('/api/route-checks').send(body).expect(200)).body as DaysAnswer;
};
const openDays = ({ days }: DaysAnswer) =>
  days.filter(({ verdict }) => verdict === 'open').map(({ date }) => date);

describe.each(['500', '503', 'timeout', 'refuse', 'malformed', 'not-json', 'huge'] as const)(
  'the forecast service answering %s',
  (outage) => {
    it('leaves the last known forecast with its age; once that is 12 h old, no day is open', async () => {
      expect(openDays(await check())).toContain('2026-12-07');
      site.weather.script({ outage });

      site.setNow('2026-12-02T20:00:00.000Z');
      const later = await check();
      // Issued at 12:00 UTC, looked at at 20:00.
      expect(later.forecastAgeMinutes).toBe(480);

      site.setNow('2026-12-03T01:00:00.000Z');
      const old = await check();
      expect(old.forecastAgeMinutes).toBe(780);
      expect(openDays(old)).toEqual([]);
      const day = old.days.find(({ date }) => date === '2026-12-07');
      expect(day).toMatchObject({
        verdict: 'tight',
        outdoor: { lowF: 47, highF: 60 },
        forecastAt: '2026-12-02T12:00:00.000Z',
      });
      expect(day?.reasons.some(({ text }) => text.includes('13 h old'))).toBe(true);
    }, 30_000);
  },
);

describe('a forecast that never came', () => {
  it('makes no day open: near days are shut for want of it, later ones far', async () => {
    site.weather.script({ outage: '500' });
    const answer = await check();
    expect(openDays(answer)).toEqual([]);
    expect(answer.forecastAgeMinutes).toBeNull();
    const near = answer.days.find(({ date }) => date === '2026-12-03');
    expect(near).toMatchObject({ verdict: 'shut', outdoor: null, forecastAt: null });
    expect(near?.reasons.map(({ code }) => code)).toContain('no-forecast');
    expect(answer.days.find(({ date }) => date === '2026-12-15')?.verdict).toBe('far');
  }, 30_000);

  it('comes when the service does', async () => {
    site.weather.script({ outage: '503' });
    expect(openDays(await check())).toEqual([]);
    site.weather.script({ outage: 'none' });
    // A place that failed is left alone for two minutes.
    site.setNow('2026-12-02T12:03:00.000Z');
    expect(openDays(await check())).toContain('2026-12-07');
  }, 30_000);
});
