import { dayFacts } from '../day-facts';
import { sampleForecast, sampleQuestion } from '../question-samples';
import { forecastCheck } from './forecast-check';

const now = '2026-12-01T12:00:00.000Z';
const mild = sampleQuestion().weather;
const says = (changes: Parameters<typeof sampleQuestion>[0]) =>
  forecastCheck(dayFacts(sampleQuestion(changes))).map(
    ({ code, verdict, values }) => `${values['place']} ${code}: ${verdict}`,
  );

describe('the forecast of a place', () => {
  it('is trusted for twelve hours, whichever place it is for', () => {
    for (const place of ['origin', 'hub', 'destination'] as const) {
      const aged = (hours: number) => {
        const issuedAt = new Date(Date.parse(now) - hours * 3_600_000).toISOString();
        return { ...mild, [place]: sampleForecast(mild[place]?.zone ?? '', now, 72, { issuedAt }) };
      };
      expect(says({ weather: aged(12) })).toEqual([]);
      expect(says({ weather: aged(12.1) })).toHaveLength(1);
      expect(says({ weather: aged(12.1) })[0]).toContain('forecast-old: tight');
    }
  });

  it('that nobody has shuts a near day, and leaves a late one for later', () => {
    const none = { origin: null, hub: null, destination: null };
    expect(says({ weather: none })).toEqual([
      'San Antonio no-forecast: shut',
      'Indianapolis no-forecast: shut',
      'Phoenix no-forecast: shut',
    ]);
    expect(says({ weather: none, shipDate: '2026-12-14' })).toEqual([
      'San Antonio forecast-far: far',
      'Indianapolis forecast-far: far',
      'Phoenix forecast-far: far',
    ]);
  });

  it('that ends sooner than any does has a hole, not a horizon: the day is shut', () => {
    const whole = sampleForecast('America/Phoenix', now, 72);
    const cut = { ...whole, tempsF: whole.tempsF.slice(0, 30) };
    expect(says({ weather: { ...mild, destination: cut } })).toEqual(['Phoenix no-forecast: shut']);
  });

  it('may miss what lies behind: the morning of today is over', () => {
    const late = '2026-12-02T20:00:00.000Z';
    const from = (zone: string) =>
      sampleForecast(zone, late, 72, { at: (hour, usual) => (hour < '2026-12-02T20' ? null : usual) });
    const weather = {
      origin: from('America/Chicago'),
      hub: from('America/Chicago'),
      destination: from('America/Phoenix'),
    };
    expect(says({ now: late, weather })).toEqual([]);
  });
});
