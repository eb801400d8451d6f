import type { Grid } from '#sim-core/grid/grid.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { Action, Area } from '#sim-core/spec/run-spec.ts';

type Place = readonly [x: number, y: number, fieldOfX: string, fieldOfY: string];

/**
 * The first mound or clump that lies off the grid, at the coordinate that is wrong, or area that lies beyond it; undefined
 * when there is none. Areas may reach beyond: a run leaves out what lies outside. Whether the ground can hold the plant is
 * known to rasters alone; the page and the run look at it.
 */
export function checkWorksOnGrid(works: readonly Action[], grid: Grid): FieldProblem | undefined {
  const { originX: west, originY: north, cellSize, width, height } = grid;
  const [east, south] = [west + width * cellSize, north - height * cellSize];
  for (const [i, action] of works.entries()) {
    for (const [x, y, fieldOfX, fieldOfY] of placesOf(action)) {
      if (!(x >= west && x < east))
        return {
          field: `works.${i}.${fieldOfX}`,
          message: `Easting ${x} lies off the site; expected ${west} to ${east}`,
        };
      if (!(y > south && y <= north))
        return {
          field: `works.${i}.${fieldOfY}`,
          message: `Northing ${y} lies off the site; expected ${south} to ${north}`,
        };
    }
    if (!('area' in action)) continue;
    const box = boxOf(action.area);
    if (box.east <= west || box.west >= east || box.north <= south || box.south >= north)
      return {
        field: `works.${i}.area`,
        message: `This ${action.kind} lies off the site; expected a part of it between eastings ${west} and ${east} and northings ${south} and ${north}`,
      };
  }
  return undefined;
}

function placesOf(action: Action): Place[] {
  if (action.kind === 'mound') return [[action.x, action.y, 'x', 'y']];
  if (action.kind === 'clumps')
    return action.points.map(([x, y], i): Place => [x, y, `points.${i}.0`, `points.${i}.1`]);
  return [];
}

/** The smallest box around an area. */
function boxOf(area: Area): { west: number; east: number; south: number; north: number } {
  if (area.shape === 'disc') {
    const { x, y, radius } = area;
    return { west: x - radius, east: x + radius, south: y - radius, north: y + radius };
  }
  const box = { west: Infinity, east: -Infinity, south: Infinity, north: -Infinity };
  for (const [x, y] of area.ring) {
    box.west = Math.min(box.west, x);
    box.east = Math.max(box.east, x);
    box.south = Math.min(box.south, y);
    box.north = Math.max(box.north, y);
  }
  return box;
}
