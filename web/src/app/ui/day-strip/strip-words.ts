import type { DayVerdict, Reason, TemperatureUnit } from '@shared/contract';
import { dayLabel } from '../../core/dates';
import { rangeText } from '../../core/temperature';
import { chanceText } from '../chance-text';

/** Two or three words for a reason's code, for the foot of a column; what is not listed shows no words there. */
const short: Readonly<Record<string, string>> = {
  past: 'over',
  'beyond-offer': 'too far ahead',
  'origin-closed': 'no drop-off',
  'cut-off-passed': 'cut-off passed',
  'arrival-closed': 'no arrival',
  'no-slack': 'no slack day',
  'not-ready': 'not ready',
  'too-late': 'too late',
  'fed-lately': 'fed lately',
  'breeder-away': 'breeder away',
  'buyer-away': 'buyer away',
  'buyer-not-said': 'not a named morning',
  'too-cold': 'too cold',
  'too-hot': 'too hot',
  'near-cold': 'nearly too cold',
  'near-hot': 'nearly too hot',
  alert: 'weather alert',
  'alerts-unknown': 'alerts unknown',
  'no-forecast': 'no forecast',
  'forecast-old': 'old forecast',
  'pack-short': 'pack too short',
  'late-unknown': 'late case unknown',
};

/** The two looks into the box say which side is short of room. */
function shortOf({ code, values }: Reason): string | undefined {
  if (code === 'box') return values['side'] === 'low' ? 'cold in the box' : 'hot in the box';
  if (code === 'box-late') return values['side'] === 'low' ? 'cold when late' : 'hot when late';
  return short[code];
}

/** The reason that decided a verdict: the first of its own class. */
export const decidingReason = (day: DayVerdict): Reason | null =>
  day.reasons.find((reason) => reason.verdict === day.verdict) ?? null;

/** Why, in two or three words; empty for an open day and for a reason without short words. */
export function shortWhy(day: DayVerdict): string {
  if (day.verdict === 'open') return '';
  const own = day.reasons.filter((reason) => reason.verdict === day.verdict);
  return own.map(shortOf).find((words) => words !== undefined) ?? '';
}

/** What is left in the run that goes that day: `18 L left`, `full`, or empty without a run. */
export function roomText(day: DayVerdict): string {
  if (!day.run) return '';
  const litres = Math.floor(day.run.roomL);
  return litres > 0 ? `${litres} L left` : 'full';
}

/** The numbers of a day in a sentence, for the tooltip and for who cannot see the bars. */
export function dayNumbers(day: DayVerdict, unit: TemperatureUnit): string {
  const parts = [
    day.outdoor && day.verdict !== 'far' ? `Outdoors ${rangeText(day.outdoor, unit)}.` : '',
    day.inBox && day.verdict !== 'far' ? `In the box ${rangeText(day.inBox, unit)}.` : '',
    day.chance !== null && isOffered(day) ? `Safe ${chanceText(day.chance)}.` : '',
    shortWhy(day) ? `${capital(shortWhy(day))}.` : '',
    day.run ? `A run goes, ${roomText(day)}.` : '',
  ];
  return parts.filter(Boolean).join(' ') || 'No forecast for this day yet.';
}

/** Whether a day can be booked on its weather; of others no chance is told beside the verdict. */
export const isOffered = ({ verdict }: DayVerdict): boolean => verdict === 'open' || verdict === 'tight';

/** `Tuesday, December 8: open`. */
export const dayName = (day: DayVerdict): string => `${dayLabel(day.date)}: ${day.verdict}`;

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
