import { DateTime } from 'luxon';
import type { RangeF, TemperatureUnit, TraceRow } from '@shared/contract';
import { clock } from '../../core/dates';
import { degrees, rangeText, temperatureText } from '../../core/temperature';

type LegKind = TraceRow['leg'];

/** What the box lives through, in a breeder's words. */
const legNames: Readonly<Record<LegKind, string>> = {
  packed: 'Packed, waiting for the run',
  vehicle: 'In the run vehicle',
  'drop-off': 'At the drop-off counter',
  'linehaul-out': 'On the way to the sort hub',
  hub: 'At the sort hub',
  'linehaul-in': 'On the way from the sort hub',
  station: 'At the destination station',
  held: 'Held for pickup',
  truck: 'On the delivery truck',
  late: 'A day late: left standing',
};

/** One leg as the picture numbers it; `isLate` when only the late case still travels. */
export interface TraceLeg {
  readonly number: number;
  readonly name: string;
  readonly place: string;
  readonly zone: string;
  readonly startMs: number;
  readonly endMs: number;
  readonly isLate: boolean;
  /** From when to when by the clock of the place. */
  readonly hours: string;
}

export interface TracePoint {
  readonly atMs: number;
  readonly temp: number | null;
  readonly low: number | null;
  readonly high: number | null;
  readonly late: number | null;
}

/** A row of the table and of the readout. */
export interface TraceLine {
  readonly atMs: number;
  readonly when: string;
  readonly leg: string;
  readonly temp: string;
  readonly between: string;
  readonly late: string;
}

const inUnit = (valueF: number, unit: TemperatureUnit): number =>
  unit === 'C' ? ((valueF - 32) * 5) / 9 : valueF;

/** The points of the picture in the person's unit. */
export function tracePoints(rows: readonly TraceRow[], unit: TemperatureUnit): TracePoint[] {
  const convert = (valueF: number | null): number | null => (valueF === null ? null : inUnit(valueF, unit));
  return rows.map((row) => ({
    atMs: Date.parse(row.at),
    temp: convert(row.tempF),
    low: convert(row.lowF),
    high: convert(row.highF),
    late: convert(row.lateF),
  }));
}

/** The legs in their order. A row names the leg that ends at it, so the first row belongs to the leg of the second. */
export function traceLegs(rows: readonly TraceRow[]): TraceLeg[] {
  const legs: Omit<TraceLeg, 'hours'>[] = [];
  rows.slice(1).forEach((row, index) => {
    const startMs = Date.parse(rows[index]?.at ?? row.at);
    const endMs = Date.parse(row.at);
    const name = legNames[row.leg];
    const isLate = row.tempF === null;
    const last = legs.at(-1);
    if (last?.name === name && last.place === row.place && last.isLate === isLate)
      legs[legs.length - 1] = { ...last, endMs };
    else
      legs.push({
        number: legs.length + 1,
        name,
        place: row.place,
        zone: row.zone,
        startMs,
        endMs,
        isLate,
      });
  });
  return legs.map((leg) => ({ ...leg, hours: hoursText(leg) }));
}

function hoursText({ startMs, endMs, zone }: { startMs: number; endMs: number; zone: string }): string {
  const start = DateTime.fromMillis(startMs, { zone });
  const end = DateTime.fromMillis(endMs, { zone });
  const day = start.toLocaleString({ weekday: 'short' });
  const endDay = end.hasSame(start, 'day') ? '' : `${end.toLocaleString({ weekday: 'short' })} `;
  const [from, to] = [
    clock(start.toUTC().toISO() ?? '', zone, 'never'),
    clock(end.toUTC().toISO() ?? '', zone, 'always'),
  ];
  return `${day} ${from} to ${endDay}${to}`;
}

/**
 * The round hours of the axis, each by the clock of the place the box is at then: every `stepHours` hours after local
 * midnight, none closer than `leastGapMs` to the one before (clocks jump where a leg changes zone).
 */
export function traceTicks(
  rows: readonly TraceRow[],
  stepHours: number,
  leastGapMs: number,
): { readonly atMs: number; readonly label: string }[] {
  const ticks: { atMs: number; label: string }[] = [];
  let shownZone = '';
  for (const row of rows) {
    const there = DateTime.fromISO(row.at, { zone: row.zone });
    const last = ticks.at(-1);
    if (there.minute !== 0 || there.hour % stepHours !== 0) continue;
    if (last && there.toMillis() - last.atMs < leastGapMs) continue;
    const zone = there.toLocaleString({ timeZoneName: 'short' }).split(' ').at(-1) ?? '';
    const second =
      zone === shownZone ? (there.hour === 0 ? there.toLocaleString({ weekday: 'short' }) : '') : zone;
    shownZone = zone;
    ticks.push({ atMs: there.toMillis(), label: `${there.toLocaleString({ hour: 'numeric' })}\n${second}` });
  }
  return ticks;
}

/** The lines of the table, one a row. */
export function traceLines(rows: readonly TraceRow[], unit: TemperatureUnit): TraceLine[] {
  const legs = traceLegs(rows);
  const text = (valueF: number | null): string => (valueF === null ? '–' : temperatureText(valueF, unit));
  return rows.map((row) => {
    const atMs = Date.parse(row.at);
    const leg = legs.find((one) => atMs > one.startMs && atMs <= one.endMs) ?? legs[0];
    const day = DateTime.fromISO(row.at, { zone: row.zone }).toLocaleString({ weekday: 'short' });
    return {
      atMs,
      when: `${day} ${clock(row.at, row.zone, 'always')}`,
      leg: leg ? `${leg.number} ${leg.name}` : '',
      temp: text(row.tempF),
      between:
        row.lowF === null || row.highF === null ? '–' : rangeText({ lowF: row.lowF, highF: row.highF }, unit),
      late: text(row.lateF),
    };
  });
}

/** Lowest and highest value of the picture in the unit, in whole fives with a little room. */
export function traceScale(
  rows: readonly TraceRow[],
  limits: readonly (RangeF | null | undefined)[],
  unit: TemperatureUnit,
): { readonly min: number; readonly max: number } {
  const values = [
    ...rows.flatMap((row) => [row.tempF, row.lowF, row.highF, row.lateF]),
    ...limits.flatMap((limit) => (limit ? [limit.lowF, limit.highF] : [])),
  ].flatMap((valueF) => (valueF === null ? [] : [inUnit(valueF, unit)]));
  if (values.length === 0) return { min: 0, max: 100 };
  const room = unit === 'C' ? 1 : 2;
  return {
    min: Math.floor((Math.min(...values) - room) / 5) * 5,
    max: Math.ceil((Math.max(...values) + room) / 5) * 5,
  };
}

/**
 * A level for each leg's number so that no two of them meet: the lowest level whose last number is at least
 * `widthMs` away. Numbers stand over the middle of their legs.
 */
export function labelLevels(legs: readonly Pick<TraceLeg, 'startMs' | 'endMs'>[], widthMs: number): number[] {
  const lastOn: number[] = [];
  return legs.map(({ startMs, endMs }) => {
    const middle = (startMs + endMs) / 2;
    const free = lastOn.findIndex((last) => middle - last >= widthMs);
    const level = free === -1 ? lastOn.length : free;
    lastOn[level] = middle;
    return level;
  });
}

/** The picture in a sentence, for who cannot see it. */
export function traceSummary(rows: readonly TraceRow[], unit: TemperatureUnit): string {
  const span = (values: readonly (number | null)[]): string | null => {
    const known = values.filter((value) => value !== null);
    if (known.length === 0) return null;
    const [lowF, highF] = [Math.min(...known), Math.max(...known)];
    return degrees(lowF, unit) === degrees(highF, unit)
      ? `at ${temperatureText(lowF, unit)}`
      : `between ${rangeText({ lowF, highF }, unit).replace(' to ', ' and ')}`;
  };
  const planned = span(rows.map((row) => row.tempF));
  const late = span(rows.map((row) => row.lateF));
  return [planned ? `As planned the box stays ${planned}.` : '', late ? `A day late it stays ${late}.` : '']
    .filter(Boolean)
    .join(' ');
}
