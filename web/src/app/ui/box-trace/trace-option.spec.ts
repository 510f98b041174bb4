import { tracePoints, traceLegs } from './trace-model';
import { traceOption } from './trace-option';
import { sampleTrace } from './trace-samples';

interface Series {
  readonly type: string;
  readonly stack?: string;
  readonly data: readonly (readonly number[])[];
  readonly markArea?: { readonly data: readonly (readonly { readonly yAxis: number }[])[] };
  readonly markLine?: { readonly data: readonly { readonly yAxis?: number; readonly xAxis?: number }[] };
}

const rows = sampleTrace();
const seriesOf = (unit: 'F' | 'C'): Series[] =>
  traceOption({
    width: 800,
    points: tracePoints(rows, unit),
    legs: traceLegs(rows),
    ticks: [],
    scale: { min: 0, max: 100 },
    band: { lowF: 59, highF: 86 },
    endurance: { lowF: 50, highF: 95 },
    unit,
  })['series'] as Series[];

describe('the picture of the trace', () => {
  it('ends the planned line where the plan ends, the dashed one a day later', () => {
    const [, , planned, late] = seriesOf('F');
    expect(planned?.data).toHaveLength(6);
    expect(late?.data).toHaveLength(10);
  });

  it('stacks the ribbon from the low edge up to the high one', () => {
    const [low, height] = seriesOf('F');
    // The sixth row lies 2.5 °F to either side of 66 °F.
    expect(low?.data[5]?.[1]).toBe(63.5);
    expect(height?.data[5]?.[1]).toBe(5);
    expect([low?.stack, height?.stack]).toEqual(['ribbon', 'ribbon']);
  });

  it('lays the band as a zone and the endurance limits as lines, in the unit of the person', () => {
    const planned = seriesOf('C')[2];
    // 59, 86, 50 and 95 °F by C = (F − 32) · 5/9.
    expect(planned?.markArea?.data[0]?.map((edge) => edge.yAxis)).toEqual([15, 30]);
    expect(planned?.markLine?.data.flatMap((line) => line.yAxis ?? [])).toEqual([10, 35]);
  });

  it('numbers every leg', () => {
    expect(seriesOf('F').at(-1)?.data).toHaveLength(6);
  });
});
