import type { Pack } from '../../contract/days';
import { defaultPolicy } from '../../policy/policy';
import { dayFacts } from '../day-facts';
import { phoenix, sampleForecast, sampleQuestion, texas } from '../question-samples';
import { packReasons, packsToTry } from './pack-check';

const now = '2026-12-01T12:00:00.000Z';
/** The highs along the route: origin, sort hub, destination. */
const route = (
  originF: number,
  hubF: number,
  destinationF: number,
  changes: Parameters<typeof sampleQuestion>[0] = {},
) =>
  dayFacts(
    sampleQuestion({
      weather: {
        origin: sampleForecast('America/Chicago', now, originF),
        hub: sampleForecast('America/Chicago', now, hubF),
        destination: sampleForecast('America/Phoenix', now, destinationF),
      },
      ...changes,
    }),
  );
const codes = (facts: ReturnType<typeof route>, pack: Pack) =>
  packReasons(facts, pack).map(({ code }) => code);

// Heat only when a high along the route is under 70 °F (common practice, no source), cold only over 80 °F (from memory).
describe('the rule of thumb for packs', () => {
  it('looks at every place: one cold end is enough for heat, one hot end for cold', () => {
    expect(packsToTry(route(75, 75, 69))).toContain('heat-72');
    expect(packsToTry(route(69, 75, 75))).toContain('heat-72');
    expect(packsToTry(route(75, 69, 75))).toContain('heat-72');
    expect(packsToTry(route(75, 75, 81))).toEqual(['none', 'cold']);
    expect(packsToTry(route(60, 75, 90))).toEqual(['none', 'heat-72', 'cold']);
  });

  it('leaves a box without a pack while the weather is not known', () => {
    expect(packsToTry(route(50, 50, 50, { shipDate: '2026-12-15' }))).toEqual(['none']);
  });

  it('wants a heat pack to last a day longer than planned: by the hours that the policy and the counter set', () => {
    // Noon in Texas to 11:00 in Phoenix are 24 h; with 24 to spare a 40-hour pack is too short.
    expect(route(50, 50, 50).hoursInBox).toBe(24);
    const spare = (heatPackSpareHours: number) => ({ policy: { ...defaultPolicy, heatPackSpareHours } });
    expect(packsToTry(route(50, 50, 50, spare(16)))).toContain('heat-40');
    expect(packsToTry(route(50, 50, 50, spare(17)))).not.toContain('heat-40');
    expect(codes(route(50, 50, 50, spare(48)), 'heat-72')).toEqual(['pack']);
    expect(codes(route(50, 50, 50, spare(49)), 'heat-72')).toEqual(['pack', 'pack-short']);
    const { journey } = defaultPolicy;
    const longer = {
      ...defaultPolicy,
      journey: { ...journey, packedBeforeCollectionMinutes: 180, heldMinutes: 240 },
    };
    expect(route(50, 50, 50, { policy: longer }).hoursInBox).toBe(28);
    const opensAtTen = { ...phoenix, openingHours: { '4': { openMinute: 600, closeMinute: 1080 } } };
    expect(route(50, 50, 50, { destination: { kind: 'hold', counter: opensAtTen } }).hoursInBox).toBe(25);
  });

  it('counts the hours that pass, not those on the face of the clock, when the clocks change in the night', () => {
    const week = [1, 2, 3, 4, 5, 6, 7];
    const cutOffMinutes = Object.fromEntries(week.map((weekday) => [String(weekday), 1020]));
    const hours = (shipDate: string) => {
      const at = `${shipDate}T12:00:00.000Z`;
      const origin = { ...texas, workingDays: week, cutOffMinutes };
      const counter = { ...texas, id: 4, workingDays: week, openingHours: {} };
      const question = sampleQuestion({ now: at, shipDate, origin, destination: { kind: 'hold', counter } });
      return dayFacts(question).hoursInBox;
    };
    // Noon to 11:00 in Texas; Sunday, November 1, 2026 has 25 hours, March 14, 2027 has 23.
    expect([hours('2026-10-30'), hours('2026-10-31'), hours('2027-03-13')]).toEqual([23, 24, 22]);
  });
});
