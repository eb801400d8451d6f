import type { Grid } from '#sim-core/grid/grid.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';

/** The first mound that lies off the grid, at the coordinate that is wrong; undefined when all lie on it. */
export function checkWorksOnGrid(works: readonly Action[], grid: Grid): FieldProblem | undefined {
  const { originX: west, originY: north, cellSize, width, height } = grid;
  const [east, south] = [west + width * cellSize, north - height * cellSize];
  for (const [i, action] of works.entries()) {
    if (action.kind !== 'mound') continue;
    if (!(action.x >= west && action.x < east))
      return {
        field: `works.${i}.x`,
        message: `Easting ${action.x} lies off the site; expected ${west} to ${east}`,
      };
    if (!(action.y > south && action.y <= north))
      return {
        field: `works.${i}.y`,
        message: `Northing ${action.y} lies off the site; expected ${south} to ${north}`,
      };
  }
  return undefined;
}
