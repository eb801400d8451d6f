import type { Work } from '#contract/works.ts';
import { csv } from '#contract/csv.ts';

/** Columns of the CSV of points, in order; units stand in the names. */
const columns = [
  'kind',
  'name',
  'x_m',
  'y_m',
  'year',
  'until',
  'radius_m',
  'strength',
  'halo_m',
  'each',
  'cover',
  'share',
];

type Cells = Partial<Record<(typeof columns)[number], string | number>>;

/** The works that are points, in the CRS of the site: mounds, clumps point by point, and whatever covers a disc. */
export function pointsCsv(works: readonly Work[]): string {
  return csv(
    columns,
    works.flatMap((work) => rowsOf(work).map((cells) => columns.map((column) => cells[column] ?? null))),
  );
}

/** Whether one of the works is made of points: outlines are not. */
export const isPoints = (work: Work): boolean => !('area' in work) || work.area.shape === 'disc';

function rowsOf(work: Work): Cells[] {
  const shared = { kind: work.kind, name: work.name ?? '', year: work.year };
  if (work.kind === 'mound')
    return [
      {
        ...shared,
        x_m: work.x,
        y_m: work.y,
        radius_m: work.radius,
        strength: work.strength,
        halo_m: work.halo,
      },
    ];
  if (work.kind === 'clumps')
    return work.points.map(([x, y]) => ({ ...shared, x_m: x, y_m: y, each: work.each }));
  if (work.area.shape !== 'disc') return [];
  const { x, y, radius } = work.area;
  const disc = { ...shared, x_m: x, y_m: y, radius_m: radius };
  if (work.kind === 'planting') return [{ ...disc, cover: work.cover }];
  if (work.kind === 'loss') return [{ ...disc, share: work.share }];
  return [{ ...disc, strength: work.strength, ...(work.until !== undefined && { until: work.until }) }];
}
