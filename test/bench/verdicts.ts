import { addDays } from '@shared/calendar/add-days';
import { blackoutCalendar } from '@shared/calendar/blackout-calendar';
import { judgeBox } from '@shared/thermal/judge-box';
import { normalCdf } from '@shared/thermal/chance';
import { packsToTry } from '@shared/verdict/checks/pack-check';
import { sigmaF } from '@shared/verdict/checks/rail-check';
import { dayFacts } from '@shared/verdict/day-facts';
import { stripDays } from '@shared/verdict/day-verdict';
import type { RouteQuestion } from '@shared/verdict/day-question';
import {
  cornSnake,
  sampleCounter,
  sampleForecast,
  sampleQuestion,
  texas,
} from '@shared/verdict/question-samples';
import type { BenchLine } from './bench-line';

const now = '2026-12-01T12:00:00.000Z';
const days = 14;
const places = 118;
const zones = [
  'America/New_York',
  'America/Chicago',
  'America/Denver',
  'America/Phoenix',
  'America/Los_Angeles',
];
const from = '2026-12-01';
const against = 'a bare typed-array loop of the same box steps, exponentials and chances';

/**
 * Verdicts of many parcels over fourteen days (`seconds`: calendar, rails, box, sentences), and of these the box alone
 * (`engineSeconds`: every pack, planned and late), each beside a bare loop that does the arithmetic of the box.
 */
export function verdicts(): Promise<BenchLine[]> {
  const lines: BenchLine[] = [];
  for (const size of [500, 2000, 8000]) {
    const questions = manyQuestions(size);
    const dates: string[][] = [];
    const started = performance.now();
    for (const question of questions)
      dates.push(
        stripDays(question, from, days).flatMap(({ date, chance }) => (chance === null ? [] : [date])),
      );
    const seconds = (performance.now() - started) / 1000;
    const megabytes = Math.round(process.memoryUsage().rss / 1e6);
    const { engine, works } = engineAlone(questions, dates);
    const bare = bareLoop(works);
    const line = (metric: string, value: number): BenchLine => ({
      bench: 'verdicts',
      size,
      metric,
      value: round(value),
      unit: 's',
      ratio: round(value / bare),
      against,
    });
    lines.push(line('seconds', seconds), line('engineSeconds', engine));
    lines.push({ bench: 'verdicts', size, metric: 'megabytes', value: megabytes, unit: 'MB' });
  }
  return Promise.resolve(lines);
}

/** What was worked out for one parcel and day: how many packs, through which journeys. */
interface Work {
  readonly packs: number;
  readonly journeys: readonly Float64Array[];
}

/** The box alone, on the days whose weather is known; what the checks find out before is not timed. */
function engineAlone(questions: readonly RouteQuestion[], dates: readonly string[][]) {
  const works: Work[] = [];
  let engine = 0;
  questions.forEach((question, index) => {
    const asks = (dates[index] ?? []).map((shipDate) => {
      const facts = dayFacts({ ...question, shipDate });
      return { question: facts, limits: facts.limits, packs: packsToTry(facts), sigmaF: sigmaF(facts) };
    });
    const started = performance.now();
    const judged = asks.map(judgeBox);
    engine += (performance.now() - started) / 1000;
    judged.forEach(({ nominal, late }, day) => {
      // The late way that is not kept is as long as the one that is.
      const journeys = late ? [nominal.atMs, late.run.atMs, late.run.atMs] : [nominal.atMs];
      works.push({ packs: asks[day]?.packs.length ?? 0, journeys });
    });
  });
  if (works.length < questions.length) throw new Error('Hardly a day has known weather.');
  return { engine, works };
}

function manyQuestions(size: number): RouteQuestion[] {
  const base = sampleQuestion({ now });
  const counters = Array.from({ length: places }, (_, index) =>
    sampleCounter(index + 10, `City ${index}`, 'AZ', zones[index % zones.length] ?? 'UTC'),
  );
  const weather = counters.map((counter, index) =>
    sampleForecast(counter.zone, now, 50, {
      at: (hour) => 45 + (index % 20) + 12 * Math.sin((Date.parse(hour) / 3_600_000 / 24) * 2 * Math.PI),
    }),
  );
  const calendar = blackoutCalendar([], addDays(from, -2), addDays(from, 60));
  return Array.from({ length: size }, (_, index): RouteQuestion => {
    const counter = counters[index % places] ?? texas;
    return {
      ...base,
      calendar,
      contents: [{ species: cornSnake, quantity: 1 + (index % 3), massG: 100 + (index % 7) * 50 }],
      destination: { kind: 'hold', counter },
      weather: { ...base.weather, destination: weather[index % places] ?? null },
    };
  });
}

/** Seconds that plain loops take for as many steps of the exact solution, responses, fits into a band and chances. */
function bareLoop(works: readonly Work[]): number {
  const air = Float64Array.from({ length: 512 }, (_, index) => 5 + Math.sin(index));
  const [temps, response, decays] = [new Float64Array(512), new Float64Array(512), new Float64Array(512)];
  const started = performance.now();
  let sum = 0;
  works.forEach(({ packs, journeys }, day) => {
    const tau = 2800 + (day % 7);
    for (const atMs of journeys) {
      const steps = atMs.length - 1;
      for (let step = 0; step < steps; step += 1) {
        const decay = Math.exp(((atMs[step] ?? 0) - (atMs[step + 1] ?? 0)) / 1000 / tau);
        decays[step] = decay;
        response[step + 1] = 0.5 + ((response[step] ?? 0) - 0.5) * decay;
      }
      for (let pack = 0; pack < packs; pack += 1) {
        let tempC = 23;
        let [least, most] = [-Infinity, Infinity];
        for (let step = 0; step < steps; step += 1) {
          const seconds = ((atMs[step + 1] ?? 0) - (atMs[step] ?? 0)) / 1000;
          const a = (air[(day + step) & 511] ?? 0) + pack;
          const slope = ((air[(day + step + 1) & 511] ?? 0) + pack - a) / seconds;
          tempC = a + slope * (seconds - tau) + (tempC - a + slope * tau) * (decays[step] ?? 0);
          temps[step + 1] = tempC;
          const felt = response[step + 1] ?? 1;
          least = Math.max(least, (15 - tempC) / felt);
          most = Math.min(most, (30 - tempC) / felt);
        }
        sum += normalCdf(most / 4) - normalCdf(least / 4) + (temps[steps] ?? 0);
      }
    }
  });
  if (!Number.isFinite(sum)) throw new Error('The bare loop went astray.');
  return (performance.now() - started) / 1000;
}

const round = (value: number): number => Math.round(value * 1000) / 1000;
