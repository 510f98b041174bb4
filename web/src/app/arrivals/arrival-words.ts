import type { Arrival } from '@shared/contract';
import { clock, dayLabel } from '../core/dates';

/** What stands large at the head of the buyer's page. */
export interface Headline {
  readonly lead: string;
  /** One or two lines in large type. */
  readonly large: readonly string[];
  readonly text: string;
}

/** The head of the page for an arrival as it stands; `viewerZone` decides whether a clock's zone has to be named. */
export function headline(arrival: Arrival, viewerZone?: string, nowYear?: number): Headline {
  const what = `Your ${withoutOne(arrival.what)} from ${arrival.breederName}`;
  switch (arrival.status) {
    case 'open':
      return {
        lead: what,
        large: ['No day yet'],
        text: 'The breeder looks for a day that is safe for the animal. Say below which mornings suit you.',
      };
    case 'on-hold':
      return {
        lead: what,
        large: ['On hold'],
        text: 'The day that was planned does not stand any more. You hear as soon as there is a new one; say below which mornings suit you.',
      };
    case 'cancelled':
      return {
        lead: what,
        large: ['Cancelled'],
        text: `Nothing is on its way. Ask ${arrival.breederName} about anything else.`,
      };
    case 'arrived':
      return {
        lead: what,
        large: ['Arrived'],
        text: arrival.report ? reportText(arrival.report.outcome) : 'It is noted as arrived.',
      };
    case 'planned':
      return {
        lead: `${what} ${verb(arrival.what)}`,
        large: dayLines(arrival.arrivalDate, nowYear),
        text: collectText(arrival, viewerZone),
      };
  }
}

/** "1 corn snake" reads "corn snake" in a sentence; more of them keep their number. */
const withoutOne = (what: string): string => (what.includes(',') ? what : what.replace(/^1 /, ''));
const verb = (what: string): string => (/^1 [^,]*$/.test(what) ? 'arrives' : 'arrive');

function dayLines(date: string | null, nowYear?: number): string[] {
  if (date === null) return ['Day to be told'];
  return [dayLabel(date, 'weekday', nowYear), dayLabel(date, 'long', nowYear).replace(/^[^,]*, /, '')];
}

function collectText(arrival: Arrival, viewerZone?: string): string {
  const { place, collectFrom, collectBy } = arrival;
  const at = (instant: string) => clock(instant, place.zone, 'auto', viewerZone);
  if (arrival.service === 'door')
    return `It comes to your door${collectBy ? ` by ${at(collectBy)}` : ''}. Somebody must be there to take it in.`;
  const from = collectFrom ? ` from ${at(collectFrom)}` : '';
  const by = collectBy ? ` Please come before ${at(collectBy)}: an animal should not wait in its box.` : '';
  return `Collect it at the ${place.name}${from}.${by}`;
}

const outcomes = {
  'arrived-well': 'It arrived well',
  'arrived-weak': 'It arrived, but weak',
  doa: 'It was dead on arrival',
  'not-arrived': 'It has not arrived',
} as const;

export type Outcome = keyof typeof outcomes;
export const outcomeChoices = Object.entries(outcomes) as [Outcome, string][];

export const reportText = (outcome: string): string =>
  outcome in outcomes
    ? `You reported: ${outcomes[outcome as Outcome].toLowerCase()}.`
    : 'You have reported the arrival.';

/** Whether the buyer can report now: it was handed over, and nothing final was said yet. */
export function canReport({ steps, report, status }: Arrival): boolean {
  const isOnItsWay = steps.some(({ key, state }) => key === 'handed-over' && state === 'done');
  return isOnItsWay && status !== 'cancelled' && (report === null || report.outcome === 'not-arrived');
}

/** One place of arrival in a line, for the list. */
export const statusWords: Readonly<Record<Arrival['status'], string>> = {
  open: 'no day yet',
  planned: 'planned',
  'on-hold': 'on hold',
  arrived: 'arrived',
  cancelled: 'cancelled',
};
