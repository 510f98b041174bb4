import { Solver } from 'odex';
import { defaultPolicy } from '@shared/policy/policy';
import { boxModel } from '@shared/thermal/box-model';
import { chanceInBand } from '@shared/thermal/chance';
import { journeyLegs, lateLegs, type Leg } from '@shared/thermal/journey';
import { outdoorHours } from '@shared/thermal/outdoor-hours';
import { sampleCounter, sampleForecast, sampleQuestion } from '@shared/verdict/question-samples';
import { constants, hourMs, run, small, toC } from '../support/box-samples';

const question = sampleQuestion();
const legs = journeyLegs(question);
const model = boxModel(small, 160, constants);
const outdoorOf = (wave: (hour: number) => number) =>
  outdoorHours({
    ...sampleForecast('UTC', question.now, 0),
    tempsF: Array.from({ length: 196 }, (_, hour) => wave(hour)),
  });
const legAt = (all: readonly Leg[], atMs: number): Leg => {
  const here = all.find((one) => one.startMs <= atMs && atMs < one.endMs) ?? all.at(-1);
  if (!here) throw new Error('There is no leg.');
  return here;
};

describe('a cold pack on a hot, late journey', () => {
  it('is the one that odex (Hairer’s ODEX) integrates, ice and air together, written anew from design 5.3', () => {
    const wave = (hour: number) => 100 + 8 * Math.sin((2 * Math.PI * hour) / 24);
    const outdoor = outdoorOf(wave);
    const late = lateLegs(legs, 'destination', defaultPolicy.journey.late);
    const { atMs, tempF } = run(model, late, outdoor, 75, 'cold');
    const zero = atMs[0] ?? 0;
    let state = [toC(75), 0.225 * 334_000];
    let melted = NaN;
    for (let point = 1; point < atMs.length; point += 1) {
      const from = (atMs[point - 1] ?? 0) - zero;
      const here = legAt(late, zero + from);
      const around = (seconds: number) => {
        const at = (zero + seconds * 1000 - outdoor.startMs) / hourMs;
        const straight =
          wave(Math.floor(at)) + (wave(Math.floor(at) + 1) - wave(Math.floor(at))) * (at - Math.floor(at));
        return here.exposure * toC(straight) + (1 - here.exposure) * toC(here.indoorF);
      };
      const solver = new Solver(2);
      solver.absoluteTolerance = solver.relativeTolerance = 1e-8;
      // The corner where the ice ends is met by small pieces.
      for (let piece = 0; piece < 60; piece += 1) {
        const step = ((atMs[point] ?? 0) - zero - from) / 60_000;
        const slope = (seconds: number, [tempC = 0, iceJ = 0]: number[]) => {
          const takes = iceJ > 0 && tempC > 0 ? 0.08 * tempC : 0;
          return [(model.uaWPerK * (around(seconds) - tempC) - takes) / model.heatJPerK, -takes];
        };
        const start = from / 1000 + piece * step;
        state = solver.solve(slope, start, state, start + step).y;
        if (Number.isNaN(melted) && (state[1] ?? 0) <= 0) melted = start;
      }
      // Parts of five minutes in the engine: a tenth where the ice ends, 0.005 °C elsewhere.
      const isNearTheEnd = Math.abs(from / 1000 - melted) < 2 * 3600;
      expect(Math.abs(toC(tempF[point] ?? NaN) - (state[0] ?? NaN))).toBeLessThan(isNearTheEnd ? 0.1 : 0.005);
    }
    expect(melted).toBeGreaterThan(3600);
    expect(melted).toBeLessThan(40 * 3600);
  });
});

describe('the chance of a real journey', () => {
  it('is that of 200,000 seeded draws, each integrated anew by a Runge–Kutta of its own', () => {
    const wave = (hour: number) => 42 + 9 * Math.sin((2 * Math.PI * hour) / 24);
    const outdoor = outdoorOf(wave);
    const nominal = run(model, legs, outdoor, 75, 'heat-72');
    const band = { lowF: 66, highF: 95 };
    const claimed = chanceInBand(nominal, band, 6);
    expect(claimed).toBeGreaterThan(0.1);
    expect(claimed).toBeLessThan(0.9);

    // Quarter hours, which every leg's end falls on; air round the box and its exposure at begin, middle and end of each.
    const startMs = legs[0]?.startMs ?? 0;
    const quarterMs = hourMs / 4;
    const steps = ((legs.at(-1)?.endMs ?? 0) - startMs) / quarterMs;
    expect(Number.isInteger(steps)).toBe(true);
    const air = new Float64Array(3 * steps);
    const exposure = new Float64Array(steps);
    const watts = new Float64Array(3 * steps);
    for (let step = 0; step < steps; step += 1) {
      const here = legAt(legs, startMs + step * quarterMs);
      exposure[step] = here.exposure;
      for (const part of [0, 1, 2]) {
        const hours = (step + part / 2) / 4;
        const at = (startMs - outdoor.startMs) / hourMs + hours;
        const low = Math.floor(at);
        const straight = wave(low) + (wave(low + 1) - wave(low)) * (at - low);
        air[3 * step + part] = here.exposure * toC(straight) + (1 - here.exposure) * toC(here.indoorF);
        watts[3 * step + part] = 3.2 * Math.min(1, hours);
      }
    }
    const keeps = (shiftC: number): boolean => {
      let tempC = toC(75);
      const slope = (index: number, felt: number, at: number) =>
        (model.uaWPerK * ((air[index] ?? 0) + felt - at) + (watts[index] ?? 0)) / model.heatJPerK;
      if (!isIn(tempC)) return false;
      for (let step = 0; step < steps; step += 1) {
        const felt = (exposure[step] ?? 0) * shiftC;
        const k1 = slope(3 * step, felt, tempC);
        const k2 = slope(3 * step + 1, felt, tempC + 450 * k1);
        const k3 = slope(3 * step + 1, felt, tempC + 450 * k2);
        const k4 = slope(3 * step + 2, felt, tempC + 900 * k3);
        tempC += 150 * (k1 + 2 * k2 + 2 * k3 + k4);
        if (!isIn(tempC)) return false;
      }
      return true;
    };
    const [lowC, highC] = [toC(band.lowF), toC(band.highF)];
    const isIn = (tempC: number) => tempC >= lowC && tempC <= highC;
    // Park & Miller's generator (1988) and Box–Muller: the same draws every time.
    let seed = 20_261_201;
    const uniform = () => (seed = (seed * 48_271) % 2_147_483_647) / 2_147_483_647;
    const draws = 200_000;
    let inside = 0;
    for (let draw = 0; draw < draws; draw += 1) {
      const z = Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
      if (keeps((6 * z) / 1.8)) inside += 1;
    }
    // Four standard errors, and half a percent for what happens between the engine's full hours.
    const error = 4 * Math.sqrt((claimed * (1 - claimed)) / draws) + 0.005;
    expect(Math.abs(inside / draws - claimed)).toBeLessThan(error);
  });
});

describe('the clocks of a journey', () => {
  // Clock changes 2026-11-01 and 2027-03-14 (Energy Policy Act of 2005); Phoenix and Honolulu keep standard time.
  const clock = (atMs: number, timeZone: string) =>
    new Intl.DateTimeFormat('en-GB', { timeZone, hour: '2-digit', minute: '2-digit' }).format(atMs);
  const zones = ['America/New_York', 'America/Denver', 'America/Phoenix', 'Pacific/Honolulu'];
  const dates = ['2026-10-30', '2026-10-31', '2026-11-01', '2027-03-12', '2027-03-13', '2027-03-14'];

  it.each(zones.flatMap((zone) => dates.map((date) => [date, zone] as const)))(
    'on %s to %s end each leg at its local hour, planned and late, in order and without a gap',
    (shipDate, zone) => {
      const counter = sampleCounter(9, 'Far City', 'AZ', zone);
      const days = journeyLegs({ ...question, shipDate, destination: { kind: 'hold', counter } });
      const ends = Object.fromEntries(days.map(({ kind, endMs }) => [kind, endMs]));
      // The defaults of design 5.2, on the clock of each leg's place.
      expect(clock(ends['drop-off'] ?? 0, 'America/Chicago')).toBe('20:00');
      expect(clock(ends['linehaul-out'] ?? 0, 'America/Indiana/Indianapolis')).toBe('00:00');
      expect(clock(ends['hub'] ?? 0, 'America/Indiana/Indianapolis')).toBe('03:30');
      expect(clock(ends['linehaul-in'] ?? 0, zone)).toBe('06:30');
      expect(clock(ends['station'] ?? 0, zone)).toBe('09:00');
      expect(clock(ends['held'] ?? 0, zone)).toBe('11:00');
      for (const all of [
        days,
        ...(['hub', 'destination'] as const).map((where) =>
          lateLegs(days, where, defaultPolicy.journey.late),
        ),
      ]) {
        all.forEach((one, index) => {
          expect(one.endMs).toBeGreaterThanOrEqual(one.startMs);
          if (index > 0) expect(one.startMs).toBe(all[index - 1]?.endMs);
        });
      }
    },
  );

  it('make a night an hour longer in the fall and shorter in spring, but not on the way within Arizona', () => {
    const hours = (shipDate: string, zone: string) => {
      const there = sampleCounter(9, 'Far City', 'AZ', zone);
      const all = journeyLegs({
        ...question,
        shipDate,
        origin: there,
        destination: { kind: 'hold', counter: there },
      });
      return ((all.at(-1)?.endMs ?? 0) - (all[0]?.startMs ?? 0)) / hourMs;
    };
    const usual = hours('2026-10-29', 'America/Denver');
    expect(hours('2026-10-31', 'America/Denver')).toBe(usual + 1);
    expect(hours('2027-03-13', 'America/Denver')).toBe(usual - 1);
    for (const date of dates) expect(hours(date, 'America/Phoenix')).toBe(usual);
  });
});
