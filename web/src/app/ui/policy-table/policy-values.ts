import type { TemperatureUnit } from '@shared/contract';
import type { Policy } from '@shared/policy/policy';
import { policyGroups, policyNote, type PolicyNote, type PolicyUnit } from '@shared/policy/policy-notes';
import { policyValues, type PolicyValue } from '@shared/policy/policy-paths';

/** One value of the policy as a page shows it. */
export interface PolicyRow {
  readonly path: string;
  /** The path without dots, for the name of a form control. */
  readonly key: string;
  readonly note: PolicyNote;
  readonly value: PolicyValue;
  /** As it is typed in, without its unit. */
  readonly text: string;
  readonly unitWord: string;
  readonly kind: 'number' | 'clock' | 'line' | 'lines';
  readonly defaultText: string;
}

export interface PolicySection {
  readonly title: string;
  readonly lead: string;
  readonly rows: readonly PolicyRow[];
}

/** The policy in the groups a person reads; a member that no group names comes last. */
export function policySections(policy: Policy, defaults: Policy, unit: TemperatureUnit): PolicySection[] {
  const original = policyValues(defaults);
  const rows = [...policyValues(policy)].map(([path, value]) =>
    rowOf(path, value, original.get(path) ?? value, unit),
  );
  const groupOf = (path: string): number => {
    const member = path.split('.', 1)[0] ?? '';
    const found = policyGroups.findIndex((group) => group.members.includes(member));
    return found < 0 ? policyGroups.length - 1 : found;
  };
  return policyGroups.map(({ title, lead }, index) => ({
    title,
    lead,
    rows: rows.filter((row) => groupOf(row.path) === index),
  }));
}

function rowOf(path: string, value: PolicyValue, original: PolicyValue, unit: TemperatureUnit): PolicyRow {
  const note = policyNote(path);
  return {
    path,
    key: path.replaceAll('.', '_'),
    note,
    value,
    text: valueText(value, note.unit, unit),
    unitWord: unitWord(note.unit, unit),
    kind: kindOf(value, note.unit),
    defaultText: valueText(original, note.unit, unit),
  };
}

/** A value as it is typed in: °C by choice, shares as percent, minutes of the day as `20:00`, a list one a line. */
export function valueText(value: PolicyValue, kind: PolicyUnit, unit: TemperatureUnit): string {
  if (typeof value === 'string') return value;
  if (typeof value !== 'number') return value.join('\n');
  if (kind === 'clock') return clockText(value);
  if (kind === 'share') return String(rounded(value * 100, 2));
  if (kind === 'temperature' && unit === 'C') return String(rounded(((value - 32) * 5) / 9, 1));
  if (kind === 'difference' && unit === 'C') return String(rounded((value * 5) / 9, 2));
  return String(value);
}

/** What was typed, as it is stored; NaN where a number was wanted and none stands. A text left as it was keeps its exact value. */
export function readValue(text: string, row: PolicyRow, unit: TemperatureUnit): PolicyValue {
  if (text === row.text) return row.value;
  if (row.kind === 'line') return text.trim();
  if (row.kind === 'lines')
    return text
      .split('\n')
      .map((one) => one.trim())
      .filter((one) => one !== '');
  if (row.kind === 'clock') {
    const [hours = NaN, minutes = NaN] = text.split(':').map(Number);
    return hours * 60 + minutes;
  }
  const number = text.trim() === '' ? NaN : Number(text.trim().replace(',', '.'));
  if (row.note.unit === 'share') return rounded(number / 100, 4);
  if (row.note.unit === 'temperature' && unit === 'C') return rounded((number * 9) / 5 + 32, 2);
  if (row.note.unit === 'difference' && unit === 'C') return rounded((number * 9) / 5, 2);
  return number;
}

/** A whole policy with some values put in by their paths; `policy` stays as it is. */
export function withValues(policy: Policy, values: ReadonlyMap<string, PolicyValue>): unknown {
  const copy = JSON.parse(JSON.stringify(policy)) as Record<string, unknown>;
  for (const [path, value] of values) {
    const keys = path.split('.');
    const last = keys.pop() ?? '';
    const holder = keys.reduce((inner, key) => inner[key] as Record<string, unknown>, copy);
    holder[last] = value;
  }
  return copy;
}

/** The range of a number in words, in the person's unit; empty where there is none. */
export function rangeWords({ note, kind, unitWord: word }: PolicyRow, unit: TemperatureUnit): string {
  if (note.min === undefined || note.max === undefined) return '';
  const [low, high] = [note.min, note.max].map((value) => valueText(value, note.unit, unit));
  return `Use a ${kind === 'clock' ? 'time' : 'number'} from ${low} to ${high}${word === '' ? '' : ` ${word}`}.`;
}

/** `38 °F`, `20:00`, `95 %`; a list with commas. */
export const withUnit = (text: string, word: string): string =>
  `${text.replaceAll('\n', ', ')}${word === '' ? '' : ` ${word}`}`;

const kindOf = (value: PolicyValue, kind: PolicyUnit): PolicyRow['kind'] => {
  if (typeof value === 'number') return kind === 'clock' ? 'clock' : 'number';
  return typeof value === 'string' ? 'line' : 'lines';
};

function unitWord(kind: PolicyUnit, unit: TemperatureUnit): string {
  if (kind === 'temperature' || kind === 'difference') return `°${unit}`;
  return words[kind] ?? kind;
}

const words: Partial<Record<PolicyUnit, string>> = {
  clock: '',
  minutes: 'min',
  hours: 'h',
  share: '%',
  cents: '¢',
  'cents a mile': '¢ a mile',
  'cents a minute': '¢ a minute',
  'cents a day': '¢ a day',
  text: '',
};

const clockText = (minute: number): string =>
  `${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;
const rounded = (value: number, digits: number): number => Number(value.toFixed(digits));
