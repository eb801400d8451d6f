import proj4 from 'proj4';
import { RasterError } from '#rasters/read/raster-error.ts';
import type { CrsDefinition, DatumShift } from './crs-definition.ts';
import { shiftToWgs84 } from './datum-shifts.ts';
import { checkAxes, crsDefinition } from './epsg-register.ts';

/** Carries points from one CRS into another: easting and northing, or longitude and latitude in degrees. */
export interface Transformer {
  /** not finite where the point lies outside what a projection can show */
  readonly forward: (x: number, y: number) => readonly [x: number, y: number];
  readonly inverse: (x: number, y: number) => readonly [x: number, y: number];
  /** what the move between two datums is worth; null where both CRSs stand on one datum */
  readonly datumShift: DatumShift | null;
}

/**
 * The way from one CRS to another by proj4, which knows shifts of three and seven parameters. Shifts that take a grid
 * file go by the seven parameters of `datum-shifts.ts` where these are good to some metres, and are refused elsewhere.
 * @throws RasterError `raster-crs` where a code, a projection or a shift is not known
 */
export function transformer(fromEpsg: number, toEpsg: number): Transformer {
  const [from, to] = [crsDefinition(fromEpsg), crsDefinition(toEpsg)];
  const { fromShift, toShift, datumShift } = shiftBetween(from, to);
  const way = converter(from, `${stripped(from)}${fromShift}`, to, `${stripped(to)}${toShift}`);
  return { ...way, datumShift };
}

/**
 * Between a CRS and longitude and latitude on its own datum: no shift, so it is exact for every datum. For areas, lengths
 * and the choice of a zone; off WGS 84 by the shift, up to some hundred metres.
 * @throws RasterError `raster-crs` where the code or the projection is not known
 */
export function toOwnDegrees(epsg: number): Pick<Transformer, 'forward' | 'inverse'> {
  const crs = crsDefinition(epsg);
  const shape = stripped(crs)
    .split(' ')
    .filter((part) => /^\+(ellps|a|b|R|rf|datum)=/.test(part));
  return converter(crs, stripped(crs), crs, `+proj=longlat ${shape.join(' ')} +no_defs`);
}

/** Semi-major axis in metres and squared eccentricity of a CRS's ellipsoid. @throws RasterError `raster-crs` */
export function ellipsoidOf(epsg: number): { a: number; e2: number } {
  const crs = crsDefinition(epsg);
  try {
    const { a, es } = proj4.Proj(stripped(crs)) as unknown as { a: number; es: number };
    return { a, e2: es };
  } catch {
    throw unknownProjection(crs);
  }
}

/** The definition without its shift. `@null` says that there is none, and belongs to the sphere of web maps. */
const stripped = ({ proj4: text }: CrsDefinition): string =>
  text.replace(/\s*\+towgs84=\S+/, '').replace(/\s*\+nadgrids=(?!@null)("[^"]*"|\S+)/, '');

function shiftBetween(
  from: CrsDefinition,
  to: CrsDefinition,
): { fromShift: string; toShift: string; datumShift: DatumShift | null } {
  if (from.datum === to.datum) return { fromShift: '', toShift: '', datumShift: null };
  const [a, b] = [from, to].map((crs) => {
    const shift = shiftToWgs84(crs.datum, crs.proj4, crs.accuracy);
    if (!shift) throw noShift(crs, crs === from ? to : from);
    return shift;
  });
  return {
    fromShift: shiftPart(from, a.towgs84),
    toShift: shiftPart(to, b.towgs84),
    datumShift: {
      from: datumName(from),
      to: datumName(to),
      accuracy: a.accuracy === null || b.accuracy === null ? null : a.accuracy + b.accuracy,
    },
  };
}

const shiftPart = ({ proj4: text }: CrsDefinition, towgs84: string): string =>
  /\+datum=|\+nadgrids=@null/.test(text) ? '' : ` +towgs84=${towgs84}`;

/** The datum as people write it: the register joins its words by underscores. */
const datumName = ({ datum }: CrsDefinition): string => datum.replaceAll('_', ' ');

function converter(
  from: CrsDefinition,
  fromText: string,
  to: CrsDefinition,
  toText: string,
): Pick<Transformer, 'forward' | 'inverse'> {
  for (const crs of [from, to]) checkAxes(crs);
  const way = makeConverter(fromText, toText) ?? refuse(from, to);
  const carry =
    (step: (point: [number, number]) => [number, number]) =>
    (x: number, y: number): readonly [number, number] =>
      Number.isFinite(x) && Number.isFinite(y) ? step([x, y]) : [NaN, NaN];
  return { forward: carry((p) => way.forward(p)), inverse: carry((p) => way.inverse(p)) };
}

function makeConverter(fromText: string, toText: string): proj4.Converter | undefined {
  try {
    return proj4(fromText, toText);
  } catch {
    return undefined;
  }
}

function refuse(from: CrsDefinition, to: CrsDefinition): never {
  const strange = [from, to].find(
    (crs) => makeConverter('+proj=longlat +datum=WGS84', stripped(crs)) === undefined,
  );
  throw unknownProjection(strange ?? from);
}

const byGdal =
  'Reproject it with gdalwarp -t_srs EPSG:32631 IN.tif OUT.tif, with the code of the site’s CRS.';

const unknownProjection = ({ epsg, name }: CrsDefinition): RasterError =>
  new RasterError('raster-crs', {
    found: `${name} (EPSG:${epsg}), a projection that cannot be computed here`,
    expected: 'a common projection, such as transverse Mercator, Lambert or Albers',
    remedy: byGdal,
  });

const noShift = (crs: CrsDefinition, other: CrsDefinition): RasterError =>
  new RasterError('raster-crs', {
    found: `the datum ${datumName(crs)} of EPSG:${crs.epsg}, for which no shift to ${datumName(other)} good to some metres is known here`,
    expected: 'one datum for raster and site, or a shift by three or seven parameters',
    remedy: `Reproject it with a program that has the grid of this shift, for example gdalwarp -t_srs EPSG:${other.epsg} IN.tif OUT.tif.`,
  });
