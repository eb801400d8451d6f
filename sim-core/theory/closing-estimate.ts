import type { Grid } from '#sim-core/grid/grid.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import { occupiedFrom } from '#sim-core/measure/cover-measures.ts';
import type { StepsPerYear } from '#sim-core/spec/run-spec.ts';
import { arrivalTimes } from './arrival-time.ts';
import { localGrowth, type GrowthRates } from './local-growth.ts';

export interface ClosingEstimateInput {
  readonly grid: Pick<Grid, 'width' | 'height' | 'cellSize'>;
  /** `refuge` with the mounds that are planned; their years are left out */
  readonly ground: Pick<Ground, 'capacity' | 'vigour' | 'refuge' | 'cover'>;
  readonly rates: GrowthRates;
  readonly stepsPerYear: StepsPerYear;
  /** cells that are planted, each some years after the survey, up to a cover */
  readonly plantings?: Iterable<{ readonly cell: number; readonly after: number; readonly cover: number }>;
  /** of the arrival times; 1 unless said, which is late by up to a cell or so on the diagonals, and twice as fast */
  readonly order?: 1 | 2;
}

/**
 * Years from the survey until each cell has closed (half its reference), without a run, losses or chance: until growth
 * arrives from the nearest foothold in time, and then until the cell fills from the share at which it counts as
 * occupied. A foothold below that share starts once it has grown to it.
 *
 * @returns Float32, row-major; Infinity where growth never arrives, NaN where the cell cannot hold the plant
 * @throws RunProblem where no kernel gives the rates on such cells (`fitKernel`)
 */
export function closingEstimate(input: ClosingEstimateInput): Float32Array {
  const { grid, ground, rates, stepsPerYear, plantings = [], order } = input;
  const { width, height, cellSize } = grid;
  const { capacity, vigour, refuge, cover } = ground;
  const growthOf = localGrowth(rates, cellSize, stepsPerYear);
  const cells = width * height;
  const speed = new Float32Array(cells);
  const starts = new Float64Array(cells).fill(Infinity);
  /** years until what stands or is planted in a cell fills it by itself */
  const alone = new Float64Array(cells).fill(Infinity);

  function foothold(cell: number, after: number, held: number): void {
    const share = Math.min(1, held / (capacity[cell] / 255));
    if (!(share > 0) || speed[cell] === 0) return;
    const { fill } = growthOf(vigour[cell], refuge[cell]);
    const own = fill(share);
    alone[cell] = Math.min(alone[cell], after + own);
    starts[cell] = Math.min(starts[cell], after + Math.max(0, own - fill(occupiedFrom)));
  }

  for (let cell = 0; cell < cells; cell++) {
    if (capacity[cell] === 0) continue;
    speed[cell] = growthOf(vigour[cell], refuge[cell]).speed;
    if (cover[cell] > 0) foothold(cell, 0, cover[cell]);
  }
  for (const { cell, after, cover: planted } of plantings) foothold(cell, after, planted);

  const arrivals = arrivalTimes({ width, height, cellSize, speed, starts, order });
  return Float32Array.from(arrivals, (arrival, cell) =>
    speed[cell] === 0
      ? NaN
      : Math.min(alone[cell], arrival + growthOf(vigour[cell], refuge[cell]).fill(occupiedFrom)),
  );
}
