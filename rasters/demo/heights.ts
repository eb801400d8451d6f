import { habitatValue } from './classes.ts';
import type { CreekField } from './creeks.ts';
import { rough } from './noise.ts';

/** Invented, like the site: where the ground of each class lies, m above the site's own invented datum. */
const meanHeight: Readonly<Record<number, number>> = {
  [habitatValue.bank]: 0.2,
  [habitatValue.low]: 0.55,
  [habitatValue.high]: 0.72,
  [habitatValue.levee]: 0.85,
};
/** How far heights rise and fall around it, m: less than from one class to the next but one. */
const ripple = 0.07;

/**
 * Heights of the invented site, m: creeks lowest and deeper towards their middle, banks above them, the low platform, the
 * high one, and the levees highest. Held to the centimetre.
 */
export function heightField(
  width: number,
  height: number,
  { edgeDistance }: Pick<CreekField, 'edgeDistance'>,
  habitat: Uint8Array,
  seed: number,
): Float32Array {
  const heights = new Float32Array(width * height);
  for (let row = 0, cell = 0; row < height; row++)
    for (let column = 0; column < width; column++, cell++) {
      const mean =
        habitat[cell] === habitatValue.creek
          ? -0.1 - 0.14 * Math.min(9, Math.max(0, -edgeDistance[cell]))
          : meanHeight[habitat[cell]];
      heights[cell] = Math.round(100 * (mean + ripple * rough(seed, column, row, 18, 3))) / 100;
    }
  return heights;
}
