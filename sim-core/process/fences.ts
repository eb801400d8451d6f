import type { AreaCells } from './area-cells.ts';

/** A fence, rasterised: F of its cells, k/255, from `from` to the end of `until`. */
export interface Fence extends AreaCells {
  readonly strength: number;
  readonly from: number;
  /** undefined: it stays */
  readonly until: number | undefined;
}

/** F as it stands in a year: the larger of what was surveyed and what the fences that stand then keep out. */
export function standingFences(
  fences: readonly Fence[],
  year: number,
  surveyed: Uint8Array,
  into: Uint8Array,
): void {
  into.set(surveyed);
  for (const { cells, share, strength, from, until = Infinity } of fences) {
    if (year < from || year > until) continue;
    const F = Math.round(255 * strength * share);
    for (const cell of cells) if (into[cell] < F) into[cell] = F;
  }
}
