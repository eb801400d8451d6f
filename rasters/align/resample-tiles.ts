import type { Grid } from '#sim-core/grid/grid.ts';
import type { ResamplingMethod } from './alignment-plan.ts';
import type { CellMap } from './cell-map.ts';
import { pacer, type Progress } from './progress.ts';
import { resamplers, type SourceCells } from './resample.ts';
import type { SourceWindow } from './source-window.ts';

export interface TileWork {
  readonly method: Exclude<ResamplingMethod, 'copy'>;
  readonly target: Grid;
  readonly raster: { readonly width: number; readonly height: number };
  readonly cellRatio: number;
  readonly toRaster: CellMap;
  readonly window: SourceWindow;
}

/** Side of a tile of the grid in cells of the raster, about: what a tile needs of it is small beside its strips. */
const tileSide = 256;
const mostCells = 128;
const corners = [0, 1, 1, 0] as const;

/**
 * Goes over the grid in square tiles from the north-west, each with the rectangle of the raster that it needs, and puts a
 * value, or NaN for none, for each cell.
 * @throws RasterError what is wrong with the file; the signal's reason when it is aborted
 */
export async function resampleTiles(
  { method, target, raster, cellRatio, toRaster, window }: TileWork,
  put: (index: number, value: number) => void,
  progress: Progress,
): Promise<void> {
  const side = Math.max(1, Math.min(mostCells, Math.floor(tileSide / Math.max(1, cellRatio))));
  const { points, make } = resamplers[method];
  const valueOf = make();
  const count = points === 'centre' ? 1 : 4;
  const [xs, ys] = [new Float64Array(count), new Float64Array(count)];
  const tell = pacer(progress);
  const locate = placer(toRaster, points === 'centre', side);

  for (let top = 0; top < target.height; top += side) {
    for (let left = 0; left < target.width; left += side) {
      const size = {
        columns: Math.min(side, target.width - left),
        rows: Math.min(side, target.height - top),
      };
      const { box, at } = locate(left, top, size);
      const clip = clipped(box, raster);
      const source: SourceCells | undefined = clip && { ...clip, values: await window.load(clip) };
      for (let row = 0; row < size.rows; row++)
        for (let column = 0; column < size.columns; column++) {
          const index = (top + row) * target.width + left + column;
          if (source && at(column, row, xs, ys)) put(index, valueOf(xs, ys, source, raster));
          else put(index, NaN);
        }
    }
    await tell(Math.min(1, (top + side) / target.height));
  }
}

interface Box {
  west: number;
  north: number;
  east: number;
  south: number;
}

/** The rectangle of whole cells around a box, with the neighbours that bilinear looks at; undefined where there is none. */
function clipped(box: Box, { width, height }: TileWork['raster']) {
  const left = Math.max(0, Math.floor(box.west - 0.5));
  const top = Math.max(0, Math.floor(box.north - 0.5));
  const right = Math.min(width, Math.floor(box.east + 0.5) + 1);
  const bottom = Math.min(height, Math.floor(box.south + 0.5) + 1);
  return right > left && bottom > top ? { left, top, width: right - left, height: bottom - top } : undefined;
}

/** Finds the points of a tile's cells in the raster, each once, and the box around them. */
function placer(toRaster: CellMap, centres: boolean, side: number) {
  const across = centres ? side : side + 1;
  const [xs, ys] = [new Float64Array(across * across), new Float64Array(across * across)];
  const point = [0, 0];
  const shift = centres ? 0.5 : 0;
  const more = centres ? 0 : 1;

  return (left: number, top: number, { columns, rows }: { columns: number; rows: number }) => {
    const box: Box = { west: Infinity, north: Infinity, east: -Infinity, south: -Infinity };
    for (let row = 0; row < rows + more; row++)
      for (let column = 0; column < columns + more; column++) {
        toRaster(left + column + shift, top + row + shift, point);
        const x = point[0];
        const y = point[1];
        xs[row * across + column] = x;
        ys[row * across + column] = y;
        if (x < box.west) box.west = x;
        if (x > box.east) box.east = x;
        if (y < box.north) box.north = y;
        if (y > box.south) box.south = y;
      }
    /** Writes the points of one cell; false where a projection has no such point. */
    const at = (column: number, row: number, outX: Float64Array, outY: Float64Array): boolean => {
      let sum = 0;
      for (let i = 0; i < outX.length; i++) {
        const from = centres ? row * across + column : (row + (i >> 1)) * across + column + corners[i];
        outX[i] = xs[from];
        outY[i] = ys[from];
        sum += xs[from] + ys[from];
      }
      return Number.isFinite(sum);
    };
    return { box, at };
  };
}
