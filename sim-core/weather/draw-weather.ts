import { uniform } from '#sim-core/random/philox.ts';
import { stream } from '#sim-core/random/streams.ts';
import { driest, wettest } from '#sim-core/spec/limits.ts';
import type { Trend } from '#sim-core/spec/outlook-changes.ts';
import type { DrawnWeather, WeatherSource } from '#sim-core/spec/weather-source.ts';
import { drawPalmerRecursion } from './palmer-recursion.ts';
import { drawRenewal } from './renewal.ts';
import { drawSeries, type WeatherSpan } from './series.ts';
import { droughtClock, shiftAfter } from './trend.ts';

/** What decides a run's weather: fields of its RunSpec. */
export interface WeatherOfRun extends WeatherSpan {
  readonly seed: string;
  readonly replicate: number;
  /** without problems (`weatherProblems`), as in any RunSpec that was parsed */
  readonly droughtIndex: WeatherSource;
  /** none unless given */
  readonly trend?: Trend | undefined;
}

/**
 * Drought index of every step of one replicate, Float64, years × stepsPerYear. What is drawn follows from the seed and
 * the replicate alone (stream `weather/<replicate>`), so options under one outlook share it. A trend shifts whatever the
 * source gives by what it has come to at the end of each step, and is held within the scale.
 */
export function drawWeather(run: WeatherOfRun): Float64Array {
  const { trend, stepsPerYear } = run;
  const indices = indicesOf(run);
  return trend?.shiftPerDecade
    ? indices.map((x, step) => held(x + shiftAfter(trend, (step + 1) / stepsPerYear)))
    : indices;
}

const held = (x: number) => Math.min(wettest, Math.max(driest, x));

/** What the source gives, before the trend shifts it. */
function indicesOf(run: WeatherOfRun): Float64Array {
  const { droughtIndex: source, years, stepsPerYear, seed, replicate, trend = {} } = run;
  const steps = years * stepsPerYear;
  if (typeof source === 'number') return new Float64Array(steps).fill(source);
  if (Array.isArray(source))
    return Float64Array.from({ length: steps }, (_, s) =>
      source.length === steps ? source[s] : source[Math.floor(s / stepsPerYear)],
    );
  const words = stream(seed, `weather/${replicate}`);
  const drawn = drawnIndices(source, run, trend, () => uniform(words.int32() >>> 0));
  return drawn.map(held);
}

function drawnIndices(
  source: DrawnWeather,
  span: WeatherSpan,
  trend: Trend,
  draw: () => number,
): Float64Array {
  const { years, stepsPerYear } = span;
  switch (source.kind) {
    case 'series':
      return drawSeries(source, span, draw);
    case 'palmer-type':
      return drawPalmerRecursion(source, years * stepsPerYear, stepsPerYear, draw);
    case 'renewal':
      return drawRenewal(source, years * stepsPerYear, stepsPerYear, draw, droughtClock(trend));
  }
}
