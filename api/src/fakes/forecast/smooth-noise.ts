/** A repeatable number in −1..1 for whole-numbered coordinates and a seed (Murmur3's finalizer over a running mix). */
function lattice(seed: number, x: number, y: number, z: number): number {
  let hash = seed | 0;
  for (const part of [x, y, z]) {
    hash = Math.imul(hash ^ part, 0x85ebca6b);
    hash ^= hash >>> 13;
    hash = Math.imul(hash, 0xc2b2ae35);
    hash ^= hash >>> 16;
  }
  return ((hash >>> 0) / 0xffffffff) * 2 - 1;
}

const ease = (t: number) => t * t * t * (t * (t * 6 - 15) + 10);
const mix = (a: number, b: number, part: number) => a + (b - a) * part;

/**
 * Value noise: smooth in all three directions, within −1..1, with a standard deviation of about 0.35. The same for the
 * same seed and point, whatever was asked before.
 */
export function smoothNoise(seed: number, x: number, y: number, z: number): number {
  const [x0, y0, z0] = [Math.floor(x), Math.floor(y), Math.floor(z)];
  const [px, py, pz] = [ease(x - x0), ease(y - y0), ease(z - z0)];
  const row = (dy: number, dz: number) =>
    mix(lattice(seed, x0, y0 + dy, z0 + dz), lattice(seed, x0 + 1, y0 + dy, z0 + dz), px);
  const sheet = (dz: number) => mix(row(0, dz), row(1, dz), py);
  return mix(sheet(0), sheet(1), pz);
}

/** A small repeatable whole number from a text, for ids and choices that only have to look arbitrary. */
export function hashText(text: string): number {
  let hash = 0x811c9dc5;
  for (const letter of text) hash = Math.imul(hash ^ (letter.codePointAt(0) ?? 0), 0x01000193);
  return hash >>> 0;
}
