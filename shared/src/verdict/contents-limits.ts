import type { ContentLine } from '../contract/days';
import type { Species } from '../contract/places';
import { badInput } from '../errors';

/** The temperature limits of a species, °F, as far as verdicts need them. */
export type SpeciesLimits = Pick<
  Species,
  'id' | 'commonName' | 'bandLowF' | 'bandHighF' | 'enduranceLowF' | 'enduranceHighF' | 'outdoorLowF' | 'outdoorHighF'
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

/** Two species whose bands do not meet: the one that must stay warmer and the one that must stay cooler. */
export interface BandConflict {
  readonly warmer: SpeciesLimits;
  readonly cooler: SpeciesLimits;
}

/** The intersection of all limits in the box; the band may be empty (see `bandConflict`). Contents must not be empty. */
export function contentsLimits(contents: readonly ContentsLine[]): ContentsLimits {
  const all = contents.map((line) => line.species);
  const lows = all.flatMap((one) => (one.outdoorLowF === null ? [] : [one.outdoorLowF]));
  const highs = all.flatMap((one) => (one.outdoorHighF === null ? [] : [one.outdoorHighF]));
  return {
    bandLowF: Math.max(...all.map((one) => one.bandLowF)),
    bandHighF: Math.min(...all.map((one) => one.bandHighF)),
    enduranceLowF: Math.max(...all.map((one) => one.enduranceLowF)),
    enduranceHighF: Math.min(...all.map((one) => one.enduranceHighF)),
    outdoorLowF: lows.length > 0 ? Math.max(...lows) : null,
    outdoorHighF: highs.length > 0 ? Math.min(...highs) : null,
  };
}

/** The two species that make the common band empty, or null when there is one. A band of a single degree counts as one. */
export function bandConflict(contents: readonly ContentsLine[]): BandConflict | null {
  const all = contents.map((line) => line.species);
  const [first] = all;
  if (!first) return null;
  const warmer = all.reduce((most, one) => (one.bandLowF > most.bandLowF ? one : most), first);
  const cooler = all.reduce((least, one) => (one.bandHighF < least.bandHighF ? one : least), first);
  return warmer.bandLowF > cooler.bandHighF ? { warmer, cooler } : null;
}

/** The limits of a box's contents. Throws bad-input at `contents`, naming the two species whose bands do not meet. */
export function assertCommonBand(contents: readonly ContentsLine[]): ContentsLimits {
  const conflict = bandConflict(contents);
  if (conflict) {
    const { warmer, cooler } = conflict;
    const message =
      `A ${warmer.commonName} needs at least ${warmer.bandLowF} °F and a ${cooler.commonName} at most ` +
      `${cooler.bandHighF} °F: they cannot share a box.`;
    throw badInput([{ path: 'contents', message }], message);
  }
  return contentsLimits(contents);
}
