import type { DayVerdict, RangeF } from '../contract/days';
import { addDays } from '../calendar/add-days';
import { boxTrace } from '../thermal/box-trace';
import { judgeBox, type BoxJudgement } from '../thermal/judge-box';
import { ThermalError } from '../thermal/thermal-error';
import { alertCheck } from './checks/alert-check';
import { boxCheck } from './checks/box-check';
import { calendarCheck } from './checks/calendar-check';
import { coverageOf } from './checks/coverage';
import { forecastCheck } from './checks/forecast-check';
import { packReasons, packsToTry } from './checks/pack-check';
import { railCheck, sigmaF } from './checks/rail-check';
import { readinessCheck } from './checks/readiness-check';
import { dayFacts, type DayFacts } from './day-facts';
import type { DayQuestion, RouteQuestion } from './day-question';
import { worded, type Check } from './draft-reason';
import { verdictSeverity, worstVerdict } from './worst-verdict';

/** Every look at a day but the one into the box. A further one only ever makes a day worse: the verdict is the worst of all. */
const checks: readonly Check<DayFacts>[] = [
  calendarCheck,
  readinessCheck,
  forecastCheck,
  alertCheck,
  railCheck,
];

export interface VerdictOptions {
  /** Whether the air in the box is told hour by hour. */
  readonly trace?: boolean;
}

/**
 * The verdict of one ship day with its reasons, worst first (design 5.5). Pure: the same question, the same answer.
 * Throws RangeError when the blackout calendar does not reach far enough, ThermalError for a box or journey that cannot be.
 */
export function dayVerdict(question: DayQuestion, options: VerdictOptions = {}): DayVerdict {
  const facts = dayFacts(question);
  const judged = lookIntoBox(facts);
  const drafts = [
    ...checks.flatMap((check) => check(facts)),
    ...(judged ? [...boxCheck(facts, judged), ...packReasons(facts, judged.pack)] : []),
  ];
  const reasons = drafts
    .toSorted((a, b) => verdictSeverity(b.verdict) - verdictSeverity(a.verdict))
    .map(worded);
  const issued = facts.places.flatMap((place) => (place.weather ? [place.weather.issuedMs] : []));
  return {
    date: facts.shipDate,
    verdict: worstVerdict(drafts.map((reason) => reason.verdict)),
    chance: judged ? rounded(judged.chance) : null,
    lateChance: judged?.late ? rounded(judged.late.chance) : null,
    slackDays: facts.slackDays,
    pack: judged?.pack ?? 'none',
    arrival: {
      at: new Date(facts.arrivalAtMs).toISOString(),
      place: facts.destinationName,
      zone: facts.destinationZone,
    },
    outdoor: facts.outdoor,
    inBox: judged ? tenths(judged.inBox) : null,
    reasons,
    leadDays: facts.leadDays,
    forecastAt: issued.length > 0 ? new Date(Math.min(...issued)).toISOString() : null,
    run: null,
    ...(options.trace && judged ? { trace: traceOf(facts, judged) } : {}),
  };
}

/** Null where the weather of the route is not known: then the forecast's own reason stands. */
function lookIntoBox(facts: DayFacts): BoxJudgement | null {
  if (facts.places.some((place) => coverageOf(facts, place) !== 'known')) return null;
  try {
    return judgeBox({
      question: facts,
      limits: facts.limits,
      packs: packsToTry(facts),
      sigmaF: sigmaF(facts),
    });
  } catch (error) {
    // A day whose beginning lies before the forecast: its hours are over, and so is the day.
    if (error instanceof ThermalError && error.code === 'no-forecast') return null;
    throw error;
  }
}

function traceOf(facts: DayFacts, judged: BoxJudgement): NonNullable<DayVerdict['trace']> {
  return boxTrace(
    judged,
    sigmaF(facts),
    (role) => facts.places.find((place) => place.role === role) ?? facts.origin,
  );
}

const rounded = (chance: number): number => Math.round(Math.min(1, Math.max(0, chance)) * 10_000) / 10_000;
const tenths = ({ lowF, highF }: RangeF): RangeF => ({
  lowF: Math.round(lowF * 10) / 10,
  highF: Math.round(highF * 10) / 10,
});

/** The strip: one verdict a day from `from`. */
export const stripDays = (
  question: RouteQuestion,
  from: string,
  days: number,
  options: VerdictOptions = {},
): DayVerdict[] =>
  Array.from({ length: days }, (_, index) =>
    dayVerdict({ ...question, shipDate: addDays(from, index) }, options),
  );
