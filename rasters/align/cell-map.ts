import type { Grid } from '#sim-core/grid/grid.ts';
import type { RasterDescription } from '#rasters/describe/raster-description.ts';
import { transformer } from '#rasters/geo/transformer.ts';

/** A point in columns and rows of a raster, written into an array so that millions of them leave no rubbish. */
export type Point = Float64Array | number[];
/** Where a point of one raster lies in another; columns and rows are counted from the outer north-western corner. */
export type CellMap = (column: number, row: number, out: Point) => void;

type Rectangle = Pick<RasterDescription, 'originX' | 'originY' | 'cellWidth' | 'cellHeight'>;

const rectangleOf = ({ originX, originY, cellSize }: Grid): Rectangle => ({
  originX,
  originY,
  cellWidth: cellSize,
  cellHeight: cellSize,
});

/**
 * Where points of a grid lie in a raster, and points of the raster in the grid. Both are NaN where a projection has no
 * such point. Results are rounded to 2⁻²⁰ of a cell, so that corners which coincide on paper do so in numbers.
 * @throws RasterError `raster-crs` where the CRSs differ and one of them, or the shift between them, is not known
 */
export function cellMaps(description: RasterDescription, grid: Grid): { toRaster: CellMap; toGrid: CellMap } {
  const { crs } = description;
  const [from, to] = [rectangleOf(grid), description];
  if (crs.epsg === grid.epsg) return { toRaster: straight(from, to), toGrid: straight(to, from) };
  const { forward, inverse } = transformer(grid.epsg, crs.epsg);
  // Longitudes are told apart by whole turns: those of the raster's own numbers count.
  const centre = description.originX + (description.width / 2) * description.cellWidth;
  const turn = crs.kind === 'geographic' ? 360 : Infinity;
  const unwrap = (x: number) => (turn === Infinity ? x : x + turn * Math.round((centre - x) / turn));
  return {
    toRaster: through(from, to, (x, y) => {
      const [longitude, latitude] = forward(x, y);
      return [unwrap(longitude), latitude];
    }),
    toGrid: through(to, from, inverse),
  };
}

const step = 1 << 20;
const snap = (value: number): number => Math.round(value * step) / step;

function straight(from: Rectangle, to: Rectangle): CellMap {
  const [scaleX, scaleY] = [from.cellWidth / to.cellWidth, from.cellHeight / to.cellHeight];
  const [left, top] = [
    (from.originX - to.originX) / to.cellWidth,
    (to.originY - from.originY) / to.cellHeight,
  ];
  return (column, row, out) => {
    out[0] = snap(left + column * scaleX);
    out[1] = snap(top + row * scaleY);
  };
}

function through(
  from: Rectangle,
  to: Rectangle,
  carry: (x: number, y: number) => readonly [number, number],
): CellMap {
  return (column, row, out) => {
    const [x, y] = carry(from.originX + column * from.cellWidth, from.originY - row * from.cellHeight);
    out[0] = snap((x - to.originX) / to.cellWidth);
    out[1] = snap((to.originY - y) / to.cellHeight);
  };
}

/** How far between its nodes a lattice may be off, in cells of the raster. */
const tolerance = 2e-5;
const widestStep = 64;
const finestStep = 4;
const probesAlongSide = 8;

/**
 * A map that is exact on a lattice of points and linear between them, off by less than a ten-thousandth of a raster cell: a
 * projection costs a hundred times as much as drawing a line. Where two cells meet in a corner, both get the same point.
 * A map that bends too much for that is given back as it is.
 * @param width, height of the grid whose points will be asked for, its last corners among them
 */
export function onLattice(exact: CellMap, width: number, height: number): CellMap {
  for (let step = widestStep; step >= finestStep; step /= 2)
    if (bends(exact, step, width, height) < tolerance) return interpolated(exact, step, width, height);
  return exact;
}

function bends(exact: CellMap, step: number, width: number, height: number): number {
  let worst = 0;
  const [p, q, r, s, middle] = Array.from({ length: 5 }, () => [0, 0]);
  const cells = (length: number) => Math.max(1, Math.ceil(length / step));
  for (let i = 0; i <= probesAlongSide; i++)
    for (let j = 0; j <= probesAlongSide; j++) {
      const left = Math.floor((i / probesAlongSide) * (cells(width) - 1)) * step;
      const top = Math.floor((j / probesAlongSide) * (cells(height) - 1)) * step;
      exact(left, top, p);
      exact(left + step, top, q);
      exact(left, top + step, r);
      exact(left + step, top + step, s);
      exact(left + step / 2, top + step / 2, middle);
      for (const axis of [0, 1])
        worst = Math.max(worst, Math.abs((p[axis] + q[axis] + r[axis] + s[axis]) / 4 - middle[axis]) || 0);
    }
  return worst;
}

function interpolated(exact: CellMap, step: number, width: number, height: number): CellMap {
  const across = Math.ceil(width / step) + 1;
  const down = Math.ceil(height / step) + 1;
  const nodes = new Float64Array(2 * across * down);
  const point = [0, 0];
  for (let j = 0, at = 0; j < down; j++)
    for (let i = 0; i < across; i++, at += 2) {
      exact(i * step, j * step, point);
      nodes[at] = point[0];
      nodes[at + 1] = point[1];
    }
  return (column, row, out) => {
    const i = Math.min(across - 2, Math.floor(column / step));
    const j = Math.min(down - 2, Math.floor(row / step));
    const u = column / step - i;
    const v = row / step - j;
    const at = 2 * (j * across + i);
    const below = at + 2 * across;
    for (let axis = 0; axis < 2; axis++) {
      const upper = nodes[at + axis] * (1 - u) + nodes[at + 2 + axis] * u;
      const lower = nodes[below + axis] * (1 - u) + nodes[below + 2 + axis] * u;
      out[axis] = snap(upper * (1 - v) + lower * v);
    }
  };
}
