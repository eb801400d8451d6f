import type { Grid } from '#sim-core/grid/grid.ts';
import type { SiteRow } from './entities/site.ts';

/** The working grid of a site. */
export const gridOf = ({ width, height, cellSize, originX, originY, epsg }: SiteRow): Grid => ({
  width,
  height,
  cellSize,
  originX,
  originY,
  epsg,
});
