import type { MapSize } from '#app/map/map-view.ts';

/** Where the drought record stands in its box, CSS px. */
export interface ChartScale {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly yearWidth: number;
  /** index at the top and at the bottom */
  readonly wettest: number;
  readonly driest: number;
  /** middle of a year */
  x(year: number): number;
  y(index: number): number;
  yearAt(x: number): number;
  /** index at a height, to a tenth and within the drawn range */
  indexAt(y: number): number;
}

/**
 * A chart on which every value, both tolerances and the classes down to extreme drought have room.
 *
 * @param strip px kept free between the bars and the years
 */
export function chartScale(
  { width, height }: MapSize,
  first: number,
  years: number,
  indices: readonly number[],
  compact: boolean,
  strip = 0,
): ChartScale {
  const shape = compact
    ? { left: 30, right: width - 12, top: 46, bottom: height - 26 - strip }
    : { left: 156, right: width - 120, top: 52, bottom: height - 34 - strip };
  const { left, right, top, bottom } = shape;
  const wettest = Math.min(15, Math.ceil(Math.max(3, ...indices) + 0.2));
  const driest = Math.max(-15, Math.floor(Math.min(-5, ...indices) - 0.2));
  const yearWidth = (right - left) / years;
  const perIndex = (bottom - top) / (wettest - driest);
  return {
    ...shape,
    yearWidth,
    wettest,
    driest,
    x: (year) => left + (year - first + 0.5) * yearWidth,
    y: (index) => top + (wettest - index) * perIndex,
    yearAt: (x) => first + Math.min(years - 1, Math.max(0, Math.floor((x - left) / yearWidth))),
    indexAt: (y) => {
      const index = Math.round((wettest - (y - top) / perIndex) * 10) / 10;
      return Math.min(wettest, Math.max(driest, index)) || 0;
    },
  };
}
