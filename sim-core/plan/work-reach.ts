import type { Grid } from '#sim-core/grid/grid.ts';
import { areaCells } from '#sim-core/process/area-cells.ts';
import { moundStrengths } from '#sim-core/process/mound-strengths.ts';
import { plantedClumps } from '#sim-core/process/planted-clumps.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';

/** What one of the works does to growth in the cells that it reaches. */
export interface WorkReach {
  readonly cells: Uint32Array;
  /** years from the survey to the frame in which it first shows */
  readonly after: number;
  /** one value a cell: strength k/255 of a mound, cover of a planting, or clumps that are set */
  readonly amounts: ArrayLike<number>;
  readonly what: 'refuge' | 'cover' | 'clumps';
}

/** Cells and amounts of a mound, planting or clumps; undefined of fences and losses, which growth alone does not feel. */
export function workReach(
  action: Action,
  grid: Grid,
  surveyYear: number,
  capacity: Uint8Array,
): WorkReach | undefined {
  const after = Math.max(0, action.year - surveyYear);
  if (action.kind === 'mound') {
    const { cells, strengths } = moundStrengths(action, grid);
    return { cells, after, amounts: strengths, what: 'refuge' };
  }
  if (action.kind === 'planting') {
    const { cells, share } = areaCells(action.area, grid);
    return {
      cells,
      after,
      amounts: new Float32Array(cells.length).fill(action.cover * share),
      what: 'cover',
    };
  }
  if (action.kind === 'clumps') {
    const { cells, clumps } = plantedClumps(action, grid, capacity);
    return { cells, after, amounts: clumps, what: 'clumps' };
  }
  return undefined;
}
