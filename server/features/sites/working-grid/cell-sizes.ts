import type { CellSize } from '#contract/working-grid.ts';
import { featureCautions } from '#contract/grid-cautions.ts';
import type { Plant } from '#contract/plants.ts';
import type { Site } from '#contract/sites.ts';
import { coarsenGrid } from '#rasters/align/suggest-grid.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { fitKernel } from '#sim-core/index.ts';
import { rateProblems } from '#sim-core/run/grid-problems.ts';
import type { StepsPerYear } from '#sim-core/spec/run-spec.ts';

const stepsPerYearOptions: readonly StepsPerYear[] = [1, 2, 4, 12];
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

/** The working cells that a site may have, and what each would mean for its plant and its surveyed points and areas. */
export function cellSizesOf({
  finestGrid,
  plant,
  outlook: { stepsPerYear },
  features,
}: Pick<Site, 'finestGrid' | 'plant' | 'outlook' | 'features'>): CellSize[] {
  return factors
    .map((factor) => ({ factor, grid: gridOfFactor(finestGrid, factor) }))
    .filter(({ factor, grid }) => factor === 1 || (grid.width > 1 && grid.height > 1))
    .map(({ factor, grid }) => {
      const cells = grid.width * grid.height;
      const { warnings, ...front } = frontOn(grid, plant, stepsPerYear);
      return {
        factor,
        grid,
        cells,
        ...front,
        warnings: [...warnings, ...featureCautions(features, grid)],
        memoryBytes: cells * cost.bytesPerCell,
        secondsPerYear: cells * stepsPerYear * cost.secondsPerCellStep,
      };
    });
}

/** v(π/4)/v(0) of the kernel that the plant would have on such cells, or why there would be none. */
function frontOn(
  { cellSize }: Grid,
  { rates, processes = {} }: Plant,
  stepsPerYear: StepsPerYear,
): Pick<CellSize, 'problem' | 'frontRatio' | 'warnings'> {
  const problemsAt = (steps: StepsPerYear) =>
    rateProblems({ rates, processes, stepsPerYear: steps }, cellSize);
  const problems = problemsAt(stepsPerYear);
  if (problems.length > 0) {
    const mends = stepsPerYearOptions.filter((steps) => problemsAt(steps).length === 0);
    const words = problems.map(({ message }) => `${message}.`);
    if (mends.length > 0)
      words.push(
        `With ${mends.join(' or ')} ${mends.at(-1) === 1 ? 'step' : 'steps'} a year one could start.`,
      );
    return { problem: words.join(' '), frontRatio: null, warnings: [] };
  }
  const { frontSpeed, diagonalFrontSpeed, warnings } = fitKernel(rates, cellSize, stepsPerYear);
  return { problem: null, frontRatio: diagonalFrontSpeed / frontSpeed, warnings: [...warnings] };
}
