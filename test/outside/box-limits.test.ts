import fc from 'fast-check';
import { boxModel } from '@shared/thermal/box-model';
import { chanceInBand } from '@shared/thermal/chance';
import { judgeBox } from '@shared/thermal/judge-box';
import { outdoorHours } from '@shared/thermal/outdoor-hours';
import type { BoxRun } from '@shared/thermal/simulate';
import { contentsLimits } from '@shared/verdict/contents-limits';
import { cornSnake, sampleForecast, sampleQuestion } from '@shared/verdict/question-samples';
import { air, constants, leg, run, small, startMs, toC } from '../support/box-samples';

describe('whatever the weather', () => {
  const temps = fc.array(fc.integer({ min: -10, max: 110 }), { minLength: 49, maxLength: 49 });
  const any = { model: boxModel(small, 160, constants) };
  const of = (values: readonly number[], model = any.model, exposure = 0.5) =>
    run(
      model,
      [leg(48, { exposure })],
      air((hour) => values[hour] ?? 0, 49),
      75,
    );
  const swing = ({ tempF }: BoxRun) => Math.max(...tempF.slice(10)) - Math.min(...tempF.slice(10));

  it('warmer outdoors never gives a colder box', () => {
    fc.assert(
      fc.property(temps, fc.integer({ min: 0, max: 30 }), (values, more) => {
        const [cool, warm] = [of(values), of(values.map((value) => value + more))];
        warm.tempF.forEach((tempF, point) =>
          expect(tempF).toBeGreaterThanOrEqual((cool.tempF[point] ?? 0) - 1e-9),
        );
      }),
      { numRuns: 50 },
    );
  });

  it('more foam never gives a wider swing, and a box never leaves the range of the air round it', () => {
    fc.assert(
      fc.property(temps, (values) => {
        const thick = boxModel({ ...small, foamIn: 1.5 }, 160, constants);
        expect(swing(of(values, thick))).toBeLessThanOrEqual(swing(of(values)) + 1e-9);
        const around = [75, ...values.map((value) => 0.5 * value + 35)];
        for (const tempF of of(values).tempF) {
          expect(tempF).toBeGreaterThanOrEqual(Math.min(...around) - 1e-9);
          expect(tempF).toBeLessThanOrEqual(Math.max(...around) + 1e-9);
        }
      }),
      { numRuns: 50 },
    );
  });

  it('a wider band never lowers the chance, and more doubt never raises it when the run is in the middle', () => {
    fc.assert(
      fc.property(
        temps,
        fc.integer({ min: 40, max: 70 }),
        fc.integer({ min: 5, max: 40 }),
        (values, lowF, width) => {
          const box = of(values);
          const narrow = chanceInBand(box, { lowF, highF: lowF + width }, 4);
          expect(chanceInBand(box, { lowF: lowF - 3, highF: lowF + width + 3 }, 4)).toBeGreaterThanOrEqual(
            narrow - 1e-12,
          );
          const middle = { tempF: Float64Array.of(70, 70), response: Float64Array.of(0.4, 0.4) };
          expect(chanceInBand(middle, { lowF: 70 - width, highF: 70 + width }, 6)).toBeLessThanOrEqual(
            chanceInBand(middle, { lowF: 70 - width, highF: 70 + width }, 4),
          );
        },
      ),
      { numRuns: 50 },
    );
  });

  it('holding at a counter is never worse than the door in cold air (common practice, no source)', () => {
    fc.assert(
      fc.property(fc.integer({ min: 20, max: 60 }), (tempF) => {
        const weather = {
          origin: sampleForecast('UTC', '2026-12-01T12:00:00.000Z', 60),
          hub: sampleForecast('UTC', '2026-12-01T12:00:00.000Z', 50),
          destination: sampleForecast('UTC', '2026-12-01T12:00:00.000Z', tempF),
        };
        const hold = sampleQuestion({ weather });
        const door = {
          ...hold,
          service: 'door' as const,
          destination: {
            kind: 'door' as const,
            door: { name: 'the door', city: 'Phoenix', state: 'AZ', zone: 'America/Phoenix' },
          },
        };
        const chance = (question: typeof hold) =>
          judgeBox({ question, limits: contentsLimits(question.contents), packs: ['heat-72'], sigmaF: 3.8 })
            .chance;
        expect(chance(hold)).toBeGreaterThanOrEqual(chance(door) - 1e-9);
      }),
      { numRuns: 30 },
    );
  });
});

describe('what cannot be worked with', () => {
  const code = (work: () => unknown): string => {
    try {
      work();
      return 'nothing was wrong';
    } catch (error) {
      return (error as { code: string }).code;
    }
  };
  const model = boxModel(small, 160, constants);

  it.each<[string, () => unknown]>([
    [
      'empty-band',
      () =>
        chanceInBand(
          run(
            model,
            [leg(2)],
            air(() => 70),
            75,
          ),
          { lowF: 80, highF: 60 },
          4,
        ),
    ],
    ['bad-mass', () => boxModel(small, -1, constants)],
    ['bad-mass', () => boxModel(small, NaN, constants)],
    ['bad-box', () => boxModel({ ...small, foamIn: 3 }, 100, constants)],
    [
      'bad-leg',
      () =>
        run(
          model,
          [leg(-1)],
          air(() => 70),
          75,
        ),
    ],
    [
      'no-forecast',
      () =>
        run(
          model,
          [leg(500)],
          air(() => 70),
          75,
        ),
    ],
    ['bad-forecast', () => air((hour) => (hour === 5 ? Infinity : 70))],
  ])('has a typed error: %s', (expected, work) => {
    expect(code(work)).toBe(expected);
  });

  it('is not a gap of three hours, which is bridged in a straight line, but one of four', () => {
    const gap = (hours: number) =>
      outdoorHours({
        ...sampleForecast('UTC', '2026-12-02T12:00:00Z', 70),
        startMs,
        tempsF: Array.from({ length: 49 }, (_, hour) => (hour > 5 && hour <= 5 + hours ? null : hour)),
      });
    expect(toC(8)).toBeCloseTo(gap(3).tempsC[8] ?? NaN, 9);
    expect(code(() => run(model, [leg(24)], gap(4), 75))).toBe('no-forecast');
    expect(code(() => run(model, [leg(24)], gap(3), 75))).toBe('nothing was wrong');
  });

  it('names the corn snake’s own band in the shipping question, so that the sample stays what it says', () => {
    expect([cornSnake.bandLowF, cornSnake.bandHighF]).toEqual([60, 86]);
  });
});
