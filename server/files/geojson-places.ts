import { z } from 'zod';
import type { Area } from '#sim-core/spec/run-spec.ts';
import { fieldProblem } from '#server/middleware/problem-error.ts';
import { projectionBetween, wgs84, type PlaceProjection, type Point } from './place-projection.ts';

/**
 * A geometry in the CRS of the site, m; a ring is not closed by its first corner again. A MultiPolygon is a Polygon of several
 * parts.
 */
export type Place =
  | { readonly type: 'Point'; readonly point: Point }
  | { readonly type: 'MultiPoint'; readonly points: readonly Point[] }
  | { readonly type: 'Polygon'; readonly polygons: readonly PolygonPlace[] };

/** One outline, and what is cut out of it. */
export interface PolygonPlace {
  readonly ring: readonly Point[];
  readonly holes: readonly (readonly Point[])[];
}

/** A polygon as an area of a RunSpec. */
export const polygonArea = ({ ring, holes }: PolygonPlace): Area => {
  const corners = (line: readonly Point[]) => line.map(([x, y]): [number, number] => [x, y]);
  return {
    shape: 'polygon',
    ring: corners(ring),
    ...(holes.length > 0 && { holes: holes.map(corners) }),
  };
};

export interface GeoJsonFeature {
  /** number of the feature in the file, from 1 */
  readonly row: number;
  readonly id: unknown;
  readonly properties: Readonly<Record<string, unknown>>;
  readonly place: Place;
}

export interface GeoJsonPlaces {
  /** name of the CRS that the coordinates were read in */
  readonly crsName: string;
  /** every member of the collection */
  readonly members: Readonly<Record<string, unknown>>;
  readonly features: readonly (GeoJsonFeature | { readonly row: number; readonly problem: string })[];
}

const mostFeatures = 20_000;
const collectionSchema = z.looseObject({
  type: z.literal('FeatureCollection', 'Expected a FeatureCollection of RFC 7946'),
  features: z
    .array(z.unknown(), 'Expected a list of features')
    .max(mostFeatures, `At most ${mostFeatures} features`),
});
const featureSchema = z.object({
  id: z.unknown().optional(),
  geometry: z.object({ type: z.string(), coordinates: z.unknown() }, 'It has no geometry'),
  properties: z.record(z.string(), z.unknown()).nullish(),
});
const position = z.array(z.number()).min(2);

/**
 * The features of a GeoJSON FeatureCollection (RFC 7946) with their places in the CRS of a site: from WGS 84, or from the
 * CRS that a `crs` member of GeoJSON 2008 names. A feature that cannot be read has a problem in words instead.
 * @throws ProblemError at `content` for a file that is no FeatureCollection or names a CRS that is not known
 */
export function readGeoJsonPlaces(content: string, siteEpsg: number): GeoJsonPlaces {
  const parsed = collectionSchema.safeParse(jsonOf(content));
  if (!parsed.success) throw fieldProblem('content', firstIssue(parsed.error));
  const { features, ...members } = parsed.data;
  const projection = projectionBetween(crsCode(members.crs, siteEpsg), siteEpsg);
  return {
    crsName: projection.crsName,
    members,
    features: features.map((feature, i) => {
      try {
        return { row: i + 1, ...readFeature(feature, projection) };
      } catch (error) {
        if (!(error instanceof Unreadable)) throw error;
        return { row: i + 1, problem: error.message };
      }
    }),
  };
}

/** The first thing that zod found, with its place. */
export const firstIssue = ({ issues: [issue] }: z.ZodError): string =>
  issue.path.length > 0 ? `${issue.path.join('.')}: ${issue.message}` : issue.message;

class Unreadable extends Error {}

function jsonOf(content: string): unknown {
  try {
    return JSON.parse(content.replace(/^\uFEFF/, ''));
  } catch (error) {
    throw fieldProblem('content', `The file is no JSON: ${(error as Error).message}`);
  }
}

/** EPSG code of the `crs` member of GeoJSON 2008; WGS 84 where there is none. */
function crsCode(crs: unknown, siteEpsg: number): number {
  if (crs === undefined || crs === null) return wgs84;
  const name =
    z.object({ properties: z.object({ name: z.string() }) }).safeParse(crs).data?.properties.name ?? '';
  if (/CRS84$/.test(name)) return wgs84;
  const code = /^(?:urn:ogc:def:crs:)?EPSG:(?:[^:]*:)?(\d+)$/i.exec(name)?.[1];
  if (code === undefined)
    throw fieldProblem(
      'content',
      `The member \`crs\` names ${name === '' ? 'no CRS' : `“${name}”`}; expected one such as urn:ogc:def:crs:EPSG::${siteEpsg}, or no ` +
        '`crs` for longitude and latitude in WGS 84',
    );
  return Number(code);
}

function readFeature(feature: unknown, projection: PlaceProjection): Omit<GeoJsonFeature, 'row'> {
  const parsed = featureSchema.safeParse(feature);
  if (!parsed.success) throw new Unreadable(firstIssue(parsed.error));
  const { geometry, properties, id } = parsed.data;
  return { id, properties: properties ?? {}, place: placeOf(geometry, projection) };
}

function placeOf(
  { type, coordinates }: { type: string; coordinates: unknown },
  projection: PlaceProjection,
): Place {
  const at = (value: unknown): Point => {
    const parsed = position.safeParse(value);
    if (!parsed.success) throw new Unreadable('A position needs two numbers, east before north.');
    const carried = projection.toSite([parsed.data[0], parsed.data[1]]);
    if (!carried.every(Number.isFinite))
      throw new Unreadable(`${parsed.data.join(', ')} cannot be carried into the CRS of the site.`);
    return carried;
  };
  const list = (value: unknown): unknown[] => {
    if (!Array.isArray(value)) throw new Unreadable('Its coordinates are no list.');
    return value as unknown[];
  };
  const ringOf = (value: unknown): Point[] => {
    const ring = list(value).map(at);
    const [first, last] = [ring[0], ring.at(-1)];
    const closed = last !== undefined && ring.length > 1 && first[0] === last[0] && first[1] === last[1];
    return closed ? ring.slice(0, -1) : ring;
  };
  const polygon = (value: unknown): PolygonPlace => {
    const [ring, ...holes] = list(value).map(ringOf);
    if (ring === undefined) throw new Unreadable('It has no outline.');
    return { ring, holes };
  };
  switch (type) {
    case 'Point':
      return { type, point: at(coordinates) };
    case 'MultiPoint':
      return { type, points: list(coordinates).map(at) };
    case 'Polygon':
      return { type, polygons: [polygon(coordinates)] };
    case 'MultiPolygon':
      return { type: 'Polygon', polygons: list(coordinates).map(polygon) };
    default:
      throw new Unreadable(
        `Found the geometry ${type}; expected Point, MultiPoint, Polygon or MultiPolygon.`,
      );
  }
}
