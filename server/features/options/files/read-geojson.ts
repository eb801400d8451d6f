import { z } from 'zod';
import { workSetsSchema, workIdSchema } from '#contract/works.ts';
import { fieldProblem } from '#server/middleware/problem-error.ts';
import { FoundWorks, type FoundFile } from './found-works.ts';
import { projectionBetween, wgs84, type PlaceProjection, type Point } from './place-projection.ts';
import type { Grid } from '#sim-core/grid/grid.ts';

const rootSchema = z.object({
  type: z.literal('FeatureCollection', 'Expected a FeatureCollection of RFC 7946'),
  features: z.array(z.unknown(), 'Expected a list of features').max(20_000, 'At most 20 000 features'),
  crs: z.unknown().optional(),
  foothold: z
    .object({
      name: z.string().trim().max(100).catch(''),
      note: z.string().trim().max(4000).catch(''),
      sets: z.unknown(),
    })
    .optional()
    .catch(undefined),
});
const featureSchema = z.object({
  id: z.unknown().optional(),
  geometry: z.object({ type: z.string(), coordinates: z.unknown() }, 'It has no geometry'),
  properties: z.record(z.string(), z.unknown()).nullish(),
});
const position = z.array(z.number()).min(2);

/**
 * Works from GeoJSON (RFC 7946), as `docs/option-geojson.md` says. What cannot be read is among the problems, by the number
 * of its feature.
 * @throws ProblemError at `content` for a file that is no FeatureCollection or names a CRS that is not known
 */
export function readGeoJson(content: string, site: Grid, firstYear: number): FoundFile {
  const parsed = rootSchema.safeParse(jsonOf(content));
  if (!parsed.success) throw fieldProblem('content', firstMessage(parsed.error));
  const { features, crs, foothold } = parsed.data;
  const projection = projectionBetween(crsCode(crs, site.epsg), site.epsg);
  const found = new FoundWorks(site, firstYear, 'Feature');
  const sets = workSetsSchema.safeParse(foothold?.sets ?? []);
  if (!sets.success)
    found.problem(
      null,
      `How patterns laid the works cannot be read (${firstMessage(sets.error)}); the works come without it.`,
    );
  const known = new Set(sets.data?.map((set) => set.id));
  for (const [i, feature] of features.entries()) {
    try {
      const work = rawWork(feature, projection);
      if (typeof work.set === 'string' && !known.has(work.set)) delete work.set;
      found.add(i + 1, work);
    } catch (error) {
      if (!(error instanceof Unreadable)) throw error;
      found.problem(i + 1, error.message);
    }
  }
  return {
    format: 'geojson',
    crsName: projection.crsName,
    name: foothold?.name ?? '',
    note: foothold?.note ?? '',
    sets: sets.data ?? [],
    found,
  };
}

class Unreadable extends Error {}

function jsonOf(content: string): unknown {
  try {
    return JSON.parse(content.replace(/^\uFEFF/, ''));
  } catch (error) {
    throw fieldProblem('content', `The file is no JSON: ${(error as Error).message}`);
  }
}

const firstMessage = ({ issues: [issue] }: z.ZodError): string =>
  issue.path.length > 0 ? `${issue.path.join('.')}: ${issue.message}` : issue.message;

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

/** A feature as one of the works, places in the site's CRS; what its fields hold is checked later. */
function rawWork(feature: unknown, projection: PlaceProjection): Record<string, unknown> {
  const parsed = featureSchema.safeParse(feature);
  if (!parsed.success) throw new Unreadable(firstMessage(parsed.error));
  const { geometry, properties, id } = parsed.data;
  const { kind, radius, ...rest } = properties ?? {};
  const shared = { ...rest, ...(workIdSchema.safeParse(id).success && { id }) };
  const place = placeOf(geometry, projection);
  if (place.type === 'MultiPoint') return { ...shared, kind: kind ?? 'clumps', points: place.points };
  if (place.type === 'Polygon') {
    if (kind === undefined)
      throw new Unreadable('An outline needs a property `kind`: planting, fence or loss.');
    return { ...shared, kind, area: { shape: 'polygon', ring: place.ring } };
  }
  const [x, y] = place.point;
  if (kind === undefined || kind === 'mound')
    return { ...shared, kind: 'mound', x, y, ...(radius !== undefined && { radius }) };
  if (kind === 'clumps') return { ...shared, kind, points: [[x, y]] };
  return { ...shared, kind, area: { shape: 'disc', x, y, radius } };
}

type Place =
  | { type: 'Point'; point: Point }
  | { type: 'MultiPoint'; points: Point[] }
  | { type: 'Polygon'; ring: Point[] };

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
  switch (type) {
    case 'Point':
      return { type, point: at(coordinates) };
    case 'MultiPoint':
      return { type, points: list(coordinates).map(at) };
    case 'Polygon': {
      const rings = list(coordinates);
      if (rings.length !== 1)
        throw new Unreadable('It has holes; expected one ring. Draw the area without holes, or as several.');
      const ring = list(rings[0]).map(at);
      const [first, last] = [ring[0], ring.at(-1)];
      const closed = last !== undefined && ring.length > 1 && first[0] === last[0] && first[1] === last[1];
      return { type, ring: closed ? ring.slice(0, -1) : ring };
    }
    default:
      throw new Unreadable(
        `Found the geometry ${type}; expected Point, MultiPoint or Polygon. Split it into single parts.`,
      );
  }
}
