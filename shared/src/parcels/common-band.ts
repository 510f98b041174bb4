interface Banded {
  readonly commonName: string;
  readonly bandLowF: number;
  readonly bandHighF: number;
}

/** The highest low and the lowest high, °F, and whether there is room between them. */
export interface CommonBand {
  readonly ok: boolean;
  readonly lowF: number;
  readonly highF: number;
  /** The kind that needs it warmest and the kind that needs it coolest: when not `ok`, no temperature suits both. */
  readonly warmest: string;
  readonly coolest: string;
}

/**
 * The temperatures (°F) that suit every species in one box: the highest of the lows to the lowest of the highs. A band
 * without any width counts as none, for no box holds a temperature to the degree. Null for an empty box.
 */
export function commonBand(species: readonly Banded[]): CommonBand | null {
  const [first, ...others] = species;
  if (!first) return null;
  let warmest = first;
  let coolest = first;
  for (const one of others) {
    if (one.bandLowF > warmest.bandLowF) warmest = one;
    if (one.bandHighF < coolest.bandHighF) coolest = one;
  }
  const [lowF, highF] = [warmest.bandLowF, coolest.bandHighF];
  return { ok: lowF < highF, lowF, highF, warmest: warmest.commonName, coolest: coolest.commonName };
}

/** Says that something does not go into one box, naming the two kinds that bar it; null when everything does. */
export function bandConflict(species: readonly Banded[]): string | null {
  const band = commonBand(species);
  if (!band || band.ok) return null;
  const message = `${band.warmest} and ${band.coolest} do not go into one box: no temperature suits both.`;
  return message.charAt(0).toUpperCase() + message.slice(1);
}
