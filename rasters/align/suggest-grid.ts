import type { Grid } from '#sim-core/grid/grid.ts';
import type { CrsDescription, RasterDescription } from '#rasters/describe/raster-description.ts';
import { crsDefinition, findCrs } from '#rasters/geo/epsg-register.ts';
import { fittingUtm } from '#rasters/geo/fitting-utm.ts';
import { RasterError } from '#rasters/read/raster-error.ts';
import type { SuggestedGrid } from './alignment-plan.ts';
import { cellMaps } from './cell-map.ts';

/** Sides of a cell that differ by less than a hundredth of a cell over ten thousand are square. */
const square = 1e-6;
const stepsAlongSide = 32;

/**
 * The working grid that fits a site's first raster: its own cells where these are square and in metres, else square ones
 * at the finer side in its CRS, else, for degrees, feet and lengths that are not those on the ground, cells of about its
 * size (three digits) in the fitting UTM zone.
 * @throws RasterError `raster-crs` where the raster's CRS cannot be transformed
 */
export function suggestGrid(description: RasterDescription): SuggestedGrid {
  const { crs, metresTrue, cellWidth, cellHeight, cellMetres, lonLat } = description;
  const side = Math.min(cellWidth, cellHeight);
  const isSquare = Math.abs(cellWidth - cellHeight) <= square * side;
  const notSquare = `Its cells are ${short(cellMetres.width)} × ${short(cellMetres.height)} m, and the site’s must be square.`;
  if (crs.unit === 'metre' && metresTrue)
    return {
      grid: isSquare ? ownGrid(description) : newGridFor(description, crs.epsg, side),
      crs,
      asInFile: isSquare,
      reasons: isSquare ? [] : [notSquare],
    };

  if (!lonLat) throw cannotMove(crs);
  const epsg = fittingUtm(
    (lonLat.west + lonLat.east) / 2,
    (lonLat.south + lonLat.north) / 2,
    crsDefinition(crs.epsg).datum,
  );
  const { name, kind, unit, metresPerUnit } = crsDefinition(epsg);
  const cellSize = Number(Math.min(cellMetres.width, cellMetres.height).toPrecision(3));
  return {
    grid: newGridFor(description, epsg, cellSize),
    crs: { epsg, name, kind, unit, metresPerUnit },
    asInFile: false,
    reasons: [reasonToMove(crs), ...(isSquare && crs.kind === 'projected' ? [] : [notSquare])],
  };
}

/** The raster's own cells as a grid, for square cells in metres. */
export function ownGrid({ width, height, originX, originY, cellWidth, crs }: RasterDescription): Grid {
  return { width, height, cellSize: cellWidth, originX, originY, epsg: crs.epsg };
}

function reasonToMove({ name, unit, metresPerUnit }: CrsDescription): string {
  const why = {
    degree: 'It is in degrees',
    foot: 'It is in feet',
    'us-foot': 'It is in US survey feet',
    metre: 'Its metres are not those on the ground here',
    other: `Its unit is ${metresPerUnit} m long`,
  }[unit];
  return `${why} (${name}), and the site’s cells are measured in metres.`;
}

const short = (metres: number): string => String(Number(metres.toPrecision(4)));

/**
 * A grid of square cells that holds the whole raster in a projected CRS in metres. In another CRS than the raster's its
 * corner stands on whole multiples of the cell size, so that grids made of rasters side by side fit together.
 * @throws RasterError `raster-crs` where the CRS is not in metres or the raster's cannot be transformed into it
 */
export function newGridFor(description: RasterDescription, epsg: number, cellSize: number): Grid {
  const { crs, originX, originY } = description;
  const own = crs.epsg === epsg;
  if (own ? crs.unit !== 'metre' : findCrs(epsg)?.unit !== 'metre') throw notMetres(epsg);
  const box = extentIn(description, epsg, cellSize);
  const west = own ? originX : cellSize * floor(box.west / cellSize);
  const north = own ? originY : cellSize * -floor(-box.north / cellSize);
  return {
    width: Math.max(1, -floor((west - box.east) / cellSize)),
    height: Math.max(1, -floor((box.south - north) / cellSize)),
    cellSize,
    originX: west,
    originY: north,
    epsg,
  };
}

/** The whole number below, where rounding errors do not make it one less. */
const floor = (value: number): number => Math.floor(value + 1e-6);

/** The box around a raster in another CRS, its sides followed as the projection bends them. */
function extentIn(description: RasterDescription, epsg: number, cellSize: number) {
  const { width, height } = description;
  const { toGrid } = cellMaps(description, { width: 1, height: 1, cellSize, originX: 0, originY: 0, epsg });
  const box = { west: Infinity, south: Infinity, east: -Infinity, north: -Infinity };
  const point = [0, 0];
  for (let i = 0; i <= stepsAlongSide; i++) {
    const [x, y] = [(i / stepsAlongSide) * width, (i / stepsAlongSide) * height];
    for (const [column, row] of [
      [x, 0],
      [x, height],
      [0, y],
      [width, y],
    ]) {
      toGrid(column, row, point);
      if (!Number.isFinite(point[0] + point[1])) throw cannotMove(description.crs);
      box.west = Math.min(box.west, point[0] * cellSize);
      box.east = Math.max(box.east, point[0] * cellSize);
      box.south = Math.min(box.south, -point[1] * cellSize);
      box.north = Math.max(box.north, -point[1] * cellSize);
    }
  }
  return box;
}

/**
 * The same ground by larger cells, with the same north-western corner; where they do not fill it evenly, the last column
 * and row reach beyond it.
 * @throws RangeError for cells that are smaller than the grid's
 */
export function coarsenGrid(grid: Grid, cellSize: number): Grid {
  if (!(cellSize >= grid.cellSize))
    throw new RangeError(`Found cells of ${cellSize} m; expected at least the grid’s ${grid.cellSize} m.`);
  const cells = (length: number) => Math.ceil((length * grid.cellSize) / cellSize - 1e-6);
  return { ...grid, cellSize, width: cells(grid.width), height: cells(grid.height) };
}

const cannotMove = ({ epsg, name }: CrsDescription): RasterError =>
  new RasterError('raster-crs', {
    found: `${name} (EPSG:${epsg}), from which nothing can be transformed here`,
    expected: 'a CRS in metres, or one of the common projections',
    remedy:
      'Reproject it to the UTM zone of the site, for example gdalwarp -t_srs EPSG:32631 IN.tif OUT.tif.',
  });

const notMetres = (epsg: number): RasterError =>
  new RasterError('raster-crs', {
    found: `EPSG:${epsg} for the site`,
    expected: 'a projected CRS in metres',
    remedy: 'Choose the UTM zone of the site, or another projected CRS in metres.',
  });
