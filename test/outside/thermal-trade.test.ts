import fc from 'fast-check';
import type { OutdoorForecast } from '@shared/forecast/outdoor-forecast';
import { boxModel } from '@shared/thermal/box-model';
import { boxTrace } from '@shared/thermal/box-trace';
import { judgeBox } from '@shared/thermal/judge-box';
import { packsToTry } from '@shared/verdict/checks/pack-check';
import { dayFacts } from '@shared/verdict/day-facts';
import type { DayQuestion } from '@shared/verdict/day-question';
import { dayVerdict } from '@shared/verdict/day-verdict';
import { cornSnake, denver, phoenix, sampleForecast, sampleQuestion } from '@shared/verdict/question-samples';
import { air, constants, leg, run, small, toC } from '../support/box-samples';

const now = '2026-12-01T12:00:00.000Z';
const weatherOf = (originF: number, hubF: number, destinationF: number) => ({
  origin: sampleForecast('America/Chicago', now, originF),
  hub: sampleForecast('America/Indiana/Indianapolis', now, hubF),
  destination: sampleForecast('America/Phoenix', now, destinationF),
});

describe('the trade’s rules of packs (common practice, no source)', () => {
  it('a heat pack only when a high along the route is under 70 °F', () => {
    const offered = (originF: number, destinationF: number) =>
      packsToTry(dayFacts(sampleQuestion({ weather: weatherOf(originF, 72, destinationF) }))).some((pack) =>
        pack.startsWith('heat'),
      );
    expect(offered(71, 71)).toBe(false);
    expect(offered(71, 69)).toBe(true);
    expect(offered(69, 71)).toBe(true);
  });

  it('a pack of 40 hours warms for 40 hours and is cold soon after', () => {
    const model = boxModel(small, 160, constants);
    const { tempF } = run(
      model,
      [leg(60)],
      air(() => 50),
      50,
      'heat-40',
    );
    const full = toC(50) + 3.2 / model.uaWPerK;
    expect(toC(tempF[39] ?? NaN)).toBeCloseTo(full, 3);
    expect(tempF[58]).toBeCloseTo(50, 1);
  });

  it.each([
    ['heat-72', 40],
    ['cold', 84],
  ])('says of a %s pack that it must not touch the animal', (pack, tempF) => {
    const policy = sampleQuestion().policy;
    const hot = sampleQuestion({
      weather: weatherOf(tempF, tempF, tempF),
      policy: { ...policy, journey: { ...policy.journey, hub: { exposure: 1, indoorF: 65 } } },
      contents: [
        {
          species: { ...cornSnake, bandLowF: 45, bandHighF: pack === 'cold' ? 78 : 95 },
          quantity: 1,
          massG: 160,
        },
      ],
    });
    const day = dayVerdict(hot);
    expect(day.pack).toBe(pack);
    expect(day.reasons.find(({ code }) => code === 'pack')?.text).toContain('not touching the animal');
  });
});

describe('a counter or the door (common practice, no source: most mishaps happen between station and door)', () => {
  it('holding never has the lower chance, whatever the weather, with the best pack for each', () => {
    const temp = fc.integer({ min: 38, max: 90 });
    fc.assert(
      fc.property(temp, temp, temp, (originF, hubF, destinationF) => {
        const hold = sampleQuestion({ weather: weatherOf(originF, hubF, destinationF) });
        const door: DayQuestion = {
          ...hold,
          service: 'door',
          destination: {
            kind: 'door',
            door: { name: 'the door', city: 'Phoenix', state: 'AZ', zone: 'America/Phoenix' },
          },
        };
        const chance = (question: DayQuestion) => {
          const facts = dayFacts(question);
          return judgeBox({ question: facts, limits: facts.limits, packs: packsToTry(facts), sigmaF: 3.8 })
            .chance;
        };
        expect(chance(hold)).toBeGreaterThanOrEqual(chance(door) - 1e-6);
      }),
      { numRuns: 200 },
    );
  });
});

describe('a verdict that others of the same route and day have paved', () => {
  it('is the same as one from objects that nobody has seen, whatever changed in between', () => {
    const temp = fc.integer({ min: 30, max: 95 });
    const change = fc.record({
      originF: temp,
      destinationF: temp,
      massG: fc.integer({ min: 1, max: 900 }),
      isDenver: fc.boolean(),
      isHubElsewhere: fc.boolean(),
      isWarmer: fc.boolean(),
      hourLater: fc.integer({ min: 0, max: 30 }),
    });
    const [there, policies] = [[phoenix, denver] as const, [sampleQuestion().policy] as const];
    const { hub } = sampleQuestion();
    const hubs = [hub, { ...hub, zone: 'America/Denver' }] as const;
    const warmer = {
      ...policies[0],
      journey: { ...policies[0].journey, hub: { exposure: 0.5, indoorF: 75 } },
    };
    const { calendar } = sampleQuestion();
    // Few forecasts, so that the same ones come again beside other places, hours and policies.
    const [near, far] = [new Map<number, OutdoorForecast>(), new Map<number, OutdoorForecast>()];
    const known = (all: Map<number, OutdoorForecast>, zone: string, tempF: number) => {
      const kind = tempF % 2;
      const found = all.get(kind) ?? sampleForecast(zone, now, tempF);
      all.set(kind, found);
      return found;
    };
    const between = sampleForecast(hub.zone, now, 40, {
      at: (hour, usual) => usual + 45 * Math.sin((2 * Math.PI * Date.parse(hour)) / 86_400_000),
    });
    fc.assert(
      fc.property(change, (one) => {
        const weather = {
          origin: known(near, 'America/Chicago', one.originF),
          hub: between,
          destination: known(far, 'America/Phoenix', one.destinationF),
        };
        const counter = there[one.isDenver ? 1 : 0];
        const seen = sampleQuestion({
          now: new Date(Date.parse(now) + one.hourLater * 3_600_000).toISOString(),
          calendar,
          weather,
          hub: hubs[one.isHubElsewhere ? 1 : 0],
          policy: one.isWarmer ? warmer : policies[0],
          destination: { kind: 'hold', counter },
          contents: [{ species: cornSnake, quantity: 1, massG: one.massG }],
        });
        const unseen: DayQuestion = {
          ...seen,
          origin: { ...seen.origin },
          destination: { kind: 'hold', counter: { ...counter } },
          weather: {
            origin: { ...weather.origin },
            hub: { ...weather.hub },
            destination: { ...weather.destination },
          },
        };
        expect(dayVerdict(seen, { trace: true })).toEqual(dayVerdict(unseen, { trace: true }));
      }),
      { numRuns: 400, seed: 5 },
    );
  });

  const wave = (zone: string, shift: number) =>
    sampleForecast(zone, now, 55, {
      at: (hour, usual) => usual + 12 * Math.sin((2 * Math.PI * Date.parse(hour)) / 86_400_000 + shift),
    });
  const base = sampleQuestion({
    weather: { origin: wave('America/Chicago', 0), hub: wave('UTC', 1), destination: wave('UTC', 2) },
  });
  const closed = sampleQuestion({
    blackouts: [
      {
        title: 'Inventory day',
        kind: 'date',
        startDate: '2026-12-04',
        endDate: null,
        rules: null,
        liftedDates: [],
        scope: 'everywhere',
        carrierId: null,
        state: null,
        counterId: null,
      },
    ],
  });
  const { policy } = base;
  it.each<[string, Partial<DayQuestion>]>([
    ['the hour of asking', { now: '2026-12-02T09:00:00.000Z' }],
    ['the origin', { origin: { ...base.origin, workingDays: [1, 2, 4, 5] } }],
    ['the sort hub', { hub: { ...base.hub, zone: 'Pacific/Honolulu' } }],
    ['the policy', { policy: { ...policy, journey: { ...policy.journey, heldMinutes: 3600 } } }],
    ['the calendar', { calendar: closed.calendar }],
    ['the weather at the origin', { weather: { ...base.weather, origin: wave('UTC', 3) } }],
    ['the weather at the hub', { weather: { ...base.weather, hub: wave('UTC', 4) } }],
    ['the weather at the destination', { weather: { ...base.weather, destination: wave('UTC', 5) } }],
  ])('is worked out anew when %s changes', (_, change) => {
    const before = dayVerdict(base, { trace: true });
    const changed = { ...base, ...change };
    const after = dayVerdict(changed, { trace: true });
    expect(after).not.toEqual(before);
    const unseen = { ...changed, destination: { kind: 'hold' as const, counter: { ...phoenix } } };
    const weather = {
      ...changed.weather,
      destination: changed.weather.destination && { ...changed.weather.destination },
    };
    expect(after).toEqual(dayVerdict({ ...unseen, weather }, { trace: true }));
  });

  it('keeps its trace when the next parcel of the route is judged', () => {
    const question = sampleQuestion({ weather: weatherOf(60, 50, 60) });
    const facts = dayFacts(question);
    const ask = (massG: number) =>
      judgeBox({
        question: { ...facts, contents: [{ species: cornSnake, quantity: 1, massG }] },
        limits: facts.limits,
        packs: ['none', 'heat-72'],
        sigmaF: 3,
      });
    const first = ask(100);
    const place = { name: 'there', zone: 'UTC' };
    const before = JSON.stringify(boxTrace(first, 3, () => place));
    ask(900);
    expect(JSON.stringify(boxTrace(first, 3, () => place))).toBe(before);
  });
});

describe('a forecast that is no forecast', () => {
  it.each([NaN, Infinity, -Infinity])('is refused with a typed error for %d', (value) => {
    const broken = () => air((hour) => (hour === 5 ? value : 70));
    expect(broken).toThrow(expect.objectContaining({ name: 'ThermalError', code: 'bad-forecast' }) as Error);
  });
});
