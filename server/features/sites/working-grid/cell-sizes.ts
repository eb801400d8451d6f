import type { CellSize } from '#contract/working-grid.ts';
import type { Outlook } from '#contract/outlooks.ts';
import type { Plant } from '#contract/sites.ts';
import { coarsenGrid } from '#rasters/align/suggest-grid.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { fitKernel, RunProblem } from '#sim-core/index.ts';

/** Times the side of the finest cell. */
const factors = [1, 2, 3, 4, 5, 6, 8, 10] as const;

/**
 * What a run costs on one core, with counts, on ground that is covered all over: 73 to 78 ns a cell and step, and 37
 * bytes a cell between maps of 1,000² and 2,000² cells. Measured on 2026-12-01 in Node 20 on a shared machine of two
 * cores; bare cells cost less, and browsers hold the pictures of the map besides.
 */
export const cost = { secondsPerCellStep: 75e-9, bytesPerCell: 40 } as const;

/** The grid whose cells are `factor` times as wide as the finest that the site may have. */
export const gridOfFactor = (finest: Grid, factor: number): Grid =>
  coarsenGrid(finest, finest.cellSize * factor);

/** The working cells that a site may have, and what each would mean for its plant. */
export function cellSizesOf(
  finest: Grid,
  plant: Plant,
  { stepsPerYear }: Pick<Outlook, 'stepsPerYear'>,
): CellSize[] {
  return factors
    .map((factor) => ({ factor, grid: gridOfFactor(finest, factor) }))
    .filter(({ factor, grid }) => factor === 1 || (grid.width > 1 && grid.height > 1))
    .map(({ factor, grid }) => {
      const cells = grid.width * grid.height;
      return {
        factor,
        grid,
        cells,
        ...frontOn(grid, plant, stepsPerYear),
        memoryBytes: cells * cost.bytesPerCell,
        secondsPerYear: cells * stepsPerYear * cost.secondsPerCellStep,
      };
    });
}

/** v(π/4)/v(0) of the kernel that the plant would have on such cells. */
function frontOn(
  { cellSize }: Grid,
  { rates }: Plant,
  stepsPerYear: Outlook['stepsPerYear'],
): Pick<CellSize, 'frontRatio' | 'warnings'> {
  try {
    const { frontSpeed, diagonalFrontSpeed, warnings } = fitKernel(rates, cellSize, stepsPerYear);
    return { frontRatio: frontSpeed > 0 ? diagonalFrontSpeed / frontSpeed : null, warnings: [...warnings] };
  } catch (error) {
    if (!(error instanceof RunProblem)) throw error;
    return { frontRatio: null, warnings: error.problems.map(({ message }) => `${message}.`) };
  }
}
