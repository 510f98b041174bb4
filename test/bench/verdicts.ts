import { addDays } from '@shared/calendar/add-days';
import { blackoutCalendar } from '@shared/calendar/blackout-calendar';
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
/** Steps of a planned journey of 24 h and of the two late ones of 48 h, each for two packs: what the bare loop does. */
const stepsOfADay = 2 * (27 + 2 * 51);

/** Verdicts of many parcels over fourteen days, beside a bare typed-array loop over as many exponential steps. */
export function verdicts(): Promise<BenchLine[]> {
  const lines: BenchLine[] = [];
  for (const size of [500, 2000, 8000]) {
    const questions = manyQuestions(size);
    const started = performance.now();
    let judged = 0;
    for (const question of questions) judged += stripDays(question, '2026-12-01', days).length;
    const seconds = (performance.now() - started) / 1000;
    if (judged !== size * days) throw new Error('Some days were not judged.');
    const bare = bareLoop(size);
    lines.push({
      bench: 'verdicts',
      size,
      metric: 'seconds',
      value: round(seconds),
      unit: 's',
      ratio: round(seconds / bare),
      against: 'a bare typed-array loop of as many box steps',
    });
    lines.push({
      bench: 'verdicts',
      size,
      metric: 'megabytes',
      value: Math.round(process.memoryUsage().rss / 1e6),
      unit: 'MB',
    });
  }
  return Promise.resolve(lines);
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
  const calendar = blackoutCalendar([], addDays('2026-12-01', -2), addDays('2026-12-01', 60));
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

/** Seconds that a plain loop takes for the same number of steps of the exact solution. */
function bareLoop(size: number): number {
  const air = Float64Array.from({ length: 512 }, (_, index) => 5 + Math.sin(index));
  const out = new Float64Array(stepsOfADay);
  const started = performance.now();
  let sum = 0;
  // Days beyond the forecast have no journey: about half of the fourteen.
  for (let day = 0; day < size * (days / 2); day += 1) {
    let tempC = 23;
    const tau = 2800 + (day % 7);
    for (let step = 0; step < stepsOfADay; step += 1) {
      const from = air[(day + step) & 511] ?? 0;
      const slope = ((air[(day + step + 1) & 511] ?? 0) - from) / 3600;
      tempC = from + slope * (3600 - tau) + (tempC - from + slope * tau) * Math.exp(-3600 / tau);
      out[step] = tempC;
    }
    sum += out[stepsOfADay - 1] ?? 0;
  }
  if (!Number.isFinite(sum)) throw new Error('The bare loop went astray.');
  return (performance.now() - started) / 1000;
}

const round = (value: number): number => Math.round(value * 1000) / 1000;
