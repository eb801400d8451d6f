import { distanceTo } from '#sim-core/measure/distance-transform.ts';
import { quantiles } from '#sim-core/ensemble/quantile.ts';
import { bare, standing, unknown } from './map-agreement.ts';

/** How far the simulated edge lies from the surveyed one, in metres; above 0 where it lies outside what stands in the survey. */
export interface EdgeDisplacement {
  /** cells of the simulated edge that were measured */
  readonly cells: number;
  readonly mean: number;
  /** mean size, whatever the side */
  readonly meanSize: number;
  /** 5, 50 and 95 % */
  readonly quantiles: readonly [number, number, number];
}

/**
 * Signed distances from the cells of the simulated edge (standing cells with a bare one beside them) to the surveyed
 * edge, which runs between a standing cell and a bare one: half a cell off the centres on either side.
 *
 * @param surveyed row-major, `bare`, `standing` or `unknown`
 * @param simulated row-major, not 0 where plants stand
 * @param cellSize m
 * @returns undefined where either map has no edge: there is nothing to measure between
 */
export function edgeDisplacement(
  surveyed: Uint8Array,
  simulated: ArrayLike<number>,
  { width, height, cellSize }: { width: number; height: number; cellSize: number },
): EdgeDisplacement | undefined {
  const isStanding = surveyed.map((value) => (value === standing ? 1 : 0));
  const isBare = surveyed.map((value) => (value === bare ? 1 : 0));
  if (!isStanding.includes(1) || !isBare.includes(1)) return undefined;
  const toStanding = distanceTo(isStanding, width, height);
  const toBare = distanceTo(isBare, width, height);
  const distances: number[] = [];
  for (let y = 0; y < height; y++)
    for (let x = 0; x < width; x++) {
      const cell = y * width + x;
      if (!simulated[cell] || surveyed[cell] === unknown || !isEdge(simulated, surveyed, x, y, width, height))
        continue;
      // A standing cell's outer border lies half a cell beyond its centre, as the surveyed edge does.
      const off = surveyed[cell] === standing ? 1 - toBare[cell] : toStanding[cell];
      distances.push(off * cellSize);
    }
  if (distances.length === 0) return undefined;
  const sum = distances.reduce((total, d) => total + d, 0);
  const size = distances.reduce((total, d) => total + Math.abs(d), 0);
  const [low, middle, high] = quantiles(distances, [0.05, 0.5, 0.95]);
  return {
    cells: distances.length,
    mean: sum / distances.length,
    meanSize: size / distances.length,
    quantiles: [low, middle, high],
  };
}

/** Whether a bare cell that the survey knows lies to the west, east, north or south. */
function isEdge(
  simulated: ArrayLike<number>,
  surveyed: Uint8Array,
  x: number,
  y: number,
  width: number,
  height: number,
): boolean {
  const cell = y * width + x;
  const bareAt = (other: number) => !simulated[other] && surveyed[other] !== unknown;
  return (
    (x > 0 && bareAt(cell - 1)) ||
    (x < width - 1 && bareAt(cell + 1)) ||
    (y > 0 && bareAt(cell - width)) ||
    (y < height - 1 && bareAt(cell + width))
  );
}
