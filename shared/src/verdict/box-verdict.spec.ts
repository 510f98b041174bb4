import type { DayVerdict, Verdict } from '../contract/days';
import { defaultPolicy } from '../policy/policy';
import { packsToTry } from './checks/pack-check';
import { dayFacts } from './day-facts';
import { dayVerdict } from './day-verdict';
import { cornSnake, sampleForecast, sampleQuestion } from './question-samples';
import { verdictSeverity } from './worst-verdict';

const ask = (changes: Parameters<typeof sampleQuestion>[0] = {}): DayVerdict =>
  dayVerdict(sampleQuestion(changes));
const codes = (day: DayVerdict, verdict: Verdict = day.verdict): string[] =>
  day.reasons.filter((reason) => reason.verdict === verdict).map((reason) => reason.code);

/** One place's forecast at `tempF` for the night between ship day and arrival; mild otherwise. */
const night = (zone: string, tempF: number) =>
  sampleForecast(zone, '2026-12-01T12:00:00.000Z', 72, {
    at: (hour, usual) => (hour >= '2026-12-03T08' && hour < '2026-12-03T12' ? tempF : usual),
  });

/** An animal that endures everything, so that only the outdoor limits speak. */
const hardy = [
  {
    species: { ...cornSnake, bandLowF: -40, bandHighF: 150, enduranceLowF: -60, enduranceHighF: 170 },
    quantity: 1,
    massG: 160,
  },
];

describe('the pack', () => {
  const at = (tempF: number) => {
    const weather = (zone: string) => sampleForecast(zone, '2026-12-01T12:00:00.000Z', tempF);
    return sampleQuestion({
      weather: {
        origin: weather('America/Chicago'),
        hub: weather('America/Chicago'),
        destination: weather('America/Phoenix'),
      },
    });
  };

  // A heat pack only under a high of 70 °F, a cold pack only over 80 °F: common practice, no source (the second from memory).
  it.each<[number, string[]]>([
    [60, ['none', 'heat-72']],
    [69, ['none', 'heat-72']],
    [70, ['none']],
    [80, ['none']],
    [81, ['none', 'cold']],
  ])('at %d °F all along may be %j', (tempF, packs) => {
    expect(packsToTry(dayFacts(at(tempF)))).toEqual(packs);
  });

  it('is the one with the best chance, the lesser on a tie: heat in the cold, none where the box keeps without', () => {
    expect(dayVerdict(at(50)).pack).toBe('heat-72');
    expect(dayVerdict(at(68)).pack).toBe('none');
  });

  it('is decided by a day late where both are as good on time', () => {
    const patient = { ...cornSnake, bandLowF: 44, bandHighF: 110, enduranceLowF: 44, enduranceHighF: 111 };
    const contents = [{ species: patient, quantity: 1, massG: 160 }];
    const cold = { ...at(42), contents };
    const without = dayVerdict({ ...cold, policy: { ...defaultPolicy, heatPackBelowF: 0 } });
    const chosen = dayVerdict(cold);
    expect([without.pack, without.chance]).toEqual(['none', 1]);
    expect([chosen.pack, chosen.chance]).toEqual(['heat-72', 1]);
    expect(chosen.lateChance).toBeGreaterThan(without.lateChance ?? 1);
  });

  it('is no 40-hour one where a day late would outlast it: 24 h in the box and 24 to spare are 48', () => {
    const patient = { ...at(50), policy: { ...defaultPolicy, heatPackSpareHours: 12 } };
    expect(packsToTry(dayFacts(at(50)))).not.toContain('heat-40');
    expect(packsToTry(dayFacts(patient))).toContain('heat-40');
  });
});

describe('the air in the box', () => {
  const mild = sampleQuestion().weather;
  const cold = { ...mild, destination: night('America/Phoenix', 38) };

  it('shuts a day on which the animal would leave its band, and says where, when and by how much', () => {
    const day = ask({ weather: cold });
    expect(codes(day)).toEqual(['box']);
    expect(day.chance).toBeLessThan(0.8);
    expect(day.reasons[0]?.text).toMatch(
      /^In the box it falls to 5\d °F on the way to Phoenix at 4 am Thursday, [\d.]+ °F under the limit of 60 °F for a corn snake; it keeps within 60 °F and 86 °F in .* of 100 forecasts like this one\.$/,
    );
  });

  it('never loosens a guard rail: a hardy animal is shut out by 37 °F all the same', () => {
    const day = ask({ contents: hardy, weather: { ...mild, destination: night('America/Phoenix', 37) } });
    expect(day.chance).toBe(1);
    expect(codes(day)).toEqual(['too-cold']);
  });

  it('is open from 95 of 100 on, tight from 80 on, and a day late from 80 and 50 on', () => {
    const { chance } = defaultPolicy;
    const at = (open: number, tight: number) =>
      verdictSeverity(
        ask({ weather: cold, policy: { ...defaultPolicy, chance: { ...chance, open, tight } } }).verdict,
      );
    const sure = ask({ weather: cold }).chance ?? 1;
    expect(at(sure + 0.1, sure + 0.05)).toBe(verdictSeverity('shut'));
    expect(at(sure + 0.1, sure / 2)).toBe(verdictSeverity('tight'));
  });

  it('is told hour by hour when it is asked for, to the late arrival', () => {
    const { trace } = dayVerdict(sampleQuestion(), { trace: true });
    expect(trace?.[0]).toMatchObject({
      at: '2026-12-02T18:00:00.000Z',
      tempF: 75,
      leg: 'packed',
      place: 'San Antonio',
    });
    // Held at the Phoenix counter from 9:00 to 11:00 on its own clock, and a day later again.
    expect(trace?.find(({ at }) => at === '2026-12-03T18:00:00.000Z')).toMatchObject({
      leg: 'held',
      place: 'Phoenix',
    });
    expect(trace?.at(-1)).toMatchObject({ at: '2026-12-04T18:00:00.000Z', tempF: null });
    expect(dayVerdict(sampleQuestion()).trace).toBeUndefined();
  });

  it('cannot be open where the forecast ends before a late parcel would arrive', () => {
    const short = (zone: string) => {
      const forecast = sampleForecast(zone, '2026-12-01T12:00:00.000Z', 72);
      return { ...forecast, tempsF: forecast.tempsF.slice(0, 75) };
    };
    const day = ask({ weather: { ...mild, hub: mild.hub, destination: short('America/Phoenix') } });
    expect(day.lateChance).toBeNull();
    expect(codes(day)).toContain('late-unknown');
  });
});
