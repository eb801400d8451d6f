import type { Ground } from '#sim-core/grid/ground.ts';
import { wholeClumps } from '#sim-core/process/works.ts';
import { cellLuck, processes } from '#sim-core/random/cell-luck.ts';
import { philoxKey } from '#sim-core/random/streams.ts';

/** Surveyed cover, never above capacity; Float32, a fresh array. */
export function surveyedCover({ cover, capacity }: Pick<Ground, 'cover' | 'capacity'>): Float32Array {
  const held = new Float32Array(cover.length);
  for (let i = 0; i < held.length; i++) held[i] = Math.min(cover[i], Math.fround(capacity[i] / 255));
  return held;
}

/**
 * Surveyed cover as clumps on sites. A survey seldom makes whole clumps: what is left over is one more by luck that
 * hangs on the seed alone, so all replicates start from the same ground.
 *
 * @param sites by capacity byte (`clumpSites`)
 */
export function surveyedClumps(
  { cover, capacity }: Pick<Ground, 'cover' | 'capacity'>,
  sites: Uint32Array,
  seed: string,
): Uint32Array {
  const luck = cellLuck(philoxKey(seed, 'survey'), 0, 0, processes.survey);
  const clumps = new Uint32Array(cover.length);
  for (let i = 0; i < clumps.length; i++)
    if (cover[i] > 0 && capacity[i] > 0)
      clumps[i] = wholeClumps(cover[i], i, { capacity, sites }, luck(i).free);
  return clumps;
}
