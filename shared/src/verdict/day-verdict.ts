import type { DayVerdict } from '../contract/days';
import { addDays } from '../calendar/add-days';
import { alertCheck } from './checks/alert-check';
import { calendarCheck } from './checks/calendar-check';
import { forecastCheck } from './checks/forecast-check';
import { packCheck, packOf } from './checks/pack-check';
import { railCheck } from './checks/rail-check';
import { readinessCheck } from './checks/readiness-check';
import { dayFacts, type DayFacts } from './day-facts';
import type { DayQuestion, RouteQuestion } from './day-question';
import { worded, type Check } from './draft-reason';
import { verdictSeverity, worstVerdict } from './worst-verdict';

/** Every look at a day. A further one only ever makes a day worse: the verdict is the worst of them all. */
const checks: readonly Check<DayFacts>[] = [
  calendarCheck,
  readinessCheck,
  forecastCheck,
  alertCheck,
  railCheck,
  packCheck,
];

/**
 * The verdict of one ship day with its reasons, worst first (design 5.5). Pure: the same question, the same answer.
 * Throws RangeError when the blackout calendar does not reach far enough.
 */
export function dayVerdict(question: DayQuestion): DayVerdict {
  const facts = dayFacts(question);
  const drafts = checks.flatMap((check) => check(facts));
  const verdict = worstVerdict(drafts.map((reason) => reason.verdict));
  const reasons = drafts
    .toSorted((a, b) => verdictSeverity(b.verdict) - verdictSeverity(a.verdict))
    .map(worded);
  const issued = facts.places.flatMap((place) => (place.weather ? [place.weather.issuedMs] : []));
  return {
    date: facts.shipDate,
    verdict,
    chance: null,
    lateChance: null,
    slackDays: facts.slackDays,
    pack: packOf(facts),
    arrival: {
      at: new Date(facts.arrivalAtMs).toISOString(),
      place: facts.destinationName,
      zone: facts.destinationZone,
    },
    outdoor: facts.outdoor,
    inBox: null,
    reasons,
    leadDays: facts.leadDays,
    forecastAt: issued.length > 0 ? new Date(Math.min(...issued)).toISOString() : null,
    run: null,
  };
}

/** The strip: one verdict a day from `from`. */
export const stripDays = (question: RouteQuestion, from: string, days: number): DayVerdict[] =>
  Array.from({ length: days }, (_, index) => dayVerdict({ ...question, shipDate: addDays(from, index) }));
