import { transformer } from '#rasters/geo/transformer.ts';
import { crsDefinition } from '#rasters/geo/epsg-register.ts';
import { RasterError } from '#rasters/read/raster-error.ts';
import { ProblemError } from '#server/middleware/problem-error.ts';

/** Between a CRS and the CRS of a site. */
export interface PlaceProjection {
  readonly crsName: string;
  /** into the site's CRS, to the millimetre where the CRSs differ */
  readonly toSite: (point: Point) => Point;
  readonly fromSite: (point: Point) => Point;
}
export type Point = readonly [x: number, y: number];

export const wgs84 = 4326;

/**
 * The way between the CRS of a file and that of a site.
 * @throws ProblemError `invalid-request` where the register or the shift is not known
 */
export function projectionBetween(fileEpsg: number, siteEpsg: number): PlaceProjection {
  if (fileEpsg === siteEpsg)
    return { crsName: nameOf(siteEpsg), toSite: (point) => point, fromSite: (point) => point };
  try {
    const way = transformer(fileEpsg, siteEpsg);
    return {
      crsName: nameOf(fileEpsg),
      toSite: ([x, y]) => inMillimetres(way.forward(x, y)),
      fromSite: ([x, y]) => way.inverse(x, y),
    };
  } catch (error) {
    if (!(error instanceof RasterError)) throw error;
    throw new ProblemError(
      'invalid-request',
      `Places cannot be carried between EPSG:${fileEpsg} and the site’s EPSG:${siteEpsg}: found ${error.found}; ` +
        `expected ${error.expected}.`,
    );
  }
}

/** Nine decimals of a degree are a tenth of a millimetre, so that what was exported comes back to the same millimetre. */
const inMillimetres = ([x, y]: Point): Point => [Math.round(x * 1000) / 1000, Math.round(y * 1000) / 1000];

/** A degree with nine decimals. */
export const inDegrees = ([lon, lat]: Point): [lon: number, lat: number] => [
  Number(lon.toFixed(9)),
  Number(lat.toFixed(9)),
];

const nameOf = (epsg: number): string => {
  try {
    return `${crsDefinition(epsg).name}, EPSG:${epsg}`;
  } catch {
    return `EPSG:${epsg}`;
  }
};
