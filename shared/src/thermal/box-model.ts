import type { Policy } from '../policy/policy';
import { ThermalError } from './thermal-error';
import { inchM } from './units';

/** A box as one lump: what it lets through and what it stores. */
export interface BoxModel {
  readonly uaWPerK: number;
  readonly heatJPerK: number;
}

/** Outer size and foam thickness, inches. */
export interface BoxSize {
  readonly lengthIn: number;
  readonly widthIn: number;
  readonly heightIn: number;
  readonly foamIn: number;
}

/**
 * The lump of a foam-lined box (design 5.3): UA = A / (film + foam + board + film) + holes, with A the mean of the outer and the
 * inner surface; C = empty + specific heat · mass of the contents (grams). Example: 12 × 9 × 6 in with ¾ in foam has 0.363 W/K.
 * Throws ThermalError `bad-box` when the foam leaves no room or a size is not positive, `bad-mass` for a mass below 0.
 */
export function boxModel(box: BoxSize, contentsMassG: number, constants: Policy['boxModel']): BoxModel {
  const { lengthIn, widthIn, heightIn, foamIn } = box;
  const inner = [lengthIn, widthIn, heightIn].map((size) => size - 2 * foamIn) as [number, number, number];
  if (![lengthIn, widthIn, heightIn, foamIn, ...inner].every((size) => Number.isFinite(size) && size > 0))
    throw new ThermalError('bad-box', 'A box needs a positive size, and its foam must leave room inside.');
  if (!(Number.isFinite(contentsMassG) && contentsMassG >= 0))
    throw new ThermalError('bad-mass', 'The contents cannot weigh less than nothing.');
  const areaM2 = ((surface(lengthIn, widthIn, heightIn) + surface(...inner)) / 2) * inchM * inchM;
  const resistance =
    2 * constants.filmM2KPerW +
    (foamIn * inchM) / constants.foamWPerMK +
    constants.boardMm / 1000 / constants.boardWPerMK;
  return {
    uaWPerK: areaM2 / resistance + constants.holesWPerK,
    heatJPerK: constants.emptyJPerK + (constants.contentsJPerKgK * contentsMassG) / 1000,
  };
}

const surface = (l: number, w: number, h: number): number => 2 * (l * w + l * h + w * h);
