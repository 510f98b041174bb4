import type { EChartsCoreOption } from 'echarts/core';
import type { RangeF, TemperatureUnit } from '@shared/contract';
import { labelLevels, type TraceLeg, type TracePoint } from './trace-model';

/** Everything the picture shows; temperatures in the unit, but for the limits in °F. */
export interface TracePicture {
  readonly width: number;
  readonly points: readonly TracePoint[];
  readonly legs: readonly TraceLeg[];
  readonly ticks: readonly { readonly atMs: number; readonly label: string }[];
  readonly scale: { readonly min: number; readonly max: number };
  readonly band: RangeF | null;
  readonly endurance: RangeF | null;
  readonly unit: TemperatureUnit;
}

/** Pixels round the plot, the height of the picture and of one row of leg numbers. */
export const traceFrame = { left: 44, right: 10, bottom: 44, height: 340, discRow: 22 };

const ink = 'var(--db-ink-2)';
const font = 'Work Sans, system-ui, sans-serif';

/** The library's option. Colours are custom properties, so both schemes are right without drawing again. */
export function traceOption(picture: TracePicture): EChartsCoreOption {
  const { points, legs, scale, width } = picture;
  const [startMs, endMs] = [points[0]?.atMs ?? 0, points.at(-1)?.atMs ?? 1];
  const plotWidth = Math.max(1, width - traceFrame.left - traceFrame.right);
  const levels = labelLevels(legs, ((endMs - startMs) / plotWidth) * 20);
  const top = traceFrame.discRow * (Math.max(0, ...levels) + 1) + 8;
  const side = { left: traceFrame.left, right: traceFrame.right };
  const x = {
    type: 'value',
    min: startMs,
    max: endMs,
    splitLine: { show: false },
    axisTick: { show: false },
  };
  return {
    animation: false,
    textStyle: { fontFamily: font },
    grid: [
      { ...side, top, bottom: traceFrame.bottom },
      { ...side, top: 4, height: top - 8 },
    ],
    tooltip: {
      trigger: 'axis',
      showContent: false,
      axisPointer: { type: 'line', lineStyle: { color: ink } },
    },
    xAxis: [
      {
        ...x,
        gridIndex: 0,
        axisLine: { lineStyle: { color: 'var(--db-outline)' } },
        axisLabel: clockLabels(picture),
      },
      { ...x, gridIndex: 1, show: false, axisPointer: { show: false } },
    ],
    yAxis: [
      {
        type: 'value',
        gridIndex: 0,
        ...scale,
        axisLabel: { color: ink, fontSize: 12, fontFamily: font, formatter: '{value}°' },
        splitLine: { lineStyle: { color: 'var(--db-line)' } },
        axisPointer: { show: false },
      },
      { type: 'value', gridIndex: 1, min: -0.5, max: Math.max(0, ...levels) + 0.5, show: false },
    ],
    series: [...ribbon(points), plannedLine(picture), lateLine(points), discs(legs, levels)],
  };
}

function clockLabels({ ticks }: TracePicture) {
  const labels = new Map(ticks.map((tick) => [tick.atMs, tick.label]));
  return {
    customValues: ticks.map((tick) => tick.atMs),
    formatter: (value: number) => labels.get(value) ?? '',
    color: ink,
    fontSize: 12,
    fontFamily: font,
    lineHeight: 15,
    showMinLabel: true,
    showMaxLabel: true,
  };
}

// Highlighting lightens a colour by its number, which a custom property does not have: the line would vanish.
const quiet = { type: 'line', symbol: 'none', silent: true, emphasis: { disabled: true } };

/** One forecast error to either side: an unseen line with a filled one stacked on it. */
function ribbon(points: readonly TracePoint[]) {
  const known = points.filter((point) => point.low !== null && point.high !== null);
  const base = { ...quiet, stack: 'ribbon', stackStrategy: 'all', lineStyle: { opacity: 0 } };
  return [
    { ...base, data: known.map((point) => [point.atMs, point.low]) },
    {
      ...base,
      areaStyle: { color: 'var(--db-juniper)', opacity: 0.22 },
      data: known.map((point) => [point.atMs, (point.high ?? 0) - (point.low ?? 0)]),
    },
  ];
}

function plannedLine({ points, legs, band, endurance, unit }: TracePicture) {
  const inUnit = (valueF: number) => (unit === 'C' ? ((valueF - 32) * 5) / 9 : valueF);
  const limits = endurance ? [endurance.lowF, endurance.highF].map(inUnit) : [];
  return {
    ...quiet,
    z: 5,
    lineStyle: { color: 'var(--db-juniper)', width: 2.6 },
    data: points.filter((point) => point.temp !== null).map((point) => [point.atMs, point.temp]),
    ...(band && {
      markArea: {
        silent: true,
        itemStyle: { color: 'var(--db-band)' },
        data: [[{ yAxis: inUnit(band.lowF) }, { yAxis: inUnit(band.highF) }]],
      },
    }),
    markLine: {
      silent: true,
      symbol: 'none',
      label: { show: false },
      data: [
        ...limits.map((value) => ({
          yAxis: value,
          lineStyle: { color: 'var(--db-ochre)', width: 1.4, type: 'solid' },
        })),
        ...legs.slice(1).map((leg) => ({
          xAxis: leg.startMs,
          lineStyle: { color: 'var(--db-outline)', width: 0.8, type: 'dotted' },
        })),
      ],
    },
  };
}

const lateLine = (points: readonly TracePoint[]) => ({
  ...quiet,
  z: 4,
  lineStyle: { color: 'var(--db-dusk)', width: 2.2, type: [7, 5] },
  data: points.filter((point) => point.late !== null).map((point) => [point.atMs, point.late]),
});

/** The legs' numbers in the strip above the plot, on as many rows as they need. */
const discs = (legs: readonly TraceLeg[], levels: readonly number[]) => ({
  type: 'scatter',
  xAxisIndex: 1,
  yAxisIndex: 1,
  silent: true,
  clip: false,
  emphasis: { disabled: true },
  symbolSize: 18,
  data: legs.map((leg, index) => ({
    value: [(leg.startMs + leg.endMs) / 2, levels[index] ?? 0],
    itemStyle: { color: leg.isLate ? 'var(--db-dusk-soft)' : 'var(--db-juniper-soft)' },
    label: {
      show: true,
      formatter: String(leg.number),
      color: 'var(--db-ink)',
      fontSize: 12,
      fontWeight: 600,
      fontFamily: font,
    },
  })),
});
