interface Banded {
  readonly commonName: string;
  readonly bandLowF: number;
  readonly bandHighF: number;
}

export type CommonBand =
  | { readonly ok: true; readonly lowF: number; readonly highF: number }
  /** The kind that needs it warmest and the kind that needs it coolest: no temperature suits both. */
  | { readonly ok: false; readonly warmest: string; readonly coolest: string };

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
  if (warmest.bandLowF < coolest.bandHighF)
    return { ok: true, lowF: warmest.bandLowF, highF: coolest.bandHighF };
  return { ok: false, warmest: warmest.commonName, coolest: coolest.commonName };
}
