import type { DaysAnswer, DayVerdict, Verdict } from '@shared/contract';
import { dayLabel } from '../core/dates';
import { chanceText } from '../ui/chance-text';

/** What the summary is about, in words: `1 corn snake, held for pickup`. */
export interface SummaryHead {
  readonly contents: string;
  readonly service: 'hold' | 'door';
}

const joined = new Intl.ListFormat('en-US', { style: 'long', type: 'conjunction' });

/**
 * A short plain text to send to a buyer: the route, the days by verdict and who has the last word. Days that are not
 * offered are counted, not listed.
 */
export function summaryText(answer: Pick<DaysAnswer, 'days' | 'route'>, head: SummaryHead): string {
  const { route, days } = answer;
  const held =
    head.service === 'hold' ? `held for pickup at the ${route.destination}` : `to ${route.destination}`;
  const lines = [
    `${head.contents}, ${held}, from the ${route.origin}.`,
    line(days, 'open', 'Open days'),
    line(days, 'tight', 'Tight days (little room)'),
    line(days, 'far', 'Too far off for a forecast yet'),
    shutLine(days),
    firstDayLine(days),
    "By today's forecast; it can change. The carrier's terms, local law and a veterinarian come first.",
  ];
  return lines.filter((text) => text !== '').join('\n');
}

/** How the days turned out, in a sentence for the page: `3 open, 1 tight, 8 shut, 2 far. First open day: …`. */
export function countText(days: readonly DayVerdict[]): string {
  const counts = (['open', 'tight', 'shut', 'far'] as const)
    .map((verdict) => ({ verdict, count: of(days, verdict).length }))
    .filter(({ count }) => count > 0)
    .map(({ verdict, count }) => `${count} ${verdict}`);
  const [first] = of(days, 'open');
  const [second] = of(days, 'tight');
  const best = first
    ? ` The first open day is ${dayLabel(first.date)}.`
    : second
      ? ` No day is open; the first tight one is ${dayLabel(second.date)}.`
      : ' None of them can be offered yet.';
  return `${joined.format(counts)}.${best}`;
}

const of = (days: readonly DayVerdict[], verdict: Verdict) => days.filter((day) => day.verdict === verdict);

function line(days: readonly DayVerdict[], verdict: Verdict, words: string): string {
  const found = of(days, verdict);
  return found.length === 0
    ? ''
    : `${words}: ${found.map((day) => dayLabel(day.date, 'medium')).join('; ')}.`;
}

const packWords: Readonly<Record<DayVerdict['pack'], string>> = {
  none: 'no pack',
  'heat-40': 'a 40-hour heat pack',
  'heat-72': 'a 72-hour heat pack',
  cold: 'a cold pack',
};

/** What goes into the box on the first day that is offered, and how sure that day is. */
function firstDayLine(days: readonly DayVerdict[]): string {
  const day = of(days, 'open')[0] ?? of(days, 'tight')[0];
  if (!day || day.chance === null) return '';
  return `On ${dayLabel(day.date, 'medium')} it travels with ${packWords[day.pack]}: safe ${chanceText(day.chance)}.`;
}

function shutLine(days: readonly DayVerdict[]): string {
  const count = of(days, 'shut').length;
  if (count === 0) return '';
  return count === days.length
    ? 'None of these days is offered.'
    : `The other ${count} of the ${days.length} days are not offered.`;
}
