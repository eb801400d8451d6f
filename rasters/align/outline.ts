import type { Grid } from '#sim-core/grid/grid.ts';
import type { RasterDescription } from '#rasters/describe/raster-description.ts';
import { cellMaps } from './cell-map.ts';

/** Straight sides bend in another CRS; so many pieces a side show it. */
const piecesAlongSide = 8;

/**
 * The outline of a raster in the CRS of a grid, clockwise from its north-western corner, [x, y] in m; points that the
 * grid's CRS cannot show are left out.
 * @throws RasterError `raster-crs` where the CRSs cannot be brought together
 */
export function outlineOn(description: RasterDescription, grid: Grid): [x: number, y: number][] {
  const { width, height, crs } = description;
  const { toGrid } = cellMaps(description, grid);
  const pieces = crs.epsg === grid.epsg ? 1 : piecesAlongSide;
  const corners = [
    [0, 0],
    [width, 0],
    [width, height],
    [0, height],
  ];
  const outline: [number, number][] = [];
  const point = [0, 0];
  corners.forEach(([fromX, fromY], side) => {
    const [toX, toY] = corners[(side + 1) % 4];
    for (let i = 0; i < pieces; i++) {
      const t = i / pieces;
      toGrid(fromX + t * (toX - fromX), fromY + t * (toY - fromY), point);
      const [x, y] = [grid.originX + point[0] * grid.cellSize, grid.originY - point[1] * grid.cellSize];
      if (Number.isFinite(x + y)) outline.push([x, y]);
    }
  });
  return outline;
}
