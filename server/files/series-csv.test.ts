import { expect, test } from 'vitest';
import { seriesRowSchema, type SeriesRow } from '#sim-core/spec/run-result.ts';
import { seriesColumns, seriesCsv } from './series-csv.ts';

const row: SeriesRow = {
  time: 2026,
  droughtIndex: null,
  coveredArea: 0.1 + 0.2,
  recoveredShare: 0.25,
  occupiedArea: 3,
  closedArea: 4,
  closingArea: 5,
  edgeLength: 6,
  patches: 7,
  largestPatchArea: 8,
  lostToDrought: 9,
  lostToBackground: 10,
  lostToGrazing: 11,
  lostToEvents: 12,
};

test('a series has one line a row, CRLF after each, full precision and an empty field for null', () => {
  expect(seriesCsv([row, { ...row, time: 2027, droughtIndex: -2.5 }]).split('\r\n')).toEqual([
    'time_year,drought_index,covered_area_m2,recovered_share,occupied_area_m2,ever_closed_area_m2,closing_area_m2,' +
      'edge_length_m,patches,largest_patch_area_m2,lost_to_drought_m2,lost_to_background_m2,lost_to_grazing_m2,lost_to_events_m2',
    '2026,,0.30000000000000004,0.25,3,4,5,6,7,8,9,10,11,12',
    '2027,-2.5,0.30000000000000004,0.25,3,4,5,6,7,8,9,10,11,12',
    '',
  ]);
});

test('no field of the series is left out', () => {
  expect(seriesColumns.map(([key]) => key).sort()).toEqual(Object.keys(seriesRowSchema.shape).sort());
});
