import fc from 'fast-check';
import type { DayVerdict } from '../contract/days';
import type { BlackoutRule } from '../calendar/blackout-calendar';
import { defaultPolicy } from '../policy/policy';
import { dayVerdict } from './day-verdict';
import { cornSnake, sampleForecast, sampleQuestion } from './question-samples';
import { verdictSeverity, worstVerdict } from './worst-verdict';

const ask = (changes: Parameters<typeof sampleQuestion>[0] = {}): DayVerdict =>
  dayVerdict(sampleQuestion(changes));
const blackout = (startDate: string, changes: Partial<BlackoutRule> = {}): BlackoutRule => ({
  title: 'Inventory day',
  kind: 'date',
  startDate,
  endDate: null,
  rules: null,
  liftedDates: [],
  scope: 'everywhere',
  carrierId: null,
  state: null,
  counterId: null,
  ...changes,
});

describe('any question', () => {
  const band = fc.tuple(fc.integer({ min: 40, max: 70 }), fc.integer({ min: 10, max: 40 }));
  const question = fc
    .record({
      ahead: fc.integer({ min: -2, max: 16 }),
      originF: fc.integer({ min: -10, max: 110 }),
      hubF: fc.integer({ min: -10, max: 110 }),
      destinationF: fc.integer({ min: -10, max: 110 }),
      ageHours: fc.integer({ min: 0, max: 20 }),
      limits: band,
      slack: fc.integer({ min: 0, max: 2 }),
    })
    .map(({ ahead, originF, hubF, destinationF, ageHours, limits: [low, width], slack }) => {
      const now = '2026-12-01T12:00:00.000Z';
      const issuedAt = new Date(Date.parse(now) - ageHours * 3_600_000).toISOString();
      const weather = (zone: string, tempF: number) => sampleForecast(zone, now, tempF, { issuedAt });
      return {
        now,
        shipDate: new Date(Date.parse(now) + ahead * 86_400_000).toISOString().slice(0, 10),
        contents: [
          { species: { ...cornSnake, outdoorLowF: low, outdoorHighF: low + width }, quantity: 1, massG: 160 },
        ],
        policy: { ...defaultPolicy, minSlackDays: slack },
        weather: {
          origin: weather('America/Chicago', originF),
          hub: weather('America/Indiana/Indianapolis', hubF),
          destination: weather('America/Phoenix', destinationF),
        },
      };
    });

  it('has the worst of its reasons for a verdict, and says each in a whole sentence', () => {
    fc.assert(
      fc.property(question, (changes) => {
        const day = ask(changes);
        expect(day.verdict).toBe(worstVerdict(day.reasons.map(({ verdict }) => verdict)));
        for (const reason of day.reasons) expect(reason.text).toMatch(/^[A-Z].*\.$/);
        expect(day.reasons.map(({ text }) => text).join(' ')).not.toMatch(/undefined|NaN|null|Invalid/);
      }),
    );
  });

  it('never gets better by a blackout, by narrower limits of a species, or by an older forecast', () => {
    fc.assert(
      fc.property(question, fc.integer({ min: 0, max: 3 }), (changes, after) => {
        const before = verdictSeverity(ask(changes).verdict);
        const date = new Date(Date.parse(`${changes.shipDate}T12:00:00Z`) + after * 86_400_000)
          .toISOString()
          .slice(0, 10);
        expect(
          verdictSeverity(ask({ ...changes, blackouts: [blackout(date)] }).verdict),
        ).toBeGreaterThanOrEqual(before);
        const narrower = changes.contents.map((line) => ({
          ...line,
          species: {
            ...line.species,
            outdoorLowF: line.species.outdoorLowF + 3,
            outdoorHighF: line.species.outdoorHighF - 3,
          },
        }));
        expect(verdictSeverity(ask({ ...changes, contents: narrower }).verdict)).toBeGreaterThanOrEqual(
          before,
        );
        const older = {
          ...changes.weather,
          hub: { ...changes.weather.hub, issuedAt: '2026-11-30T00:00:00.000Z' },
        };
        expect(verdictSeverity(ask({ ...changes, weather: older }).verdict)).toBeGreaterThanOrEqual(before);
      }),
    );
  });

  it('never gets worse by a wider band or by wider endurance of the animal', () => {
    const room = fc.integer({ min: 0, max: 15 });
    const animal = fc.record({
      lowF: fc.integer({ min: 40, max: 70 }),
      width: fc.integer({ min: 5, max: 40 }),
      under: room,
      over: room,
    });
    const more = fc.record({ low: room, high: room, enduresLow: room, enduresHigh: room });
    // Weather within the guard rails, so that the box decides.
    const now = '2026-12-01T12:00:00.000Z';
    const inside = fc.integer({ min: 45, max: 84 });
    fc.assert(
      fc.property(inside, inside, animal, more, (nearF, farF, { lowF, width, under, over }, wider) => {
        const weather = {
          ...sampleQuestion().weather,
          origin: sampleForecast('America/Chicago', now, nearF),
          destination: sampleForecast('America/Phoenix', now, farF),
        };
        const box = (by: typeof wider) => {
          const bandLowF = lowF - by.low;
          const bandHighF = lowF + width + by.high;
          const species = {
            ...cornSnake,
            bandLowF,
            bandHighF,
            enduranceLowF: bandLowF - under - by.enduresLow,
            enduranceHighF: bandHighF + over + by.enduresHigh,
          };
          return [{ species, quantity: 1, massG: 160 }];
        };
        const narrow = ask({ weather, contents: box({ low: 0, high: 0, enduresLow: 0, enduresHigh: 0 }) });
        const wide = ask({ weather, contents: box(wider) });
        expect(verdictSeverity(wide.verdict)).toBeLessThanOrEqual(verdictSeverity(narrow.verdict));
      }),
      { numRuns: 300 },
    );
  });

  it('is shut beyond the guard rails, and no degree further out ever opens it again', () => {
    const { lowF, highF } = defaultPolicy.guardRails.hold;
    const beyond = fc.tuple(
      fc.constantFrom('origin', 'destination'),
      fc.boolean(),
      fc.integer({ min: 1, max: 60 }),
    );
    const hardy = { ...cornSnake, bandLowF: -90, bandHighF: 190, enduranceLowF: -95, enduranceHighF: 195 };
    fc.assert(
      fc.property(beyond, ([place, isCold, byF]) => {
        const now = '2026-12-01T12:00:00.000Z';
        const tempF = isCold ? lowF - byF : highF + byF;
        const weather = {
          ...sampleQuestion().weather,
          [place]: sampleForecast(place === 'origin' ? 'America/Chicago' : 'America/Phoenix', now, tempF),
        };
        const day = ask({ weather, contents: [{ species: hardy, quantity: 1, massG: 160 }] });
        expect(day.verdict).toBe('shut');
      }),
    );
  });

  it('gets the same answer twice, and is not changed by being asked', () => {
    fc.assert(
      fc.property(question, (changes) => {
        const asked = deepFreeze(sampleQuestion(changes));
        expect(dayVerdict(asked)).toEqual(dayVerdict(asked));
      }),
      { numRuns: 30 },
    );
  });
});

function deepFreeze<T>(value: T): T {
  if (value !== null && typeof value === 'object' && !(value instanceof Map)) {
    Object.freeze(value);
    Object.values(value).forEach(deepFreeze);
  }
  return value;
}
