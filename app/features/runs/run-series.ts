import type { SeriesRow } from '#sim-core/spec/run-result.ts';
import { drawWeather, type WeatherOfRun } from '#sim-core/weather/draw-weather.ts';

/** Drought index of each simulated year: that of its driest step, since that is the one that kills. */
export function driestByYear(spec: WeatherOfRun): number[] {
  const steps = drawWeather(spec);
  return Array.from({ length: spec.years }, (_, i) =>
    Math.min(...steps.subarray(i * spec.stepsPerYear, (i + 1) * spec.stepsPerYear)),
  );
}

/** Covered area that was lost in a year, m², by cause. */
export interface YearLosses {
  readonly drought: number;
  readonly background: number;
  readonly grazing: number;
  readonly events: number;
}

/** Losses of a year, summed over its steps; undefined where the series has no step in it. */
export function lossesIn(rows: readonly SeriesRow[], year: number): YearLosses | undefined {
  // Rounding keeps 2027 + 12/12 in 2028.
  const mine = rows.filter(
    (row) => row.droughtIndex !== null && Math.ceil(Math.round(row.time * 1000) / 1000) === year,
  );
  if (mine.length === 0) return undefined;
  const sum = (of: (row: SeriesRow) => number) => mine.reduce((total, row) => total + of(row), 0);
  return {
    drought: sum((row) => row.lostToDrought),
    background: sum((row) => row.lostToBackground),
    grazing: sum((row) => row.lostToGrazing),
    events: sum((row) => row.lostToEvents),
  };
}
