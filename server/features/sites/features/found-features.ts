import { featureAttributesSchema, type FeatureImportForm, type FeatureKind } from '#contract/features.ts';
import {
  polygonArea,
  readGeoJsonPlaces,
  type Place,
  type PolygonPlace,
} from '#server/files/geojson-places.ts';
import { readPointTable } from '#server/files/point-table.ts';
import type { Point } from '#server/files/place-projection.ts';
import { cellAt, type Grid } from '#sim-core/grid/grid.ts';
import type { Area } from '#sim-core/spec/run-spec.ts';

/** A feature as a file holds it, in the CRS of the site. */
export interface FoundFeature {
  row: number;
  kind: FeatureKind;
  name: string;
  shape: Area;
  strength: number;
  halo: number;
}

export interface FoundFeatures {
  crsName: string;
  /** how the file was read, in words */
  read: string;
  features: FoundFeature[];
  problems: { row: number; message: string }[];
}

type Defaults = Pick<FeatureImportForm, 'kind' | 'radius' | 'strength' | 'halo'>;
type Written = Partial<Record<'name' | 'radius' | 'strength' | 'halo', unknown>>;

const columnNames = { name: ['label', 'id'], radius: ['r'], strength: [], halo: [] };
const numbers = ['radius', 'strength', 'halo'] as const;
/** Corners that one area may have, as a RunSpec takes them. */
const mostRingCorners = 10_000;

/**
 * Surveyed points and areas from GeoJSON, or points from CSV. What cannot be taken has its reason.
 * @throws ProblemError at `content` for a file that is neither
 */
export function findFeatures(content: string, grid: Grid, defaults: Defaults): FoundFeatures {
  return /^\uFEFF?\s*\{/.test(content)
    ? fromGeoJson(content, grid, defaults)
    : fromTable(content, grid, defaults);
}

function fromGeoJson(content: string, grid: Grid, defaults: Defaults): FoundFeatures {
  const { features, crsName } = readGeoJsonPlaces(content, grid.epsg);
  const found = collector(grid, defaults);
  for (const feature of features) {
    if ('problem' in feature) found.problems.push({ row: feature.row, message: feature.problem });
    else for (const part of partsOf(feature.place)) found.add(feature.row, part, feature.properties);
  }
  return { crsName, read: `GeoJSON with ${features.length} features, in ${crsName}`, ...found.result };
}

/** Several points or outlines are as many features of one row. */
const partsOf = (place: Place): (Point | PolygonPlace)[] =>
  place.type === 'Polygon' ? [...place.polygons] : place.type === 'Point' ? [place.point] : [...place.points];

function fromTable(content: string, grid: Grid, defaults: Defaults): FoundFeatures {
  const { rows, crsName, unknown } = readPointTable<keyof typeof columnNames>(
    content,
    grid.epsg,
    columnNames,
    numbers,
  );
  const found = collector(grid, defaults);
  for (const row of rows) {
    if ('problem' in row) {
      found.problems.push({ row: row.line, message: row.problem });
      continue;
    }
    const written: Written = { name: row.cell('name') };
    for (const name of numbers) if (row.cell(name) !== '') written[name] = row.number(name);
    found.add(row.line, row.place, written);
  }
  const left = unknown.length > 0 ? `; columns left out: ${unknown.join(', ')}` : '';
  return { crsName, read: `a table of ${rows.length} points, in ${crsName}${left}`, ...found.result };
}

function collector(grid: Grid, defaults: Defaults) {
  const features: FoundFeature[] = [];
  const problems: FoundFeatures['problems'] = [];
  const { kind } = defaults;
  return {
    problems,
    result: { features, problems },
    add(row: number, place: Point | PolygonPlace, written: Written) {
      const message =
        attributeProblem(written) ??
        ('ring' in place ? polygonProblem(place, grid) : pointProblem(place, grid));
      if (message !== undefined) {
        problems.push({ row, message });
        return;
      }
      const of = (name: 'radius' | 'strength' | 'halo') =>
        typeof written[name] === 'number' ? written[name] : defaults[name];
      const shape: Area =
        'ring' in place
          ? polygonArea(place)
          : { shape: 'disc', x: place[0], y: place[1], radius: of('radius') };
      features.push({
        row,
        kind,
        name: nameOf(written.name),
        shape,
        strength: kind === 'allowed' ? 1 : of('strength'),
        halo: kind === 'refuge' && shape.shape === 'disc' ? of('halo') : 0,
      });
    },
  };
}

const nameOf = (name: unknown): string =>
  typeof name === 'string' || typeof name === 'number' ? String(name).trim().slice(0, 100) : '';

const expected = {
  radius: 'above 0 and up to 1000 m',
  strength: 'from 0 to 1',
  halo: 'from 0 to 1000 m',
} as const;

function attributeProblem(written: Written): string | undefined {
  for (const name of numbers) {
    const value = written[name];
    if (value === undefined || value === null) continue;
    if (!featureAttributesSchema.shape[name].safeParse(value).success)
      return `Found ${name} ${JSON.stringify(value)}; expected a number ${expected[name]}.`;
  }
  return undefined;
}

const extentOf = ({ originX, originY, width, height, cellSize }: Grid) =>
  `x ${originX} to ${originX + width * cellSize}, y ${originY - height * cellSize} to ${originY}`;

function pointProblem([x, y]: Point, grid: Grid): string | undefined {
  if (cellAt(grid, x, y)) return undefined;
  return `Found ${x}, ${y} in the CRS of the site; expected a place on the site, ${extentOf(grid)}.`;
}

function polygonProblem({ ring, holes }: PolygonPlace, grid: Grid): string | undefined {
  const least = Math.min(ring.length, ...holes.map((hole) => hole.length));
  if (least < 3) return `Found ${least} corners; an outline and a hole need at least 3 each.`;
  const most = Math.max(ring.length, ...holes.map((hole) => hole.length));
  if (most > mostRingCorners)
    return `Found ${most} corners; expected at most ${mostRingCorners} an outline. Simplify the outline.`;
  const [west, north] = [grid.originX, grid.originY];
  const [east, south] = [west + grid.width * grid.cellSize, north - grid.height * grid.cellSize];
  const [xs, ys] = [ring.map(([x]) => x), ring.map(([, y]) => y)];
  if (Math.max(...xs) > west && Math.min(...xs) < east && Math.max(...ys) > south && Math.min(...ys) < north)
    return undefined;
  return `The area lies off the site; expected one that meets ${extentOf(grid)}.`;
}
