import type { DrawnWeather } from '#sim-core/spec/weather-source.ts';
import { startDrawn, type DrawnDraft } from './drawn-draft.ts';

/** The blanks that a fitted weather fills; those of other kinds stay as they are. */
export function drawnFromFit(weather: DrawnWeather): Partial<DrawnDraft> {
  const { kind, returnYears, returnLaw, returnShape, sinceLatest, ...rest } = startDrawn(weather);
  const { length, lengthLaw, lengthShape, depth, depthSpread, between } = rest;
  const { mean, standardDeviation, memory, start, record } = rest;
  switch (weather.kind) {
    case 'renewal':
      return {
        ...{ kind, returnYears, returnLaw, returnShape, sinceLatest },
        ...{ length, lengthLaw, lengthShape, depth, depthSpread, between },
      };
    case 'palmer-type':
      return { kind, mean, standardDeviation, memory, start };
    case 'series':
      return { kind, record };
  }
}
