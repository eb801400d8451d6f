import { csv } from '#contract/csv.ts';
import type { DegreePoint } from './crew-gpx.ts';

/** The points for a crew, in the order of visit: WGS 84 in degrees, and the CRS of the site in metres. */
export const crewCsv = (points: readonly DegreePoint[]): string =>
  csv(
    ['order', 'name', 'task', 'kind', 'year', 'longitude', 'latitude', 'x_m', 'y_m'],
    points.map(({ name, task, kind, year, degrees: [lon, lat], place: [x, y] }, i) => [
      i + 1, name, task, kind, year, Number(lon.toFixed(9)), Number(lat.toFixed(9)), x, y,
    ]), // prettier-ignore
  );
