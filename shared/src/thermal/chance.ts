import type { BoxRun } from './simulate';
import { ThermalError } from './thermal-error';

/** The standard normal distribution function Φ, to about 1e-13 near the middle and relatively as good in the tails. */
export function normalCdf(z: number): number {
  if (z === Infinity) return 1;
  if (z === -Infinity) return 0;
  return 0.5 * erfc(-z / Math.SQRT2);
}

/** Complementary error function: a series near 0, a continued fraction further out (Abramowitz & Stegun 7.1.5 and 7.1.14). */
function erfc(x: number): number {
  if (x < 0) return 2 - erfc(-x);
  if (x > 27) return 0;
  if (x < 2.5) {
    let term = x;
    let sum = x;
    for (let n = 1; n < 80 && Math.abs(term) > 1e-17 * Math.abs(sum); n += 1) {
      term *= (-x * x) / n;
      sum += term / (2 * n + 1);
    }
    return 1 - (2 / Math.sqrt(Math.PI)) * sum;
  }
  let fraction = x;
  for (let n = 60; n >= 1; n -= 1) fraction = x + n / 2 / fraction;
  return Math.exp(-x * x) / (Math.sqrt(Math.PI) * fraction);
}

/** How large a common error, in °F of outdoor air, a run can take before it leaves a band, and where it would. */
export interface BandFit {
  /** The least and the greatest error that keep it inside; the middle is 0 when the run itself is inside. */
  readonly leastF: number;
  readonly mostF: number;
  /** Points at which the band's low and high end are met first; −1 when no outdoor error could do that. */
  readonly lowPoint: number;
  readonly highPoint: number;
  /** A point that does not feel the outdoors and lies outside: nothing helps. −1 when there is none. */
  readonly stuckPoint: number;
}

export interface Band {
  readonly lowF: number;
  readonly highF: number;
}

/** Fits a run into a band. Throws ThermalError `empty-band` when the band has no width. */
export function fitBand(run: Pick<BoxRun, 'tempF' | 'response'>, band: Band): BandFit {
  if (!(band.lowF < band.highF))
    throw new ThermalError('empty-band', 'No temperature suits what is in the box.');
  let [leastF, mostF, lowPoint, highPoint, stuckPoint] = [-Infinity, Infinity, -1, -1, -1];
  const { tempF, response } = run;
  for (let point = 0; point < tempF.length; point += 1) {
    const there = tempF[point] ?? NaN;
    const r = response[point] ?? 0;
    if (r <= 1e-12) {
      if (!(there >= band.lowF && there <= band.highF)) stuckPoint = point;
      continue;
    }
    const low = (band.lowF - there) / r;
    const high = (band.highF - there) / r;
    if (low > leastF) [leastF, lowPoint] = [low, point];
    if (high < mostF) [mostF, highPoint] = [high, point];
  }
  return { leastF, mostF, lowPoint, highPoint, stuckPoint };
}

/** The chance of a fit when the common error is normal with standard deviation `sigmaF`. */
export function chanceOfFit({ leastF, mostF, stuckPoint }: BandFit, sigmaF: number): number {
  if (stuckPoint >= 0 || !(mostF >= leastF)) return 0;
  return normalCdf(mostF / sigmaF) - normalCdf(leastF / sigmaF);
}

/**
 * The chance that the box's air stays in a band all along when every outdoor value is off by one common error, normal with
 * standard deviation `sigmaF` (design 5.4). Where the box does not feel the outdoors the hour must itself lie in the band.
 */
export const chanceInBand = (run: Pick<BoxRun, 'tempF' | 'response'>, band: Band, sigmaF: number): number =>
  chanceOfFit(fitBand(run, band), sigmaF);
