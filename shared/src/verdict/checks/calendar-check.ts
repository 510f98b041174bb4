import { dayOff } from '../../calendar/is-working-day';
import { nextWorkingDay } from '../../calendar/next-working-day';
import type { DayFacts } from '../day-facts';
import type { DraftReason } from '../draft-reason';

const titleOf = (off: NonNullable<ReturnType<typeof dayOff>>) => (off.why === 'blackout' ? off.title : null);

/** The carrier's days: drop-off and cut-off on the ship day, the arrival on a working day, slack behind it (design 5.1). */
export function calendarCheck(facts: DayFacts): DraftReason[] {
  const found: DraftReason[] = [];
  const shut = (code: string, values: DraftReason['values']) => found.push({ code, verdict: 'shut', values });
  if (facts.leadDays < 0) shut('past', {});
  if (facts.leadDays > facts.policy.horizonDays) shut('beyond-offer', { days: facts.policy.horizonDays });
  const originOff = dayOff(facts.originWork, facts.shipDate, facts.calendar);
  if (originOff)
    shut('origin-closed', { place: facts.origin.name, date: facts.shipDate, title: titleOf(originOff) });
  else if (facts.cutOffMs === null)
    shut('origin-closed', { place: facts.origin.name, date: facts.shipDate, title: null });
  else if (facts.leadDays >= 0 && facts.cutOffMs <= facts.nowMs)
    shut('cut-off-passed', { place: facts.origin.name });
  const arrivalOff = dayOff(facts.destinationWork, facts.arrivalDate, facts.calendar);
  if (arrivalOff)
    shut('arrival-closed', {
      place: facts.destinationName,
      date: facts.arrivalDate,
      title: titleOf(arrivalOff),
    });
  else found.push(slack(facts));
  return found;
}

function slack(facts: DayFacts): DraftReason {
  const { slackDays, policy } = facts;
  if (slackDays > 0 && slackDays >= policy.minSlackDays)
    return { code: 'slack', verdict: 'open', values: { days: slackDays } };
  const verdict = slackDays < policy.minSlackDays ? 'shut' : 'tight';
  const next = nextWorkingDay(facts.destinationWork, facts.arrivalDate, facts.calendar);
  return { code: 'no-slack', verdict, values: { place: facts.destinationName, days: slackDays, next } };
}
