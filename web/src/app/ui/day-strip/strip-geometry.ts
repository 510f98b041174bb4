import type { DayVerdict, RangeF, TemperatureUnit, Verdict } from '@shared/contract';

/** A vertical or horizontal piece of the picture in pixels: where it starts and how long it is. */
export interface Span {
  readonly start: number;
  readonly length: number;
}

export interface StripColumn {
  readonly index: number;
  readonly verdict: Verdict;
  /** Left edge, middle and width of the column. */
  readonly x: number;
  readonly mid: number;
  readonly width: number;
  readonly outdoor: Span | null;
  readonly inBox: Span | null;
  readonly barWidth: number;
}

export interface Tick {
  readonly at: number;
  /** The temperature in whole degrees of the unit. */
  readonly label: string;
  readonly isBand: boolean;
}

export interface StripGeometry {
  readonly left: number;
  readonly top: number;
  readonly bottom: number;
  readonly band: Span | null;
  readonly ticks: readonly Tick[];
  readonly columns: readonly StripColumn[];
}

/** The picture's frame in pixels: the whole width, the room for the scale at the left, the plot's top and bottom. */
export interface StripFrame {
  readonly width: number;
  readonly left: number;
  readonly top: number;
  readonly bottom: number;
}

type Drawn = Pick<DayVerdict, 'verdict' | 'outdoor' | 'inBox'>;

/** Bars never shrink below this, so that a range of no degrees still shows. */
const leastBar = 4;

/**
 * Lowest and highest temperature of the picture in °F: everything that is drawn with 4 °F to spare, in whole fives.
 * Without any temperature it is an ordinary winter's 20 to 90 °F.
 */
export function stripScale(
  days: readonly Pick<DayVerdict, 'outdoor' | 'inBox'>[],
  band: RangeF | null,
): RangeF {
  const ranges = [band, ...days.flatMap((day) => [day.outdoor, day.inBox])].filter((range) => range !== null);
  if (ranges.length === 0) return { lowF: 20, highF: 90 };
  const low = Math.min(...ranges.map((range) => range.lowF));
  const high = Math.max(...ranges.map((range) => range.highF));
  return { lowF: Math.floor((low - 4) / 5) * 5, highF: Math.ceil((high + 4) / 5) * 5 };
}

/**
 * Lines of the scale as °F with their labels: the band's two edges first, then round steps that keep clear of them
 * (by a ninth of the scale), so that no two labels meet.
 */
export function stripTicks(
  scale: RangeF,
  band: RangeF | null,
  unit: TemperatureUnit,
): { valueF: number; label: string; isBand: boolean }[] {
  const toUnit = (valueF: number) => (unit === 'C' ? ((valueF - 32) * 5) / 9 : valueF);
  const toF = (value: number) => (unit === 'C' ? (value * 9) / 5 + 32 : value);
  const label = (valueF: number) => `${Math.round(toUnit(valueF))}°`;
  const edges = band ? [band.lowF, band.highF] : [];
  const [low, high] = [toUnit(scale.lowF), toUnit(scale.highF)];
  const step = [5, 10, 20, 40].find((size) => (high - low) / size <= 6) ?? 50;
  const clear = (scale.highF - scale.lowF) / 9;
  const round: number[] = [];
  for (let value = Math.ceil(low / step) * step; value <= high; value += step) round.push(toF(value));
  return [
    ...edges.map((valueF) => ({ valueF, label: label(valueF), isBand: true })),
    ...round
      .filter((valueF) => edges.every((edge) => Math.abs(edge - valueF) >= clear))
      .map((valueF) => ({ valueF, label: label(valueF), isBand: false })),
  ];
}

/** Everything the wide picture draws, one column a day; warm is up. */
export function stripGeometry(
  days: readonly Drawn[],
  band: RangeF | null,
  unit: TemperatureUnit,
  frame: StripFrame,
): StripGeometry {
  const scale = stripScale(days, band);
  const { left, top, bottom } = frame;
  const y = (valueF: number) =>
    bottom - ((valueF - scale.lowF) / (scale.highF - scale.lowF)) * (bottom - top);
  const span = (range: RangeF | null): Span | null => range && barSpan(y(range.highF), y(range.lowF));
  const width = days.length === 0 ? 0 : (frame.width - left) / days.length;
  return {
    left,
    top,
    bottom,
    band: span(band),
    ticks: stripTicks(scale, band, unit).map((tick) => ({
      at: y(tick.valueF),
      label: tick.label,
      isBand: tick.isBand,
    })),
    columns: days.map((day, index) => ({
      index,
      verdict: day.verdict,
      x: left + index * width,
      mid: left + (index + 0.5) * width,
      width,
      outdoor: span(day.outdoor),
      inBox: span(day.inBox),
      barWidth: Math.min(26, width * 0.4),
    })),
  };
}

/** The narrow picture: spans in percent of a row's width, cold at the left. */
export interface RowGeometry {
  readonly band: Span | null;
  readonly ticks: readonly Tick[];
  readonly rows: readonly { readonly outdoor: Span | null; readonly inBox: Span | null }[];
}

/** Everything the narrow picture draws, one row a day; warm is right. */
export function rowGeometry(days: readonly Drawn[], band: RangeF | null, unit: TemperatureUnit): RowGeometry {
  const scale = stripScale(days, band);
  const x = (valueF: number) => ((valueF - scale.lowF) / (scale.highF - scale.lowF)) * 100;
  const span = (range: RangeF | null): Span | null =>
    range && { start: x(range.lowF), length: Math.max(x(range.highF) - x(range.lowF), 1.5) };
  return {
    band: span(band),
    ticks: stripTicks(scale, band, unit).map((tick) => ({
      at: x(tick.valueF),
      label: tick.label,
      isBand: tick.isBand,
    })),
    rows: days.map((day) => ({ outdoor: span(day.outdoor), inBox: span(day.inBox) })),
  };
}

/** Breaks a short text into at most `most` lines of so many characters, at spaces; what is left over ends in "…". */
export function wrapWords(text: string, characters: number, most = 3): readonly string[] {
  const lines: string[] = [];
  for (const word of text.split(' ').filter(Boolean)) {
    const last = lines.at(-1);
    if (last !== undefined && `${last} ${word}`.length <= characters)
      lines[lines.length - 1] = `${last} ${word}`;
    else lines.push(word);
  }
  if (lines.length <= most) return lines;
  return [...lines.slice(0, most - 1), `${lines[most - 1] ?? ''}…`];
}

function barSpan(start: number, end: number): Span {
  const length = end - start;
  return length >= leastBar ? { start, length } : { start: (start + end - leastBar) / 2, length: leastBar };
}
