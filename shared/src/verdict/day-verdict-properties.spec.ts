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
