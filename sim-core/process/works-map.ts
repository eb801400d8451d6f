import { coverOfClumps, type Kernel } from '#sim-core/kernel/kernel.ts';
import type { PhiloxKey } from '#sim-core/random/streams.ts';

/** What works change, and the luck with which they do where clumps are counted. */
export interface WorksMap {
  readonly kernel: Kernel;
  readonly capacity: Uint8Array;
  /** F surveyed, k/255 */
  readonly fence: Uint8Array;
  /** clump sites of a cell, by capacity byte; counts alone reads them */
  readonly sites: Uint32Array;
  /** ν Δx², clumps on a cell of full capacity; may be less than one */
  readonly clumpsOnFullCell: number;
  readonly luck: PhiloxKey;
  readonly replicate: number;
}

/** Puts the clumps of a cell, and the cover that they make. */
export function setClumps(
  { kernel, capacity, sites }: Pick<WorksMap, 'kernel' | 'capacity' | 'sites'>,
  cell: number,
  clumps: number,
): void {
  if (!kernel.clumps) return;
  kernel.clumps[cell] = clumps;
  kernel.cover[cell] = coverOfClumps(capacity[cell], clumps, sites[capacity[cell]]);
}
