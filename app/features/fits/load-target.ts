import type { FitData } from '#contract/fits.ts';
import { valueUnitScale } from '#contract/layers.ts';
import { fitTarget, type FitTarget } from '#sim-core/fit/fit-target.ts';
import { resurveyOf } from '#sim-core/fit/resurvey.ts';
import type { CellValues } from '#sim-core/grid/ground.ts';
import type { Grid } from '#sim-core/grid/grid.ts';

/** Shares 0..1 as a survey has them, NaN where it says nothing. */
export function surveyedShares(values: CellValues, scale: number, noData: number | null): Float32Array {
  return Float32Array.from(values, (value) => (value === noData ? NaN : value * scale));
}

/** What runs are compared with, from the rasters of a site: capacity and cover in bytes, and each map's own values. */
export function targetOf(
  { width, height, cellSize }: Grid,
  data: FitData,
  capacity: Uint8Array,
  cover: Uint8Array,
  mapOf: (layer: string) => { values: CellValues; noData: number | null },
): FitTarget {
  const cells = { width, height, cellSize };
  const maps = data.maps.map(({ layer, unit, year, areaError }) => {
    const { values, noData } = mapOf(layer);
    const survey = resurveyOf(year, surveyedShares(values, valueUnitScale[unit], noData), capacity, cells);
    return { ...survey, areaError: areaError * survey.coveredArea };
  });
  const start = Float32Array.from(cover, (byte) => byte / 255);
  return fitTarget(start, capacity, cells, { maps, areas: data.areas, fronts: data.fronts });
}
