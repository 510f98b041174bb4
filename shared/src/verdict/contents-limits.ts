import type { ContentLine } from '../contract/days';
import type { Species } from '../contract/places';
import { badInput } from '../errors';
import { bandConflict, commonBand } from '../parcels/common-band';

/** The temperature limits of a species, °F, as far as verdicts need them. */
export type SpeciesLimits = Pick<
  Species,
  | 'id'
  | 'commonName'
  | 'bandLowF'
  | 'bandHighF'
  | 'enduranceLowF'
  | 'enduranceHighF'
  | 'outdoorLowF'
  | 'outdoorHighF'
>;

/** One line of a box's contents with the limits of its species. */
export interface ContentsLine extends Pick<ContentLine, 'quantity' | 'massG'> {
  readonly species: SpeciesLimits;
}

/** Limits that hold for everything in the box; null outdoor limits: the species set none of their own. */
export interface ContentsLimits {
  readonly bandLowF: number;
  readonly bandHighF: number;
  readonly enduranceLowF: number;
  readonly enduranceHighF: number;
  readonly outdoorLowF: number | null;
  readonly outdoorHighF: number | null;
}

/**
 * The intersection of all limits in the box; the band may be empty (see `assertCommonBand`). Throws RangeError for an empty box.
 */
export function contentsLimits(contents: readonly ContentsLine[]): ContentsLimits {
  const all = contents.map((line) => line.species);
  const band = commonBand(all);
  if (!band) throw new RangeError('There is nothing in the box.');
  const lows = all.flatMap((one) => (one.outdoorLowF === null ? [] : [one.outdoorLowF]));
  const highs = all.flatMap((one) => (one.outdoorHighF === null ? [] : [one.outdoorHighF]));
  return {
    bandLowF: band.lowF,
    bandHighF: band.highF,
    enduranceLowF: Math.max(...all.map((one) => one.enduranceLowF)),
    enduranceHighF: Math.min(...all.map((one) => one.enduranceHighF)),
    outdoorLowF: lows.length > 0 ? Math.max(...lows) : null,
    outdoorHighF: highs.length > 0 ? Math.min(...highs) : null,
  };
}

/** The limits of a box's contents. Throws bad-input at `contents`, naming the two species whose bands do not meet. */
export function assertCommonBand(contents: readonly ContentsLine[]): ContentsLimits {
  const message = bandConflict(contents.map(({ species }) => species));
  if (message !== null) throw badInput([{ path: 'contents', message }]);
  return contentsLimits(contents);
}
