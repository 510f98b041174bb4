import { defaultPolicy } from '../../policy/policy';
import { dayFacts } from '../day-facts';
import { cornSnake, sampleForecast, sampleQuestion } from '../question-samples';
import { railCheck, sigmaF } from './rail-check';

const now = '2026-12-01T12:00:00.000Z';
const door = {
  kind: 'door' as const,
  door: { name: 'the door', city: 'Phoenix', state: 'AZ', zone: 'America/Phoenix' },
};
/** The destination at `tempF` in one hour of the day; shipped on December 2, arriving on the 3rd in Phoenix (UTC−7). */
const at = (tempF: number, hour: string, changes: Parameters<typeof sampleQuestion>[0] = {}) => {
  const weather = {
    ...sampleQuestion().weather,
    destination: sampleForecast('America/Phoenix', now, 65, {
      at: (one, usual) => (one.startsWith(hour) ? tempF : usual),
    }),
  };
  return railCheck(dayFacts(sampleQuestion({ weather, ...changes }))).map(
    ({ code, verdict }) => `${code}: ${verdict}`,
  );
};

// 38 to 90 °F for a counter, 40 to 85 °F for a door: common practice from memory, no source.
describe('the guard rails', () => {
  it.each([
    ['a counter', {}, 38, 90],
    ['a door', { destination: door }, 40, 85],
  ])('of %s hold at the limit and not a degree beyond it', (_what, changes, lowF, highF) => {
    const noon = '2026-12-03T19';
    expect(at(lowF, noon, changes)).toEqual(['near-cold: tight']);
    expect(at(lowF - 1, noon, changes)).toEqual(['too-cold: shut']);
    expect(at(highF, noon, changes)).toEqual(['near-hot: tight']);
    expect(at(highF + 1, noon, changes)).toEqual(['too-hot: shut']);
  });

  it.each([
    // Midnight in Phoenix is 07:00 UTC: both local days count whole, the hours round them do not.
    ['the last hour before the ship day', '2026-12-02T06', 'outdoors-fine: open'],
    ['the first hour of the ship day', '2026-12-02T07', 'too-cold: shut'],
    ['the last hour of the arrival day', '2026-12-04T06', 'too-cold: shut'],
    ['the first hour after it', '2026-12-04T07', 'outdoors-fine: open'],
  ])('count %s as they should', (_when, hour, expected) => {
    expect(at(20, hour)).toEqual([expected]);
  });

  it('are tightened by the species in the box that minds the most, and loosened by none', () => {
    const line = (outdoorLowF: number | null) => ({
      species: { ...cornSnake, commonName: `snake from ${outdoorLowF}`, outdoorLowF },
      quantity: 1,
      massG: 100,
    });
    const noon = '2026-12-03T19';
    const withLows = (...lows: (number | null)[]) => at(49, noon, { contents: lows.map(line) });
    expect(withLows(null, 45, 50)).toEqual(['too-cold: shut']);
    expect(withLows(null, 45)).toEqual(['outdoors-fine: open']);
    expect(at(37, noon, { contents: [line(20)] })).toEqual(['too-cold: shut']);
  });

  it('want the more room the further the day lies ahead', () => {
    const sigmas = [0, 1, 7, 13].map((ahead) =>
      sigmaF(dayFacts(sampleQuestion({ shipDate: `2026-12-${String(1 + ahead).padStart(2, '0')}` }))),
    );
    // Day 1: RMSE 3.80 °F of 12-24 h highs (NOAA/NSSL verification tables); the others an assumption; the last stands for later.
    expect(sigmas).toEqual([3, 3.8, 7.6, 7.6]);
    expect(defaultPolicy.sigmaF).toHaveLength(8);
  });
});
