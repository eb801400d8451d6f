import { cellAt, cellCentre, type Grid } from '#sim-core/grid/grid.ts';
import type { Area } from '#sim-core/spec/places.ts';

/** Cells of an area, ascending, and the share of each that it takes. */
export interface AreaCells {
  readonly cells: Uint32Array;
  readonly share: number;
}

/**
 * Cells whose centre lies in the area. A disc too small to hold a centre takes the cell that holds its middle, for the
 * share that its own area is of the cell. Empty where the area lies off the grid or, a polygon, between centres.
 */
export function areaCells(area: Area, grid: Grid): AreaCells {
  const cells =
    area.shape === 'disc' ? discCells(area.x, area.y, area.radius, grid) : polygonCells(area, grid);
  if (cells.length === 0 && area.shape === 'disc') {
    const middle = cellAt(grid, area.x, area.y);
    if (middle)
      return {
        cells: Uint32Array.of(middle.row * grid.width + middle.column),
        share: discShare(area.radius, grid),
      };
  }
  return { cells: Uint32Array.from(cells), share: 1 };
}

/** Every cell of a grid. */
export const wholeGrid = ({ width, height }: Pick<Grid, 'width' | 'height'>): AreaCells => ({
  cells: Uint32Array.from({ length: width * height }, (_, cell) => cell),
  share: 1,
});

/** Share of a cell that a disc smaller than it takes. */
export const discShare = (radius: number, grid: Grid): number =>
  Math.min(1, (Math.PI * radius * radius) / (grid.cellSize * grid.cellSize));

/** Columns and rows of the cells that may have their centre within `reach` of a point. */
export function boxAround(x: number, y: number, reach: number, grid: Grid) {
  const column = (x - grid.originX) / grid.cellSize - 0.5;
  const row = (grid.originY - y) / grid.cellSize - 0.5;
  const cells = reach / grid.cellSize;
  return {
    left: Math.max(0, Math.ceil(column - cells)),
    right: Math.min(grid.width - 1, Math.floor(column + cells)),
    top: Math.max(0, Math.ceil(row - cells)),
    bottom: Math.min(grid.height - 1, Math.floor(row + cells)),
  };
}

function discCells(x: number, y: number, radius: number, grid: Grid): number[] {
  const { left, right, top, bottom } = boxAround(x, y, radius, grid);
  const cells: number[] = [];
  for (let row = top; row <= bottom; row++)
    for (let column = left; column <= right; column++) {
      const centre = cellCentre(grid, column, row);
      const [dx, dy] = [centre.x - x, centre.y - y];
      if (dx * dx + dy * dy <= radius * radius) cells.push(row * grid.width + column);
    }
  return cells;
}

type Ring = readonly (readonly [x: number, y: number])[];

/** The outline of a polygon and those of its holes. */
export const ringsOf = ({ ring, holes = [] }: Extract<Area, { shape: 'polygon' }>): readonly Ring[] => [
  ring,
  ...holes,
];

/** Rows of the cells that outlines may touch; none where `bottom` is less than `top`. */
export function outlineRows(rings: readonly Ring[], grid: Grid): { top: number; bottom: number } {
  let [highest, lowest] = [-Infinity, Infinity];
  for (const ring of rings)
    for (const [, y] of ring) [highest, lowest] = [Math.max(highest, y), Math.min(lowest, y)];
  const row = (y: number) => Math.floor((grid.originY - y) / grid.cellSize);
  return { top: Math.max(0, row(highest)), bottom: Math.min(grid.height - 1, row(lowest)) };
}

/** Where outlines cross a line from west to east, ascending; the inside lies between each pair, by the even-odd rule. */
export function crossingsAt(rings: readonly Ring[], y: number): number[] {
  const crossings: number[] = [];
  for (const ring of rings)
    ring.forEach(([x0, y0], i) => {
      const [x1, y1] = ring[(i + 1) % ring.length];
      if (y0 > y !== y1 > y) crossings.push(x0 + ((y - y0) / (y1 - y0)) * (x1 - x0));
    });
  return crossings.sort((a, b) => a - b);
}

/** Row by row: the columns whose centre lies between each pair of crossings of the row's middle line. */
function polygonCells(area: Extract<Area, { shape: 'polygon' }>, grid: Grid): number[] {
  const cells: number[] = [];
  const rings = ringsOf(area);
  const { top, bottom } = outlineRows(rings, grid);
  for (let row = top; row <= bottom; row++) {
    const crossings = crossingsAt(rings, cellCentre(grid, 0, row).y);
    for (let pair = 0; pair + 1 < crossings.length; pair += 2) {
      const from = Math.max(0, Math.ceil((crossings[pair] - grid.originX) / grid.cellSize - 0.5));
      const to = Math.min(grid.width, Math.ceil((crossings[pair + 1] - grid.originX) / grid.cellSize - 0.5));
      for (let column = from; column < to; column++) cells.push(row * grid.width + column);
    }
  }
  return cells;
}
