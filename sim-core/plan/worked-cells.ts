import type { WorkReach } from './work-reach.ts';

/** What the works make of one cell. */
export interface WorkedCell {
  /** strongest mound, k/255, 0 of none */
  readonly refuge: number;
  /** years from the survey to the first mound, Infinity of none */
  readonly refugeFrom: number;
  /** what is planted: years from the survey, and the share of its capacity that stands then */
  readonly planted: readonly { readonly after: number; readonly share: number }[];
}

/** The works that reach each cell, so that one can go without the others. */
export interface WorkedCells {
  add(reach: WorkReach): void;
  remove(reach: WorkReach): void;
  /** undefined where no work reaches */
  at(cell: number): WorkedCell | undefined;
}

/**
 * Several mounds on a cell shelter it as the strongest does, from the year of the first; clumps set in a cell in the same
 * year add up.
 *
 * @param capacity k/255
 * @param clumpsOnFullCell ν Δx², clumps on a full cell
 */
export function workedCells(capacity: Uint8Array, clumpsOnFullCell: number): WorkedCells {
  interface Part {
    readonly reach: WorkReach;
    readonly amount: number;
  }
  const parts = new Map<number, Part[]>();

  return {
    add(reach) {
      reach.cells.forEach((cell, i) => {
        if (capacity[cell] === 0) return;
        const there = parts.get(cell);
        const part = { reach, amount: reach.amounts[i] };
        if (there) there.push(part);
        else parts.set(cell, [part]);
      });
    },
    remove(reach) {
      for (const cell of reach.cells) {
        const left = parts.get(cell)?.filter((part) => part.reach !== reach);
        if (left && left.length > 0) parts.set(cell, left);
        else parts.delete(cell);
      }
    },
    at(cell) {
      const there = parts.get(cell);
      if (!there) return undefined;
      let refuge = 0;
      let refugeFrom = Infinity;
      const shares = new Map<number, number>();
      for (const { reach, amount } of there) {
        if (reach.what === 'refuge') {
          if (amount > refuge) refuge = amount;
          if (amount > 0 && reach.after < refugeFrom) refugeFrom = reach.after;
          continue;
        }
        const full = capacity[cell] / 255;
        const before = shares.get(reach.after) ?? 0;
        const share =
          reach.what === 'cover'
            ? Math.max(before, Math.min(1, amount / full))
            : Math.min(1, before + amount / Math.max(1, full * clumpsOnFullCell));
        shares.set(reach.after, share);
      }
      const planted = Array.from(shares, ([after, share]) => ({ after, share })).filter((p) => p.share > 0);
      return { refuge, refugeFrom, planted };
    },
  };
}
