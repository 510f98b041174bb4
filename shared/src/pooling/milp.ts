import type { Column } from './columns';
import { stopsOf } from './columns';
import type { Instance, SlotInfo } from './instance';
import { stopsIn, type Placement } from './plan';

/** What a solver answers. `values` by variable name, zeros may be left out; null without a solution. */
export interface MilpAnswer {
  readonly status: 'optimal' | 'time-limit' | 'infeasible' | 'failed';
  readonly objective: number | null;
  /** A bound the optimum is never below; null when the solver has none. */
  readonly bound: number | null;
  readonly values: Readonly<Record<string, number>> | null;
}

/** Solves a model in CPLEX LP format to optimality or to the time limit, from a solution known already (zeros left out). */
export type SolveMilp = (
  lpText: string,
  limitSeconds: number,
  start?: Readonly<Record<string, number>>,
) => MilpAnswer;

const x = (parcel: number, slot: number) => `x${parcel}_${slot}`;
const y = (slot: number, stopId: number) => `y${slot}_${stopId}`;

/**
 * The set-partition model in LP format. λ (`l`): this run is driven; y: its breeder is visited (the sum of the λ with the
 * breeder); x: the parcel rides there; s: it stays. Each parcel rides once or stays; x ≤ y; a visited breeder has a
 * parcel; one λ at most for a coordinator and day; the room holds. A confirmed run's slot needs no λ to be driven.
 */
export function milpText(instance: Instance, columns: readonly Column[]): string {
  const bySlot = new Map<number, { column: Column; name: string }[]>();
  columns.forEach((column, index) => {
    const list = bySlot.get(column.slot);
    const entry = { column, name: `l${index}` };
    if (list) list.push(entry);
    else bySlot.set(column.slot, [entry]);
  });
  const rows: string[] = [];
  const row = (terms: readonly string[], rest: string) =>
    rows.push(` r${rows.length}: ${wrap(terms)} ${rest}`);
  instance.parcels.forEach((_, parcel) =>
    row(
      [...(instance.options[parcel] ?? []).map(({ slot }) => `+ ${x(parcel, slot)}`), `+ s${parcel}`],
      '= 1',
    ),
  );
  for (const slot of instance.slots) slotRows(instance, slot, bySlot.get(slot.index) ?? [], row);
  for (const group of new Set(instance.slots.map((slot) => slot.group))) {
    const terms = instance.slots
      .filter((slot) => slot.group === group)
      .flatMap(({ index }) => (bySlot.get(index) ?? []).map(({ name }) => `+ ${name}`));
    if (terms.length > 1) row(terms, '<= 1');
  }
  return [
    'Minimize',
    ` obj: ${wrap(objective(instance, columns))}`,
    'Subject To',
    ...rows,
    'Bounds',
    ...instance.slots.flatMap((slot) =>
      stopsOf(instance, slot).map((id) => ` 0 <= ${y(slot.index, id)} <= 1`),
    ),
    'Binary',
    ...columns.map((_, index) => ` l${index}`),
    ...instance.options.flatMap((options, parcel) => [
      ...options.map(({ slot }) => ` ${x(parcel, slot)}`),
      ` s${parcel}`,
    ]),
    'End',
    '',
  ].join('\n');
}

function objective(instance: Instance, columns: readonly Column[]): string[] {
  return [
    ...columns.map(({ cents }, index) => `+ ${cents} l${index}`),
    ...instance.options.flatMap((options, parcel) => [
      ...options
        .filter(({ penaltyCents }) => penaltyCents !== 0)
        .map((option) => `+ ${option.penaltyCents} ${x(parcel, option.slot)}`),
      `+ ${instance.problem.costs.unplacedCents} s${parcel}`,
    ]),
  ];
}

function slotRows(
  instance: Instance,
  slot: SlotInfo,
  columns: readonly { column: Column; name: string }[],
  row: (terms: readonly string[], rest: string) => void,
): void {
  for (const id of stopsOf(instance, slot)) {
    const visit = y(slot.index, id);
    const own = slot.eligible.filter((parcel) => instance.parcels[parcel]?.stopId === id);
    const visiting = columns
      .filter(({ column }) => column.stopIds.includes(id))
      .map(({ name }) => `- ${name}`);
    row([`+ ${visit}`, ...visiting], '= 0');
    for (const parcel of own) row([`+ ${x(parcel, slot.index)}`, `- ${visit}`], '<= 0');
    row([`+ ${visit}`, ...own.map((parcel) => `- ${x(parcel, slot.index)}`)], '<= 0');
  }
  const load = slot.eligible.map(
    (parcel) => `+ ${instance.parcels[parcel]?.volumeL ?? 0} ${x(parcel, slot.index)}`,
  );
  row([...load, ...columns.map(({ name }) => `- ${slot.roomL} ${name}`)], '<= 1e-6');
}

/** LP readers limit the length of a line; some stop at 255 characters, so lines are kept short. */
function wrap(terms: readonly string[]): string {
  const lines: string[] = [];
  for (let at = 0; at < terms.length; at += 8) lines.push(terms.slice(at, at + 8).join(' '));
  return lines.join('\n  ');
}

/** A placement as values of the model's variables, zeros left out; null when one of its runs is no column. */
export function valuesOf(
  instance: Instance,
  columns: readonly Column[],
  placement: Placement,
): Readonly<Record<string, number>> | null {
  const values: Record<string, number> = {};
  placement.forEach((at, parcel) => (values[at === -1 ? `s${parcel}` : x(parcel, at)] = 1));
  for (const slot of instance.slots) {
    const ids = stopsIn(instance, placement, slot);
    if (ids.length === 0) continue;
    const index = columns.findIndex(
      (column) => column.slot === slot.index && column.stopIds.join() === ids.join(),
    );
    if (index === -1) return null;
    values[`l${index}`] = 1;
    for (const id of ids) values[y(slot.index, id)] = 1;
  }
  return values;
}

/** Reads where each parcel rides out of a solver's values. */
export const placementOf = (instance: Instance, values: Readonly<Record<string, number>>): Placement =>
  instance.options.map(
    (options, parcel) => options.find(({ slot }) => (values[x(parcel, slot)] ?? 0) > 0.5)?.slot ?? -1,
  );
