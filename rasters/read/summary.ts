import type { Raster } from './raster.ts';

/** What a raster's values look like, as the page shows it and the contract's `layerSchema` wants it. */
export interface RasterSummary {
  /** share of the cells without data */
  readonly noDataShare: number;
  readonly minimum: number;
  readonly maximum: number;
  /** counts in `histogramBins` equal bins from minimum to maximum; the last bin holds the maximum */
  readonly histogram: number[];
  /** whole values found, ascending, with the cells of each; null where a value is no whole number or there are over 256 */
  readonly classCounts: { value: number; cells: number }[] | null;
  /** what the values seem to be: shares 0..1, per cent, 8 bits, or present and absent */
  readonly unit: 'share' | 'percent' | 'byte' | 'presence';
}

export const histogramBins = 64;
/** Beyond so many different whole numbers they are no classes. */
export const mostClasses = 256;

/** Summarises the valid, finite cells of a raster; `readRaster` has made sure that there is a valid one. */
export function summarise({ values, noData, dataType }: Raster): RasterSummary {
  let minimum = Infinity;
  let maximum = -Infinity;
  let missing = 0;
  let classes: Map<number, number> | null = new Map();
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    if (value === noData || Number.isNaN(value)) {
      missing++;
      continue;
    }
    if (value < minimum) minimum = value;
    if (value > maximum) maximum = value;
    if (classes) {
      classes.set(value, (classes.get(value) ?? 0) + 1);
      if (classes.size > mostClasses || !Number.isInteger(value)) classes = null;
    }
  }
  const histogram = new Array<number>(histogramBins).fill(0);
  const perBin = maximum > minimum ? histogramBins / (maximum - minimum) : 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    if (value === noData || Number.isNaN(value)) continue;
    histogram[Math.min(histogramBins - 1, Math.floor((value - minimum) * perBin))]++;
  }
  const classCounts =
    classes && [...classes].map(([value, cells]) => ({ value, cells })).sort((a, b) => a.value - b.value);
  const unit = guessUnit(dataType.startsWith('float'), minimum, maximum);
  return { noDataShare: missing / values.length, minimum, maximum, histogram, classCounts, unit };
}

/**
 * A guess that the page shows and people can correct: whole numbers 0 and 1 are presence, up to 100 per cent, beyond
 * that 8 bits; with a fractional part up to 1 a share, beyond that per cent.
 */
export function guessUnit(floating: boolean, minimum: number, maximum: number): RasterSummary['unit'] {
  if (minimum < 0) return 'share';
  if (maximum <= 1) return floating ? 'share' : 'presence';
  if (maximum <= 100) return 'percent';
  return 'byte';
}
