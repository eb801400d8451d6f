import { z } from 'zod';
import { workIdSchema, workSetsSchema } from '#contract/works.ts';
import {
  firstIssue,
  polygonArea,
  readGeoJsonPlaces,
  type GeoJsonFeature,
} from '#server/files/geojson-places.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { FoundWorks, type FoundFile } from './found-works.ts';

/** What our own files say of the option; files of others say nothing, or something else. */
const optionMemberSchema = z
  .object({
    name: z.string().trim().max(100).catch(''),
    note: z.string().trim().max(4000).catch(''),
    sets: z.unknown(),
  })
  .catch({ name: '', note: '', sets: [] });

/**
 * Works from GeoJSON (RFC 7946), as `docs/option-geojson.md` says. What cannot be read is among the problems, by the number
 * of its feature.
 * @throws ProblemError at `content` for a file that is no FeatureCollection or names a CRS that is not known
 */
export function readGeoJson(content: string, site: Grid, firstYear: number): FoundFile {
  const { features, members, crsName } = readGeoJsonPlaces(content, site.epsg);
  const { name, note, sets: given } = optionMemberSchema.parse(members.foothold);
  const found = new FoundWorks(site, firstYear, 'Feature');
  const sets = workSetsSchema.safeParse(given ?? []);
  if (!sets.success)
    found.problem(
      null,
      `How patterns laid the works cannot be read (${firstIssue(sets.error)}); the works come without it.`,
    );
  const known = new Set(sets.data?.map((set) => set.id));
  for (const feature of features) {
    const works = 'problem' in feature ? feature.problem : rawWorks(feature);
    if (typeof works === 'string') found.problem(feature.row, works);
    else
      for (const work of works) {
        if (typeof work.set === 'string' && !known.has(work.set)) delete work.set;
        found.add(feature.row, work);
      }
  }
  return { format: 'geojson', crsName, name, note, sets: sets.data ?? [], found };
}

/**
 * A feature as works, one for each outline of a MultiPolygon, or why it is none; what their fields hold is checked later.
 * Only the first of several keeps the id.
 */
function rawWorks({ place, properties, id }: GeoJsonFeature): Record<string, unknown>[] | string {
  const { kind, radius, ...rest } = properties;
  const shared: Record<string, unknown> = {
    ...rest,
    ...(workIdSchema.safeParse(id).success && { id }),
  };
  if (place.type === 'MultiPoint') return [{ ...shared, kind: kind ?? 'clumps', points: place.points }];
  if (place.type === 'Polygon')
    return kind === undefined
      ? 'An outline needs a property `kind`: planting, fence or loss.'
      : place.polygons.map((polygon, i) => ({
          ...(i === 0 ? shared : rest),
          kind,
          area: polygonArea(polygon),
        }));
  const [x, y] = place.point;
  if (kind === undefined || kind === 'mound')
    return [{ ...shared, kind: 'mound', x, y, ...(radius !== undefined && { radius }) }];
  if (kind === 'clumps') return [{ ...shared, kind, points: [[x, y]] }];
  return [{ ...shared, kind, area: { shape: 'disc', x, y, radius } }];
}
