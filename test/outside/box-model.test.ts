import { jStat } from 'jstat';
import { Solver } from 'odex';
import { defaultPolicy } from '@shared/policy/policy';
import { boxModel } from '@shared/thermal/box-model';
import { chanceInBand, normalCdf } from '@shared/thermal/chance';
import { journeyLegs, lateLegs } from '@shared/thermal/journey';
import { outdoorHours } from '@shared/thermal/outdoor-hours';
import { denver, sampleForecast, sampleQuestion } from '@shared/verdict/question-samples';
import { air, constants, hourMs, last, leg, run, small, startMs, toC } from '../support/box-samples';

describe('lumped capacitance', () => {
  // Times are scaled: a second of the book is an hour here, by τ = heat / UA.
  it('reaches 199 °C after 5.16 s from 25 °C in gas of 200 °C (Incropera & DeWitt, Example 5.1, τ = 1 s)', () => {
    const model = { uaWPerK: 1, heatJPerK: 3600 };
    const gas = air(() => 392);
    const at = last(run(model, [leg(5.1648)], gas, 77).tempF);
    expect(toC(at)).toBeCloseTo(199, 2);
  });

  it('takes 9.94 s for 99 % with b = 0.4632 1/s (Çengel, Example 4-1: h 210, ρ 8500, c 320, D 1 mm)', () => {
    // b = h / (ρ c D / 6)
    const b = 210 / (8500 * 320 * (0.001 / 6));
    const model = { uaWPerK: b, heatJPerK: 3600 };
    const gas = air(() => 212);
    const at = last(run(model, [leg(9.942)], gas, 32).tempF);
    expect((at - 32) / (212 - 32)).toBeCloseTo(0.99, 4);
  });

  it('rests at T∞ + P / UA under constant power', () => {
    const model = boxModel(small, 160, constants);
    const at = run(
      model,
      [leg(30)],
      air(() => 40),
      75,
      'heat-72',
    ).tempF;
    expect(toC(last(at))).toBeCloseTo(toC(40) + 3.2 / model.uaWPerK, 6);
  });

  it('follows sinusoidal air with amplitude 1 / √(1 + (ωτ)²) and lag atan(ωτ) / ω', () => {
    // τ = 10 h and a day's wave, sampled by the hour and straight between: within a percent of the closed form.
    const model = { uaWPerK: 1, heatJPerK: 36_000 };
    const omega = (2 * Math.PI) / 24;
    const { tempF, atMs } = run(
      model,
      [leg(380)],
      air((hour) => 70 + 20 * Math.sin(omega * hour)),
      70,
    );
    const lateDay = Array.from(tempF, (value, point) => ({
      value,
      hour: ((atMs[point] ?? 0) - startMs) / hourMs,
    })).slice(-25);
    const amplitude = 20 / Math.sqrt(1 + (omega * 10) ** 2);
    for (const { value, hour } of lateDay) {
      const exact = 70 + amplitude * Math.sin(omega * hour - Math.atan(omega * 10));
      expect(Math.abs(value - exact)).toBeLessThan(0.01 * amplitude);
    }
  });
});

describe('the box', () => {
  it('lets through 0.363 W/K at 12 × 9 × 6 in with ¾ in foam: series resistances by hand', () => {
    // Film 0.120 m²K/W (ASHRAE, 0.68 h·ft²·°F/Btu); foam R 3.85 an inch (ASTM C578 type I): 0.75 in = 2.8875 h·ft²·°F/Btu,
    // 1 of which is 0.17611 m²K/W; board 4 mm at 0.064 W/m·K (ISO 8302 range 0.05–0.12); air holes 0.05 W/K (assumption).
    const inch2 = 0.0254 ** 2;
    const outer = 2 * (12 * 9 + 12 * 6 + 9 * 6) * inch2;
    const inner = 2 * (10.5 * 7.5 + 10.5 * 4.5 + 7.5 * 4.5) * inch2;
    const resistance = 0.12 + 2.8875 * 0.17611 + 0.004 / 0.064 + 0.12;
    const { uaWPerK } = boxModel(small, 0, constants);
    expect(uaWPerK).toBeCloseTo((outer + inner) / 2 / resistance + 0.05, 2);
    expect(uaWPerK).toBeCloseTo(0.363, 3);
  });

  it('stores 500 J/K and about 3.4 kJ/kg·K of contents (lizard tissue 3.43, Bartholomew & Lasiewski, from memory)', () => {
    expect(boxModel(small, 1000, constants).heatJPerK).toBe(3900);
  });
});

/** The heat pack's power, W, at so many hours, written anew from design 5.3. */
const powerW = (hours: number, rated: number): number => {
  if (hours <= 1) return 3.2 * hours;
  if (hours <= rated) return 3.2;
  return Math.max(0, 3.2 * (1 - (hours - rated) / (0.1 * rated)));
};

describe('the heat pack', () => {
  it('gives about 0.46 MJ over 40 h, the heat of about 62 g of iron at 7.38 kJ/g (4 Fe + 3 O₂ → 2 Fe₂O₃, −1648.4 kJ)', () => {
    // Energy balance: with no air exchange all of the power stays in the box.
    const sealed = { uaWPerK: 1e-4, heatJPerK: 1e6 };
    const { tempF } = run(
      sealed,
      [leg(60)],
      air(() => 70),
      70,
      'heat-40',
    );
    const joules = ((last(tempF) - 70) / 1.8) * 1e6;
    // Half an hour's worth lost in the rise, two hours' worth won in the tail.
    expect(joules).toBeCloseTo(3.2 * 3600 * (40 - 0.5 + 2), -2);
    const grams = joules / 7380;
    expect(grams).toBeGreaterThan(58);
    expect(grams).toBeLessThan(68);
  });
});

describe('a whole journey', () => {
  const question = sampleQuestion();
  const wave = (hour: number) => 45 + 15 * Math.sin((2 * Math.PI * hour) / 24);
  const outdoor = outdoorHours({
    ...sampleForecast('UTC', question.now, 0),
    tempsF: Array.from({ length: 196 }, (_, hour) => wave(hour)),
  });
  const legs = journeyLegs(question);
  const model = boxModel(small, 160, constants);

  it.each([
    ['none', 0],
    ['heat-40', 40],
    ['heat-72', 72],
  ] as const)('with %s is the one that odex (Hairer’s ODEX) integrates', (pack, rated) => {
    const { atMs, tempF } = run(model, legs, outdoor, 75, pack);
    const zero = atMs[0] ?? 0;
    let tempC = toC(75);
    // Leg by leg and hour by hour, for the air has corners there.
    for (let point = 1; point < atMs.length; point += 1) {
      const from = ((atMs[point - 1] ?? 0) - zero) / hourMs;
      const to = ((atMs[point] ?? 0) - zero) / hourMs;
      const here = legs.find((one) => one.startMs < (atMs[point] ?? 0) && one.endMs >= (atMs[point] ?? 0));
      if (!here) throw new Error('No leg holds this hour.');
      const around = (hours: number) => {
        const at = (zero + hours * hourMs - outdoor.startMs) / hourMs;
        const before = Math.floor(at);
        const straight = wave(before) + (wave(before + 1) - wave(before)) * (at - before);
        return here.exposure * toC(straight) + (1 - here.exposure) * toC(here.indoorF);
      };
      const solver = new Solver(1);
      solver.absoluteTolerance = solver.relativeTolerance = 1e-9;
      const slope = (hours: number, y: number[]) => [
        ((model.uaWPerK * (around(hours) - (y[0] ?? 0)) + (rated > 0 ? powerW(hours, rated) : 0)) /
          model.heatJPerK) *
          3600,
      ];
      tempC = solver.solve(slope, from, [tempC], to).y[0] ?? NaN;
      expect(toC(tempF[point] ?? NaN)).toBeCloseTo(tempC, 4);
    }
  });

  it('with a cold pack melts its ice: never colder than 0 °C by it, and warm again when it is gone', () => {
    const hot = air(() => 100);
    const { tempF } = run(model, [leg(200)], hot, 75, 'cold');
    expect(Math.min(...tempF)).toBeGreaterThan(32);
    // While there is ice it rests at UA · Ta / (UA + k), °C; 0.225 kg · 334 kJ/kg last for a known time, then it follows the air.
    const resting = (model.uaWPerK * toC(100)) / (model.uaWPerK + 0.08);
    expect(toC(tempF[6] ?? NaN)).toBeCloseTo(resting, 1);
    const hours = (0.225 * 334_000) / (0.08 * resting * 3600);
    expect(toC(tempF[Math.floor(hours) - 1] ?? NaN)).toBeCloseTo(resting, 1);
    expect(tempF[Math.ceil(hours) + 8]).toBeCloseTo(100, 1);
  });

  it('goes leg by leg on each place’s own clock, without a gap, on days of 23 and 25 hours too', () => {
    // Clock changes 2026-11-01 and 2027-03-14 (Energy Policy Act of 2005); Phoenix keeps standard time.
    for (const shipDate of [
      '2026-10-30',
      '2026-10-31',
      '2026-11-01',
      '2027-03-12',
      '2027-03-13',
      '2027-03-14',
    ]) {
      for (const counter of [denver, { ...denver, zone: 'America/Phoenix' }]) {
        const days = journeyLegs({ ...question, shipDate, destination: { kind: 'hold', counter } });
        for (let index = 1; index < days.length; index += 1)
          expect(days[index]?.startMs).toBe(days[index - 1]?.endMs);
        const held = days.find(({ kind }) => kind === 'held');
        const clock = new Intl.DateTimeFormat('en-US', {
          timeZone: counter.zone,
          hour: 'numeric',
          hourCycle: 'h23',
        });
        expect(Number(clock.format(held?.startMs))).toBe(9);
        const late = lateLegs(days, 'hub', defaultPolicy.journey.late);
        expect(late.at(-1)?.endMs).toBe((days.at(-1)?.endMs ?? 0) + 24 * hourMs);
      }
    }
  });
});

describe('the chance', () => {
  it('rests on a normal distribution as jStat and Abramowitz & Stegun table 26.1 (from memory) have it', () => {
    for (let z = -6; z <= 6; z += 0.25) expect(normalCdf(z)).toBeCloseTo(jStat.normal.cdf(z, 0, 1), 10);
    expect(normalCdf(1)).toBeCloseTo(0.8413447461, 9);
    expect(normalCdf(1.96)).toBeCloseTo(0.9750021049, 9);
    expect(normalCdf(-8)).toBeCloseTo(6.22e-16, 17);
  });

  it('is that of 200,000 seeded draws of one common error, each simulated anew from shifted air', () => {
    const model = boxModel(small, 160, constants);
    const days = [
      leg(4, { exposure: 0.2 }),
      leg(16, { exposure: 0.5, startMs: startMs + 4 * hourMs, endMs: startMs + 20 * hourMs }),
    ];
    const band = { lowF: 60, highF: 86 };
    const nominal = run(
      model,
      days,
      air(() => 52),
      75,
    );
    const claimed = chanceInBand(nominal, band, 4);
    // The model is linear in the air, so a draw is the run in air shifted by it; the extremes of a shifted run are found by simulation
    // on a grid of shifts, and the draws counted against them.
    const keeps = (shiftF: number) =>
      Array.from(
        run(
          model,
          days,
          air(() => 52 + shiftF),
          75,
        ).tempF,
      ).every((tempF) => tempF >= band.lowF && tempF <= band.highF);
    const edge = (inside: number, outside: number): number => {
      let [a, b] = [inside, outside];
      for (let step = 0; step < 40; step += 1) {
        const middle = (a + b) / 2;
        if (keeps(middle)) a = middle;
        else b = middle;
      }
      return a;
    };
    const centre = keeps(0) ? 0 : 6;
    const [least, most] = [edge(centre, -200), edge(centre, 200)];
    let state = 42;
    const uniform = () => {
      // Park & Miller's generator (1988): the same draws every time.
      state = (state * 48_271) % 2_147_483_647;
      return state / 2_147_483_647;
    };
    let inside = 0;
    const draws = 200_000;
    for (let draw = 0; draw < draws; draw += 1) {
      const shift = 4 * Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
      if (shift >= least && shift <= most) inside += 1;
    }
    expect(claimed).toBeGreaterThan(0.05);
    expect(claimed).toBeLessThan(0.95);
    // Four standard errors of 200,000 draws.
    expect(Math.abs(inside / draws - claimed)).toBeLessThan(4 * Math.sqrt((claimed * (1 - claimed)) / draws));
  });
});
