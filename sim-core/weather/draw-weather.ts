import { uniform } from '#sim-core/random/philox.ts';
import { stream } from '#sim-core/random/streams.ts';
import { driest, wettest } from '#sim-core/spec/limits.ts';
import type { DrawnWeather, WeatherSource } from '#sim-core/spec/weather-source.ts';
import { drawPalmerRecursion } from './palmer-recursion.ts';
import { drawRenewal } from './renewal.ts';
import { drawSeries, type WeatherSpan } from './series.ts';

/** What decides a run's weather: fields of its RunSpec. */
export interface WeatherOfRun extends WeatherSpan {
  readonly seed: string;
  readonly replicate: number;
  /** without problems (`weatherProblems`), as in any RunSpec that was parsed */
  readonly droughtIndex: WeatherSource;
}

/**
 * Drought index of every step of one replicate, Float64, years × stepsPerYear. What is drawn follows from the seed and
 * the replicate alone (stream `weather/<replicate>`), so options under one outlook share it.
 */
export function drawWeather(run: WeatherOfRun): Float64Array {
  const { droughtIndex: source, years, stepsPerYear, seed, replicate } = run;
  const steps = years * stepsPerYear;
  if (typeof source === 'number') return new Float64Array(steps).fill(source);
  if (Array.isArray(source))
    return Float64Array.from({ length: steps }, (_, s) =>
      source.length === steps ? source[s] : source[Math.floor(s / stepsPerYear)],
    );
  const words = stream(seed, `weather/${replicate}`);
  const drawn = drawnIndices(source, run, () => uniform(words.int32() >>> 0));
  return drawn.map((x) => Math.min(wettest, Math.max(driest, x)));
}

function drawnIndices(source: DrawnWeather, span: WeatherSpan, draw: () => number): Float64Array {
  const { years, stepsPerYear } = span;
  switch (source.kind) {
    case 'series':
      return drawSeries(source, span, draw);
    case 'palmer-type':
      return drawPalmerRecursion(source, years * stepsPerYear, stepsPerYear, draw);
    case 'renewal':
      return drawRenewal(source, years * stepsPerYear, stepsPerYear, draw);
  }
}
