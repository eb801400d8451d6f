import type { Action, Area } from '#sim-core/spec/run-spec.ts';
import { areaCells, ringsOf } from '#sim-core/process/area-cells.ts';
import { cellAt, cellCentre, cellIndex, type Grid } from '#sim-core/grid/grid.ts';
import { formatArea, formatNumber } from '#app/lib/formats.ts';
import { crossesItself, type Ring } from '#app/map/rings.ts';

/** What decides where works can stand; row-major, undefined while not known. */
export interface WorksGround {
  readonly grid: Grid;
  /** capacity in 8 bits: 0 cannot hold the plant */
  readonly capacity: Uint8Array | undefined;
  /** where works may go, in 8 bits: 0 may not; undefined where the site has no such layer: everywhere */
  readonly allowed: Uint8Array | undefined;
}

/** A place that cannot be taken, and why. */
export interface RefusedPlace {
  readonly x: number;
  readonly y: number;
  readonly problem: string;
}

/** What keeps works out of a cell, or undefined where they can stand. */
export function closedTo(ground: WorksGround, cell: number): 'not allowed' | 'no plants' | undefined {
  if (ground.allowed?.[cell] === 0) return 'not allowed';
  return ground.capacity?.[cell] === 0 ? 'no plants' : undefined;
}

const reasons = {
  'not allowed':
    'Works are not allowed there, by the layer that says where they may go. Choose allowed ground, or change that layer.',
  'no plants':
    'The plant cannot grow there (capacity 0), so nothing placed there would spread. Choose ground that can hold the plant.',
} as const;

/** Why works cannot stand at a place, in words, or undefined where they can. */
export function placeProblem(ground: WorksGround, x: number, y: number): string | undefined {
  const { grid } = ground;
  const cell = cellAt(grid, x, y);
  if (!cell) return offSite(grid);
  const closed = closedTo(ground, cellIndex(grid, cell.column, cell.row));
  return closed && reasons[closed];
}

/** Whether a corner of an outline lies on the site or on its very edge. */
export function isOnSite({ originX, originY, width, height, cellSize }: Grid, x: number, y: number): boolean {
  const slack = cellSize / 1000;
  return (
    x >= originX - slack &&
    x <= originX + width * cellSize + slack &&
    y <= originY + slack &&
    y >= originY - height * cellSize - slack
  );
}

function offSite({ originX, originY, width, height, cellSize }: Grid): string {
  const east = `${formatNumber(originX)} to ${formatNumber(originX + width * cellSize)}`;
  const north = `${formatNumber(originY - height * cellSize)} to ${formatNumber(originY)}`;
  return `That is off the site: eastings run from ${east} m, northings from ${north} m.`;
}

/** The first place of some works that cannot be taken, or undefined where all can. */
export function worksProblem(ground: WorksGround, works: readonly Action[]): RefusedPlace | undefined {
  for (const work of works) {
    const found = workProblem(ground, work);
    if (found) return found;
  }
  return undefined;
}

/** Where and why one of the works cannot stand. A loss is expected, not done, so it asks for no leave. */
export function workProblem(ground: WorksGround, work: Action): RefusedPlace | undefined {
  if (work.kind === 'mound') return pointProblem(ground, work.x, work.y);
  if (work.kind === 'clumps') {
    for (const [x, y] of work.points) {
      const found = pointProblem(ground, x, y);
      if (found) return found;
    }
    return undefined;
  }
  return areaProblem(ground, work.area, work.kind !== 'loss');
}

function pointProblem(ground: WorksGround, x: number, y: number): RefusedPlace | undefined {
  const problem = placeProblem(ground, x, y);
  return problem === undefined ? undefined : { x, y, problem };
}

function areaProblem(ground: WorksGround, area: Area, works: boolean): RefusedPlace | undefined {
  const { grid } = ground;
  const ring: Ring = area.shape === 'disc' ? [[area.x, area.y]] : area.ring;
  for (const [x, y] of ring) if (!isOnSite(grid, x, y)) return { x, y, problem: offSite(grid) };
  const [x, y] = ring[ring.length - 1];
  if (area.shape === 'polygon' && ringsOf(area).some(crossesItself))
    return { x, y, problem: 'Two sides of the outline cross, so its inside cannot be told. Move a corner.' };
  const { cells } = areaCells(area, grid);
  if (cells.length === 0)
    return { x, y, problem: 'The outline holds the middle of no cell. Draw it larger than a cell.' };
  if (works) {
    const forbidden = cells.find((cell) => closedTo(ground, cell) === 'not allowed');
    if (forbidden !== undefined)
      return {
        ...centreOf(grid, forbidden),
        problem: `Works are not allowed in a part of the outline (${formatArea(
          cells.filter((cell) => closedTo(ground, cell) === 'not allowed').length * grid.cellSize ** 2,
        )}). Keep it on allowed ground, or change the layer that says where works may go.`,
      };
  }
  if (cells.every((cell) => ground.capacity?.[cell] === 0))
    return { x, y, problem: 'The plant can grow nowhere in this outline (capacity 0).' };
  return undefined;
}

const centreOf = (grid: Grid, cell: number) =>
  cellCentre(grid, cell % grid.width, Math.floor(cell / grid.width));
