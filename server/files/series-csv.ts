import type { SeriesRow } from '#sim-core/spec/run-result.ts';
import { csv } from '#contract/csv.ts';

/** The columns of a series in a CSV file, in order; the unit stands at the end of each name. */
export const seriesColumns: readonly (readonly [key: keyof SeriesRow, header: string])[] = [
  ['time', 'time_year'],
  ['droughtIndex', 'drought_index'],
  ['coveredArea', 'covered_area_m2'],
  ['recoveredShare', 'recovered_share'],
  ['occupiedArea', 'occupied_area_m2'],
  ['closedArea', 'ever_closed_area_m2'],
  ['closingArea', 'closing_area_m2'],
  ['edgeLength', 'edge_length_m'],
  ['patches', 'patches'],
  ['largestPatchArea', 'largest_patch_area_m2'],
  ['lostToDrought', 'lost_to_drought_m2'],
  ['lostToBackground', 'lost_to_background_m2'],
  ['lostToGrazing', 'lost_to_grazing_m2'],
  ['lostToEvents', 'lost_to_events_m2'],
];

/** The series of one run. */
export const seriesCsv = (series: readonly SeriesRow[]): string =>
  csv(
    seriesColumns.map(([, header]) => header),
    series.map((row) => seriesColumns.map(([key]) => row[key])),
  );
