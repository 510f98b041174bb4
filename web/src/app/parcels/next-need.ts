import type { Parcel } from '@shared/contract';
import { dayLabel } from '../core/dates';
import { addDays } from '../ui/plain-dates';

export type NeedGroup = 'day' | 'pack' | 'waiting' | 'road' | 'finish' | 'done';

/** The next thing a parcel needs. */
export interface Need {
  readonly group: NeedGroup;
  readonly text: string;
}

export interface ParcelGroup {
  readonly key: NeedGroup;
  readonly title: string;
  readonly items: readonly { readonly parcel: Parcel; readonly text: string }[];
}

const titles: readonly (readonly [NeedGroup, string])[] = [
  ['day', 'Needs a day'],
  ['pack', 'To pack'],
  ['waiting', 'Booked or waiting'],
  ['road', 'On the way'],
  ['finish', 'Arrived'],
  ['done', 'Done'],
];

/** What to do with a parcel next, by its state and how near its day is; `today` is the date at its drop-off counter. */
export function needOf(parcel: Parcel, today: string): Need {
  switch (parcel.state) {
    case 'on-hold':
      return { group: 'day', text: `${sentence(parcel.holdReason)}Choose a new day.` };
    case 'draft':
      return { group: 'day', text: `Choose a day, ${spanText(parcel.readyFrom, parcel.latestDate)}.` };
    case 'seeking':
      return { group: 'waiting', text: seekingText(parcel) };
    case 'booked':
      return bookedNeed(parcel, today);
    case 'packed':
      return { group: 'road', text: `Packed. ${collectionText(parcel)}` };
    case 'aboard':
      return { group: 'road', text: `On its way to the ${parcel.dropOff.name}.` };
    case 'handed-over':
      return {
        group: 'road',
        text: `${reportWords(parcel) ?? arrivalText(parcel)}${parcel.trackingNumber ? '' : ' The tracking number is missing.'}`,
      };
    case 'arrived':
      return { group: 'finish', text: `${reportWords(parcel) ?? 'Arrived.'} Close it when all is settled.` };
    case 'closed':
      return {
        group: 'done',
        text: parcel.arrivalDate ? `Arrived ${dayLabel(parcel.arrivalDate, 'medium')}.` : 'Closed.',
      };
    case 'cancelled':
      return { group: 'done', text: 'Cancelled.' };
  }
}

/** The parcels by what they need, the most pressing group first, within it by day; empty groups are left out. */
export function groupByNeed(
  parcels: readonly Parcel[],
  todayIn: (zone: string) => string,
): readonly ParcelGroup[] {
  const needs = parcels.map((parcel) => ({ parcel, need: needOf(parcel, todayIn(parcel.dropOff.zone)) }));
  return titles
    .map(([key, title]) => ({
      key,
      title,
      items: needs
        .filter(({ need }) => need.group === key)
        .map(({ parcel, need }) => ({ parcel, text: need.text }))
        .toSorted((a, b) => compare(key, a.parcel, b.parcel)),
    }))
    .filter((group) => group.items.length > 0);
}

/** What presses most, for the line below the heading: `2 need a day, 1 to pack.`; null when nothing does. */
export function pressingText(groups: readonly ParcelGroup[]): string | null {
  const count = (key: NeedGroup) => groups.find((group) => group.key === key)?.items.length ?? 0;
  const [days, packs] = [count('day'), count('pack')];
  const parts = [
    days > 0 ? `${days} ${days === 1 ? 'needs' : 'need'} a day` : '',
    packs > 0 ? `${packs} to pack` : '',
  ];
  const text = parts.filter(Boolean).join(', ');
  return text ? `${text}.` : null;
}

function compare(group: NeedGroup, a: Parcel, b: Parcel): number {
  const key = (parcel: Parcel) => parcel.shipDate ?? parcel.flexible?.to ?? parcel.latestDate;
  const onHoldFirst = Number(b.state === 'on-hold') - Number(a.state === 'on-hold');
  const byDay = key(a).localeCompare(key(b)) * (group === 'done' ? -1 : 1);
  return onHoldFirst || byDay || a.code.localeCompare(b.code);
}

function bookedNeed(parcel: Parcel, today: string): Need {
  const { shipDate } = parcel;
  if (shipDate === null) return { group: 'waiting', text: collectionText(parcel) };
  if (shipDate > addDays(today, 1))
    return { group: 'waiting', text: `Ships ${dayLabel(shipDate, 'medium')}. ${collectionText(parcel)}` };
  const when =
    shipDate === today
      ? 'today'
      : shipDate < today
        ? `${dayLabel(shipDate, 'medium')}, which is over`
        : 'tomorrow';
  return { group: 'pack', text: `Pack it: it ships ${when}. ${collectionText(parcel)}` };
}

const collectionText = ({ run }: Parcel): string =>
  run ? `${run.coordinatorName} collects it.` : 'No run takes it yet.';

function seekingText({ flexible, readyFrom, latestDate }: Parcel): string {
  return `Waits for a safe day, ${spanText(flexible?.from ?? readyFrom, flexible?.to ?? latestDate)}.`;
}

function arrivalText({ arrivalDate, destination }: Parcel): string {
  const where =
    destination.counterId === null ? `the door in ${destination.city}` : `the ${destination.name}`;
  return arrivalDate ? `Planned at ${where} ${dayLabel(arrivalDate, 'medium')}.` : `On its way to ${where}.`;
}

/** What the buyer reported, in a sentence; null until they did. */
export function reportWords({ report, buyer }: Pick<Parcel, 'report' | 'buyer'>): string | null {
  if (!report) return null;
  const outcomes = {
    'arrived-well': 'that the animals arrived well',
    'arrived-weak': 'that the animals arrived weak',
    doa: 'a dead arrival (DOA)',
    'not-arrived': 'that nothing has arrived',
  };
  return `${buyer.name} reports ${outcomes[report.outcome]}.`;
}

const spanText = (from: string, to: string): string =>
  `${dayLabel(from, 'short')} to ${dayLabel(to, 'short')}`;

/** A stored reason as a sentence with the space behind it; empty without one. */
function sentence(text: string | null): string {
  if (!text) return '';
  return /[.!?]$/.test(text) ? `${text} ` : `${text}. `;
}
