import { degreeLengths } from '#rasters/geo/cell-area.ts';
import { ellipsoidOf, toOwnDegrees } from '#rasters/geo/transformer.ts';
import { RasterError } from '#rasters/read/raster-error.ts';
import type { CrsDescription, LonLatBox, RasterDescription } from './raster-description.ts';

type Rectangle = Pick<
  RasterDescription,
  'width' | 'height' | 'originX' | 'originY' | 'cellWidth' | 'cellHeight'
>;

/** Lengths of the CRS that are off by less count as those on the ground: UTM is off by 0.04 % to 0.1 %. */
const mostDistortion = 0.02;
const stepsAlongSide = 16;

/**
 * How large cells are on the ground and where they lie in degrees. Degrees, and projections whose lengths are more than
 * 2 % off here (such as Mercator away from the equator), are measured on the CRS's ellipsoid at the raster's centre by the
 * lengths of a degree; the lengths of other projections are taken as they are.
 * @throws RasterError `raster-not-georeferenced` where the coordinates lie outside the CRS, `raster-crs`
 */
export function groundSize(
  rectangle: Rectangle,
  crs: CrsDescription,
): Pick<RasterDescription, 'cellMetres' | 'metresTrue' | 'lonLat'> {
  const { width, height, originX, originY, cellWidth, cellHeight } = rectangle;
  const nominal = {
    width: cellWidth * (crs.metresPerUnit ?? 1),
    height: cellHeight * (crs.metresPerUnit ?? 1),
  };
  const degrees = ownDegrees(crs);
  if (!degrees) return { cellMetres: nominal, metresTrue: true, lonLat: null };

  const [x, y] = [originX + (width / 2) * cellWidth, originY - (height / 2) * cellHeight];
  const [longitude, latitude] = degrees.forward(x, y);
  if (!(Math.abs(latitude) <= 90 && Math.abs(longitude) <= 540)) throw elsewhere(crs, x, y);
  const degree = degreeLengths(latitude, ellipsoidOf(degrees.epsg));
  const across = (dx: number, dy: number) => {
    const [west, south] = degrees.forward(x - dx / 2, y - dy / 2);
    const [east, north] = degrees.forward(x + dx / 2, y + dy / 2);
    return Math.hypot(wrap(east - west) * degree.longitude, (north - south) * degree.latitude);
  };
  const ground = { width: across(cellWidth, 0), height: across(0, cellHeight) };
  const off = Math.max(
    Math.abs(ground.width / nominal.width - 1),
    Math.abs(ground.height / nominal.height - 1),
  );
  const metresTrue = crs.kind === 'projected' && off < mostDistortion;
  return {
    cellMetres: metresTrue ? nominal : ground,
    metresTrue,
    lonLat: boxOf(rectangle, degrees, longitude),
  };
}

/** A CRS that is not in the register, or cannot be computed, can still be a site's own. */
function ownDegrees(crs: CrsDescription): (ReturnType<typeof toOwnDegrees> & { epsg: number }) | undefined {
  try {
    return { ...toOwnDegrees(crs.epsg), epsg: crs.epsg };
  } catch (error) {
    if (error instanceof RasterError) return undefined;
    throw error;
  }
}

function boxOf(
  { width, height, originX, originY, cellWidth, cellHeight }: Rectangle,
  { forward }: ReturnType<typeof toOwnDegrees>,
  centre: number,
): LonLatBox | null {
  const box = { west: Infinity, south: Infinity, east: -Infinity, north: -Infinity };
  for (let i = 0; i <= stepsAlongSide; i++)
    for (const [column, row] of [
      [(i / stepsAlongSide) * width, 0],
      [(i / stepsAlongSide) * width, height],
      [0, (i / stepsAlongSide) * height],
      [width, (i / stepsAlongSide) * height],
    ]) {
      const [longitude, latitude] = forward(originX + column * cellWidth, originY - row * cellHeight);
      // Across 180° the box runs on, so that west stays below east.
      const east = centre + wrap(longitude - centre);
      if (!Number.isFinite(east + latitude)) return null;
      box.west = Math.min(box.west, east);
      box.east = Math.max(box.east, east);
      box.south = Math.min(box.south, latitude);
      box.north = Math.max(box.north, latitude);
    }
  return box;
}

/** A difference of longitudes within 180 degrees. */
const wrap = (degrees: number): number => degrees - 360 * Math.round(degrees / 360);

const elsewhere = ({ name }: CrsDescription, x: number, y: number): RasterError =>
  new RasterError('raster-not-georeferenced', {
    found: `coordinates around ${x}, ${y}, which lie outside ${name}`,
    expected: 'coordinates of the CRS that the file names',
    remedy: 'Find out in which CRS they are and say so with gdal_translate -a_srs EPSG:n IN.tif OUT.tif.',
  });
