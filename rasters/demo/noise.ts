/**
 * Seeded noise from an integer hash. It uses whole numbers, + − × ÷ and √ alone, which every machine rounds alike, so
 * the invented site comes out the same everywhere.
 */

/** A number 0 ≤ u < 1 for a place on the integer lattice, from three rounds of multiply and shift. */
export function hash(seed: number, i: number, j = 0): number {
  let h =
    Math.imul(seed ^ 0x9e3779b9, 0x85ebca6b) ^ Math.imul(i | 0, 0xc2b2ae35) ^ Math.imul(j | 0, 0x27d4eb2f);
  h = Math.imul(h ^ (h >>> 15), 0x2c1b3c6d);
  h = Math.imul(h ^ (h >>> 12), 0x297a2d39);
  return ((h ^ (h >>> 15)) >>> 0) / 4_294_967_296;
}

const ease = (t: number): number => t * t * t * (t * (t * 6 - 15) + 10);

/** Smooth noise −1..1 on a lattice of unit spacing. */
export function smoothNoise(seed: number, x: number, y: number): number {
  const i = Math.floor(x);
  const j = Math.floor(y);
  const u = ease(x - i);
  const v = ease(y - j);
  const top = hash(seed, i, j) * (1 - u) + hash(seed, i + 1, j) * u;
  const bottom = hash(seed, i, j + 1) * (1 - u) + hash(seed, i + 1, j + 1) * u;
  return 2 * (top * (1 - v) + bottom * v) - 1;
}

/** Noise of several scales, about −1..1: the first feature is `size` m, each further octave half as large and half as strong. */
export function rough(seed: number, x: number, y: number, size: number, octaves: number): number {
  let sum = 0;
  let weight = 1;
  let total = 0;
  for (let octave = 0; octave < octaves; octave++) {
    sum += weight * smoothNoise(seed + octave * 101, x / size, y / size);
    total += weight;
    weight /= 2;
    size /= 2;
  }
  return sum / total;
}

/** A stream of numbers 0 ≤ u < 1. */
export function randomStream(seed: number): () => number {
  let n = 0;
  return () => hash(seed, n++, 7);
}
