import { addDays } from '@shared/calendar/add-days';
import { blackoutCalendar } from '@shared/calendar/blackout-calendar';
import type { OutdoorForecast } from '@shared/forecast/outdoor-forecast';
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
 * (`engineSeconds`: every pack, planned and late), each beside a bare loop that does the arithmetic of the box. The three
 * take turns parcel by parcel, so that nothing has to be kept from one to the next.
 */
export function verdicts(): Promise<BenchLine[]> {
  const lines: BenchLine[] = [];
  for (const size of [500, 2000, 8000]) {
    const spent = { strip: 0, engine: 0, bare: 0 };
    const bare = bareLoop();
    let judgedDays = 0;
    for (const question of manyQuestions(size)) {
      const started = performance.now();
      const strip = stripDays(question, from, days);
      spent.strip += performance.now() - started;
      const dates = strip.flatMap(({ date, chance }) => (chance === null ? [] : [date]));
      const { engineMs, works } = engineAlone(question, dates);
      spent.engine += engineMs;
      spent.bare += bare(works);
      judgedDays += works.length;
    }
    if (judgedDays < size * days) throw new Error('Not every day was judged with its weather.');
    const line = (metric: string, ms: number): BenchLine => ({
      bench: 'verdicts',
      size,
      metric,
      value: round(ms / 1000),
      unit: 's',
      ratio: round(ms / spent.bare),
      against,
    });
    const megabytes = Math.round(process.memoryUsage().rss / 1e6);
    lines.push(line('seconds', spent.strip), line('engineSeconds', spent.engine));
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
function engineAlone(question: RouteQuestion, dates: readonly string[]) {
  const asks = dates.map((shipDate) => {
    const facts = dayFacts({ ...question, shipDate });
    return { question: facts, limits: facts.limits, packs: packsToTry(facts), sigmaF: sigmaF(facts) };
  });
  const started = performance.now();
  const judged = asks.map(judgeBox);
  const engineMs = performance.now() - started;
  const works = judged.map(({ nominal, late }, day): Work => {
    // The late way that is not kept is as long as the one that is.
    const journeys = late ? [nominal.atMs, late.run.atMs, late.run.atMs] : [nominal.atMs];
    return { packs: asks[day]?.packs.length ?? 0, journeys };
  });
  return { engineMs, works };
}

function manyQuestions(size: number): RouteQuestion[] {
  const base = sampleQuestion({ now });
  const counters = Array.from({ length: places }, (_, index) =>
    sampleCounter(index + 10, `City ${index}`, 'AZ', zones[index % zones.length] ?? 'UTC'),
  );
  const weather = counters.map((counter, index) => longForecast(counter.zone, 45 + (index % 20)));
  const [origin, hub] = [longForecast(base.origin.zone, 55), longForecast(base.hub.zone, 50)];
  const calendar = blackoutCalendar([], addDays(from, -2), addDays(from, 60));
  return Array.from({ length: size }, (_, index): RouteQuestion => {
    const counter = counters[index % places] ?? texas;
    return {
      ...base,
      calendar,
      contents: [{ species: cornSnake, quantity: 1 + (index % 3), massG: 100 + (index % 7) * 50 }],
      destination: { kind: 'hold', counter },
      weather: { origin, hub, destination: weather[index % places] ?? null },
    };
  });
}

/** Hourly weather for all the days and the late case after them: twice as far as a real forecast reaches. */
function longForecast(zone: string, meanF: number): OutdoorForecast {
  const short = sampleForecast(zone, now, meanF);
  const tempsF = Array.from(
    { length: 24 * (days + 4) },
    (_, hour) => meanF + 12 * Math.sin((hour / 24) * 2 * Math.PI),
  );
  return { ...short, tempsF };
}

/** Milliseconds that plain loops take for as many steps of the exact solution, responses, fits into a band and chances. */
function bareLoop(): (works: readonly Work[]) => number {
  const air = Float64Array.from({ length: 512 }, (_, index) => 5 + Math.sin(index));
  const [temps, response, decays] = [new Float64Array(512), new Float64Array(512), new Float64Array(512)];
  return (works) => {
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
    return performance.now() - started;
  };
}

const round = (value: number): number => Math.round(value * 1000) / 1000;
