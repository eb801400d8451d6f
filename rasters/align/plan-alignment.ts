import { gridDifferences, type Grid } from '#sim-core/grid/grid.ts';
import type { CrsDescription, RasterDescription } from '#rasters/describe/raster-description.ts';
import { findCrs } from '#rasters/geo/epsg-register.ts';
import { toOwnDegrees, transformer } from '#rasters/geo/transformer.ts';
import { RasterError } from '#rasters/read/raster-error.ts';
import type {
  AlignmentCaution,
  AlignmentPlan,
  CellShare,
  RasterContent,
  ResamplingMethod,
} from './alignment-plan.ts';
import { cellMaps, type CellMap } from './cell-map.ts';
import { methodCaution, methodsFor, usualMethod } from './methods.ts';
import { overlap } from './overlap.ts';

/** How far a raster's cells may lie beside the grid's, in cells, and count as the same. */
const sameLattice = 1e-3;
const mostCoarser = 1024;

export interface AlignmentWish {
  /** band, counted from 1 */
  readonly band: number;
  readonly content: RasterContent;
  /** the grid that the values shall stand on */
  readonly grid: Grid;
  /** one of `methodsFor(content)`; the usual one unless said */
  readonly method?: ResamplingMethod;
}

/**
 * Works out what it takes to bring one band of a raster onto a grid, and what is lost on the way, from its description.
 * @throws RasterError `raster-elsewhere` where raster and grid do not meet, `raster-crs` where the CRSs cannot be brought
 *   together, `raster-bands` where there is no such band, `raster-too-large` where the grid is far too coarse
 * @throws RangeError where the method does not fit the content
 */
export function planAlignment(description: RasterDescription, wish: AlignmentWish): AlignmentPlan {
  const { content, grid } = wish;
  const band = description.bands.find(({ index, role }) => index === wish.band && role === 'data');
  if (!band) throw noBand(description, wish.band);
  if (wish.method && !methodsFor(content).some((m) => m === wish.method))
    throw new RangeError(
      `Found method ${wish.method} for ${content}; expected ${methodsFor(content).join(' or ')}.`,
    );

  const maps = cellMaps(description, grid);
  const cellRatio = ratioAtCentre(grid, maps.toRaster, description);
  if (cellRatio > mostCoarser) throw tooCoarse(cellRatio);
  const shift = wholeCells(description, grid, maps.toRaster);
  const usual = shift ? 'copy' : usualMethod(content, cellRatio);
  const method = shift ? 'copy' : (wish.method ?? usual);
  const { cropped, padded } = whatIsLost(description, grid, maps, shift !== undefined);
  if (padded.cells >= grid.width * grid.height || !Number.isFinite(padded.cells))
    throw elsewhere(description, grid);

  const reprojection = reprojectionOf(description.crs, grid.epsg);
  return {
    band: wish.band,
    content,
    target: grid,
    method,
    usualMethod: usual,
    sameCells: shift !== undefined && isSame(description, grid),
    turned: description.southUp,
    reprojection,
    cellRatio,
    cropped,
    padded,
    scaling: band.scale === 1 && band.offset === 0 ? null : { scale: band.scale, offset: band.offset },
    cautions: cautionsOf(description, { content, method, cellRatio, padded, reprojection, grid }),
  };
}

/** Side of a cell of the grid in cells of the raster, by the area of the cell in the grid's middle. */
function ratioAtCentre(grid: Grid, toRaster: CellMap, { cellMetres }: RasterDescription): number {
  const [column, row] = [Math.floor(grid.width / 2), Math.floor(grid.height / 2)];
  const [a, b, c] = [
    [0, 0],
    [0, 0],
    [0, 0],
  ];
  toRaster(column, row, a);
  toRaster(column + 1, row, b);
  toRaster(column, row + 1, c);
  const area = Math.abs((b[0] - a[0]) * (c[1] - a[1]) - (c[0] - a[0]) * (b[1] - a[1]));
  return Number.isFinite(area) && area > 0
    ? Math.sqrt(area)
    : grid.cellSize / Math.sqrt(cellMetres.width * cellMetres.height);
}

/** By how many whole cells the grid's corner lies within the raster, where both have one lattice; else undefined. */
export function wholeCells(
  description: RasterDescription,
  grid: Grid,
  toRaster: CellMap,
): { columns: number; rows: number } | undefined {
  if (description.crs.epsg !== grid.epsg) return undefined;
  const [near, far] = [
    [0, 0],
    [0, 0],
  ];
  toRaster(0, 0, near);
  toRaster(grid.width, grid.height, far);
  const [columns, rows] = near.map(Math.round);
  const off = Math.max(
    Math.abs(near[0] - columns),
    Math.abs(near[1] - rows),
    Math.abs(far[0] - columns - grid.width),
    Math.abs(far[1] - rows - grid.height),
  );
  return off < sameLattice ? { columns, rows } : undefined;
}

const isSame = (description: RasterDescription, grid: Grid): boolean =>
  gridDifferences({ ...description, cellSize: description.cellWidth, epsg: grid.epsg }, grid).length === 0;

function whatIsLost(
  raster: RasterDescription,
  grid: Grid,
  { toRaster, toGrid }: { toRaster: CellMap; toGrid: CellMap },
  whole: boolean,
): { cropped: CellShare; padded: CellShare } {
  const round = (covered: number, all: number): CellShare => {
    // What is less than half a cell is a matter of rounding.
    const cells = Math.min(all, Math.max(0, Math.round(all - covered)));
    return { cells, share: cells / all };
  };
  const covered = overlap(raster, grid, toGrid);
  const [inGrid, inRaster] = whole ? [covered, covered] : [covered, overlap(grid, raster, toRaster)];
  return {
    cropped: round(inRaster, raster.width * raster.height),
    padded: round(inGrid, grid.width * grid.height),
  };
}

function reprojectionOf(from: CrsDescription, epsg: number): AlignmentPlan['reprojection'] {
  if (from.epsg === epsg) return null;
  const to = findCrs(epsg);
  if (!to) return null;
  const { name, kind, unit, metresPerUnit } = to;
  return {
    from,
    to: { epsg, name, kind, unit, metresPerUnit },
    datumShift: transformer(from.epsg, epsg).datumShift,
  };
}

function cautionsOf(
  description: RasterDescription,
  plan: Pick<AlignmentPlan, 'content' | 'method' | 'cellRatio' | 'padded' | 'reprojection'> & { grid: Grid },
): AlignmentCaution[] {
  const { content, method, cellRatio, padded, reprojection, grid } = plan;
  const cautions: AlignmentCaution[] = [];
  const shift = reprojection?.datumShift;
  if (shift && shift.accuracy !== 0)
    cautions.push({
      code: 'datum-shift',
      text:
        shift.accuracy === null
          ? `The shift from ${shift.from} to ${shift.to} is of unknown accuracy; check the result against a place you know.`
          : `The shift from ${shift.from} to ${shift.to} is good to about ${shift.accuracy} m; cells are ${grid.cellSize} m.`,
    });
  if (outsideUse(description))
    cautions.push({
      code: 'outside-use',
      text: `The raster lies outside the area for which ${description.crs.name} is meant. Its CRS may be wrong.`,
    });
  const lost = methodCaution(content, method, cellRatio);
  if (lost) cautions.push({ code: 'method', text: lost });
  if (padded.share > 0.5)
    cautions.push({
      code: 'mostly-outside',
      text: `The raster reaches only ${percent(1 - padded.share)} of the site; the rest becomes no data.`,
    });
  if (cellRatio < 0.5)
    cautions.push({
      code: 'finer-than-source',
      text: `The site’s cells are ${Math.round(1 / cellRatio)} times narrower than the raster’s: they show no more than it holds.`,
    });
  return cautions;
}

const percent = (share: number): string =>
  `${share < 0.1 ? (100 * share).toFixed(1) : Math.round(100 * share)} %`;

/** Areas of use are boxes and end at coasts and borders, so a tenth of a degree beyond is no sign of anything. */
const besideUse = 0.1;

function outsideUse({ crs, lonLat }: RasterDescription): boolean {
  const use = findCrs(crs.epsg)?.use;
  // A box whose west lies east of its east runs across 180°, and is left alone.
  if (!use || !lonLat || use.west > use.east) return false;
  const [longitude, latitude] = [(lonLat.west + lonLat.east) / 2, (lonLat.south + lonLat.north) / 2];
  const near = longitude - 360 * Math.round((longitude - (use.west + use.east) / 2) / 360);
  return (
    near < use.west - besideUse ||
    near > use.east + besideUse ||
    latitude < use.south - besideUse ||
    latitude > use.north + besideUse
  );
}

const noBand = ({ bands }: RasterDescription, band: number): RasterError =>
  new RasterError('raster-bands', {
    found: `no band ${band} with values among ${bands.length}`,
    expected: `one of band ${bands.flatMap(({ role, index }) => (role === 'data' ? [index] : [])).join(', ')}`,
    remedy: 'Choose the band that holds the layer.',
  });

const tooCoarse = (ratio: number): RasterError =>
  new RasterError('raster-too-large', {
    found: `cells of the grid that are ${Math.round(ratio)} times as wide as those of the raster`,
    expected: `at most ${mostCoarser} times`,
    remedy:
      'Choose smaller cells, or make the raster coarser first, for example gdalwarp -tr 10 10 -r average IN.tif OUT.tif.',
  });

function elsewhere(description: RasterDescription, grid: Grid): RasterError {
  const { lonLat, crs } = description;
  return new RasterError('raster-elsewhere', {
    found: `a raster ${lonLat ? `around ${place((lonLat.west + lonLat.east) / 2, (lonLat.south + lonLat.north) / 2)}` : `in ${crs.name}`}`,
    expected: `one that reaches into the site${around(grid)}`,
    remedy: 'Check that this is the right file, and that the CRS it names is the one its coordinates are in.',
  });
}

function around({ epsg, originX, originY, width, height, cellSize }: Grid): string {
  try {
    const { forward } = toOwnDegrees(epsg);
    return `, around ${place(...forward(originX + (width / 2) * cellSize, originY - (height / 2) * cellSize))}`;
  } catch {
    return '';
  }
}

const place = (longitude: number, latitude: number): string =>
  `${Math.abs(latitude).toFixed(3)}° ${latitude < 0 ? 'S' : 'N'}, ${Math.abs(longitude).toFixed(3)}° ${longitude < 0 ? 'W' : 'E'}`;
