import { contours } from 'd3-contour';
import type { Grid } from '#sim-core/grid/grid.ts';
import { occupiedFrom } from '#sim-core/measure/cover-measures.ts';
import { arrivalField } from '#sim-core/theory/arrival-field.ts';
import type { Point } from './extent.ts';

/**
 * Lines that keep `offset` metres outside of what stands (cells that count as occupied), by the distance from it as
 * growth at one metre a year would tell it. Where the map ends, so do the lines.
 *
 * @param box west, south, east, north of the ground that is of interest, m
 */
export function standingEdge(
  grid: Grid,
  cover: Float32Array,
  offset: number,
  box: readonly [west: number, south: number, east: number, north: number],
): Point[][] {
  const { cellSize, originX, originY } = grid;
  const margin = Math.ceil(offset / cellSize) + 2;
  const left = Math.max(0, Math.floor((box[0] - originX) / cellSize) - margin);
  const right = Math.min(grid.width, Math.ceil((box[2] - originX) / cellSize) + margin);
  const top = Math.max(0, Math.floor((originY - box[3]) / cellSize) - margin);
  const bottom = Math.min(grid.height, Math.ceil((originY - box[1]) / cellSize) + margin);
  const [width, height] = [Math.max(0, right - left), Math.max(0, bottom - top)];
  if (width === 0 || height === 0) return [];
  const beyond = offset + 4 * cellSize;
  const crossing = new Float32Array(width * height).fill(cellSize);
  const field = arrivalField({ width, height, crossing, latest: beyond });
  for (let y = 0; y < height; y++)
    for (let x = 0; x < width; x++)
      if (cover[(top + y) * grid.width + left + x] >= occupiedFrom) field.setStart(y * width + x, 0);
  field.update();
  const nearness = Array.from(crossing, (_, cell) => -Math.min(beyond, field.time(cell)));
  // Distances count from the middles of cells; what stands ends half a cell farther.
  const { coordinates } = contours()
    .size([width, height])
    .contour(nearness, -(offset + cellSize / 2));
  return coordinates.flat().flatMap((ring) => {
    const lines: Point[][] = [];
    let line: Point[] = [];
    ring.forEach(([x, y], i) => {
      const onEdge = x <= 0 || y <= 0 || x >= width || y >= height;
      if (!onEdge) line.push([originX + (left + x) * cellSize, originY - (top + y) * cellSize]);
      if ((onEdge || i === ring.length - 1) && line.length > 0) {
        lines.push(line);
        line = [];
      }
    });
    return lines;
  });
}
