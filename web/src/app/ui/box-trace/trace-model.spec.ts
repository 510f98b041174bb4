import { Settings } from 'luxon';
import {
  labelLevels,
  traceLegs,
  traceLines,
  tracePoints,
  traceScale,
  traceSummary,
  traceTicks,
} from './trace-model';
import { sampleTrace } from './trace-samples';

const rows = sampleTrace();
const plain = (text: string) => text.replace(/\s/g, ' ');

beforeEach(() => {
  Settings.defaultLocale = 'en-US';
});

describe('the legs of a trace', () => {
  it('are numbered in their order, what only the late case travels last', () => {
    expect(traceLegs(rows).map((leg) => [leg.number, leg.name, leg.isLate])).toEqual([
      [1, 'Packed, waiting for the run', false],
      [2, 'In the run vehicle', false],
      [3, 'At the sort hub', false],
      [4, 'Held for pickup', false],
      [5, 'A day late: left standing', true],
      [6, 'Held for pickup', true],
    ]);
  });

  it('tell their hours by the clock of their place', () => {
    // From 22:00, 00:00 and 01:00 UTC: Indianapolis is five hours behind in December, Flagstaff seven.
    const [, , hub, held] = traceLegs(rows).map((leg) => plain(leg.hours));
    expect(hub).toBe('Tue 5:00 PM to 7:00 PM EST');
    expect(held).toBe('Tue 5:00 PM to 6:00 PM MST');
  });

  it('follow one another without a gap', () => {
    const legs = traceLegs(rows);
    legs.slice(1).forEach((leg, index) => expect(leg.startMs).toBe(legs[index]?.endMs));
  });
});

describe('the numbers of the legs', () => {
  it('take another row only when they would meet', () => {
    const leg = (startMs: number, endMs: number) => ({ startMs, endMs });
    expect(labelLevels([leg(0, 10), leg(10, 12), leg(12, 14), leg(14, 40)], 10)).toEqual([0, 1, 2, 0]);
    expect(labelLevels([leg(0, 20), leg(20, 40)], 10)).toEqual([0, 0]);
  });
});

describe('temperatures of a trace', () => {
  it('are read in °C, what is not known stays unknown', () => {
    const points = tracePoints(rows, 'C');
    // (68 − 32) · 5/9 = 20
    expect(points[4]?.temp).toBe(20);
    expect(points.at(-1)).toMatchObject({ temp: null, low: null, high: null });
  });

  it('fit into the scale together with every limit', () => {
    expect(traceScale(rows, [{ lowF: 48, highF: 92 }, null], 'F')).toEqual({ min: 45, max: 95 });
    expect(traceScale([], [null], 'F')).toEqual({ min: 0, max: 100 });
  });

  it('stand in the table with place, leg and both cases', () => {
    const lines = traceLines(rows, 'F').map((line) => ({ ...line, when: plain(line.when) }));
    expect(lines[4]).toMatchObject({
      when: 'Tue 7:00 PM EST',
      leg: '3 At the sort hub',
      temp: '68 °F',
      between: '66 to 70 °F',
      late: '68 °F',
    });
    expect(lines[8]).toMatchObject({
      leg: '5 A day late: left standing',
      temp: '–',
      between: '–',
      late: '52 °F',
    });
  });

  it('are told in a sentence', () => {
    expect(traceSummary(rows, 'F')).toBe(
      'As planned the box stays between 66 and 76 °F. A day late it stays between 52 and 76 °F.',
    );
    expect(traceSummary([], 'F')).toBe('');
  });
});

describe('the clock below the trace', () => {
  it('is the one of the place the box is at, its zone named where it changes', () => {
    const ticks = traceTicks(rows, 1, 1).map((tick) => plain(tick.label));
    expect(ticks[0]).toBe('2 PM CST');
    expect(ticks[3]).toBe('6 PM EST');
    expect(ticks[5]).toBe('6 PM MST');
  });

  it('leaves out an hour that would stand on the one before', () => {
    // 6 PM in Flagstaff comes two hours after 6 PM in Indianapolis.
    expect(traceTicks(rows, 3, 3 * 3_600_000)).toHaveLength(2);
  });

  it('shows round hours only', () => {
    expect(traceTicks(rows, 3, 2 * 3_600_000).map((tick) => plain(tick.label).trim())).toEqual([
      '3 PM CST',
      '6 PM EST',
      '6 PM MST',
    ]);
  });
});
