import { DateTime } from 'luxon';
import type { Reason } from '../contract/days';
import { chanceText } from './chance-text';

type Values = Reason['values'];
type Draft = Omit<Reason, 'text'>;

const text = (values: Values, key: string): string => String(values[key] ?? '');
const number = (values: Values, key: string): number => Number(values[key] ?? 0);
const degrees = (values: Values, key: string): string => `${Math.round(number(values, key))} °F`;
const inTenths = (value: number): string => String(Math.round(value * 10) / 10);
// Formatting a date costs more than judging the day, and a strip says the same few dates and hours over and over. The words follow
// from the key alone, so remembering them changes nothing but the time it takes; the size is bounded.
const said = new Map<string, string>();
const mostSaid = 5000;

function remembered(key: string, make: () => string): string {
  const known = said.get(key);
  if (known !== undefined) return known;
  const made = make();
  if (said.size >= mostSaid) said.clear();
  said.set(key, made);
  return made;
}

const date = (values: Values, key: string): string =>
  remembered(text(values, key), () =>
    DateTime.fromISO(text(values, key), { zone: 'utc' }).toFormat('cccc, LLLL d', { locale: 'en-US' }),
  );
/** "5 am Wednesday", on the clock of the place. */
const hour = (values: Values): string =>
  remembered(`${text(values, 'at')} ${text(values, 'zone')}`, () =>
    DateTime.fromISO(text(values, 'at'), { zone: text(values, 'zone') })
      .toFormat('h a cccc', { locale: 'en-US' })
      .replace(/ (AM|PM) /, (_, half: string) => ` ${half.toLowerCase()} `),
  );
const count = (n: number, one: string): string => `${n} ${one}${n === 1 ? '' : 's'}`;

const sentences: Readonly<Record<string, (v: Values) => string>> = {
  past: () => 'That day is over.',
  'beyond-offer': (v) => `Only the next ${number(v, 'days')} days are offered.`,
  'origin-closed': (v) =>
    `The ${text(v, 'place')} takes no drop-off on ${date(v, 'date')}${v['title'] ? `: ${text(v, 'title')}` : ''}.`,
  'cut-off-passed': (v) => `The cut-off at the ${text(v, 'place')} has passed.`,
  'arrival-closed': (v) =>
    `It would arrive on ${date(v, 'date')}, when the ${text(v, 'place')} hands nothing out${v['title'] ? ` (${text(v, 'title')})` : ''}, and rest over a day off.`,
  'no-slack': (v) =>
    number(v, 'days') > 0
      ? `Only one working day follows the arrival at the ${text(v, 'place')}; the circle keeps two.`
      : `No working day follows the arrival at the ${text(v, 'place')}: a late parcel would wait over the days off${v['next'] ? ` until ${date(v, 'next')}` : ''}.`,
  slack: (v) =>
    `${number(v, 'days') === 1 ? 'One working day follows' : 'Two working days follow'} the arrival as slack.`,
  'not-ready': (v) => `The parcel is ready from ${date(v, 'date')}.`,
  'too-late': (v) => `The latest day you gave is ${date(v, 'date')}.`,
  'fed-lately': (v) =>
    `The last meal was ${mealText(number(v, 'days'))}; the circle keeps ${count(number(v, 'need'), 'day')} without food.`,
  'breeder-away': (v) => `You are away on ${date(v, 'date')}.`,
  'buyer-away': (v) => `The buyer cannot collect on ${date(v, 'date')}.`,
  'buyer-not-said': (v) =>
    `The buyer has named mornings that suit, and ${date(v, 'date')} is not among them.`,
  'too-cold': (v) =>
    `${text(v, 'place')} falls to ${degrees(v, 'lowF')} at ${hour(v)}, ${inTenths(number(v, 'byF'))} °F under the limit of ${degrees(v, 'limitF')}${limitOf(v)}.`,
  'too-hot': (v) =>
    `${text(v, 'place')} rises to ${degrees(v, 'highF')} at ${hour(v)}, ${inTenths(number(v, 'byF'))} °F over the limit of ${degrees(v, 'limitF')}${limitOf(v)}.`,
  'near-cold': (v) =>
    `${text(v, 'place')} falls to ${degrees(v, 'lowF')} at ${hour(v)}, only ${inTenths(number(v, 'byF'))} °F above the limit of ${degrees(v, 'limitF')}${limitOf(v)}; a forecast ${ahead(v)} is often ${inTenths(number(v, 'sigmaF'))} °F off.`,
  'near-hot': (v) =>
    `${text(v, 'place')} rises to ${degrees(v, 'highF')} at ${hour(v)}, only ${inTenths(number(v, 'byF'))} °F below the limit of ${degrees(v, 'limitF')}${limitOf(v)}; a forecast ${ahead(v)} is often ${inTenths(number(v, 'sigmaF'))} °F off.`,
  'outdoors-fine': (v) =>
    `Outdoors it stays between ${degrees(v, 'lowF')} and ${degrees(v, 'highF')} along the route, at least ${inTenths(number(v, 'marginF'))} °F inside the limits.`,
  alert: (v) => `${text(v, 'event')} for ${text(v, 'place')} until ${hour({ ...v, at: v['to'] ?? '' })}.`,
  'alerts-unknown': (v) => `Weather alerts for ${text(v, 'place')} could not be read.`,
  'no-forecast': (v) =>
    `There is no forecast for ${text(v, 'place')} on ${date(v, 'date')}, so nobody can say that the day is safe.`,
  'forecast-old': (v) =>
    `The forecast for ${text(v, 'place')} is ${Math.round(number(v, 'hours'))} h old; only one of at most ${number(v, 'mostHours')} h can make a day open.`,
  'forecast-far': (v) =>
    `The forecast for ${text(v, 'place')} does not reach ${date(v, 'date')} yet. The calendar is checked, the weather is not.`,
  box: (v) => boxText(v),
  'box-late': (v) => lateText(v),
  'late-unknown': () =>
    'The forecast does not reach a day further, so nobody can say how a late parcel would fare.',
  pack: (v) => packText(text(v, 'pack'), v),
  'pack-short': (v) =>
    `A ${number(v, 'hours')}-hour heat pack is less than the ${Math.round(number(v, 'needHours'))} h planned with a day to spare${v['longer'] ? `; use the ${text(v, 'longer')}-hour one` : ''}.`,
};

const mealText = (days: number): string =>
  days > 0 ? `${count(days, 'day')} before` : days === 0 ? 'that same day' : 'after that day';
const limitOf = (v: Values): string => (v['species'] ? ` for a ${text(v, 'species')}` : '');
const ahead = (v: Values): string =>
  number(v, 'leadDays') === 0 ? 'for today' : `${count(number(v, 'leadDays'), 'day')} ahead`;

/** "at the sort hub in Indianapolis at 3 am Wednesday". */
function boxWhere(v: Values): string {
  const place = text(v, 'place');
  const where: Readonly<Record<string, string>> = {
    packed: 'at home',
    vehicle: 'in the run vehicle',
    'drop-off': 'at the drop-off counter',
    'linehaul-out': 'on the way to the sort hub',
    hub: `at the sort hub in ${place}`,
    'linehaul-in': `on the way to ${place}`,
    station: `at the station in ${place}`,
    held: `at the counter in ${place}`,
    truck: `in the delivery truck in ${place}`,
    late: `while it rests in ${place}`,
  };
  return `${where[text(v, 'leg')] ?? `in ${place}`} at ${hour(v)}`;
}

const keeps = (v: Values): string =>
  `it keeps within ${degrees(v, 'lowF')} and ${degrees(v, 'highF')} ${chanceText(number(v, 'chance'))}`;
const turns = (v: Values): string =>
  `${text(v, 'side') === 'low' ? 'falls' : 'rises'} to ${degrees(v, 'tempF')}`;

/** "2 °F under what a corn snake needs" or "4 °F above what …". */
function against(v: Values, what: string): string {
  const byF = number(v, 'byF');
  const isLow = text(v, 'side') === 'low';
  const beyond = isLow ? 'under' : 'over';
  const inside = isLow ? 'above' : 'below';
  return `${inTenths(Math.abs(byF))} °F ${byF < 0 ? beyond : inside} ${what}`;
}

const animal = (v: Values): string => (v['species'] ? `a ${text(v, 'species')}` : 'the animal');

function boxText(v: Values): string {
  return `In the box it ${turns(v)} ${boxWhere(v)}, ${against(v, `the limit of ${degrees(v, 'limitF')} for ${animal(v)}`)}; ${keeps(v)}.`;
}

function lateText(v: Values): string {
  return `If it is a day late, the box ${turns(v)} ${boxWhere(v)}, ${against(v, `what ${animal(v)} may endure`)} (${degrees(v, 'limitF')}); ${keeps(v)}.`;
}

function packText(pack: string, v: Values): string {
  if (pack === 'cold')
    return `Use a cold pack, not touching the animal: it rises to ${degrees(v, 'highF')} along the route.`;
  if (pack !== 'none')
    return `Use one ${pack === 'heat-72' ? 72 : 40}-hour heat pack, not touching the animal: the high along the route falls under ${degrees(v, 'belowF')}.`;
  if (number(v, 'lowHighF') < number(v, 'belowF')) return 'No heat pack: the box keeps better without one.';
  return 'No heat or cold pack is needed.';
}

/** The sentence of a reason. A code without one is a fault of ours and says its name, so that it is seen. */
export function reasonText(reason: Draft): string {
  return sentences[reason.code]?.(reason.values) ?? reason.code;
}

/** The codes that have a sentence. */
export const reasonCodes: readonly string[] = Object.keys(sentences);
