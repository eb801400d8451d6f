import { cover, newCoverage } from './coverage.ts';
import type { ResamplingMethod } from './alignment-plan.ts';
import type { Window } from './source-window.ts';

/** A rectangle of the raster's values, NaN where there is no data. */
export interface SourceCells extends Window {
  readonly values: Float64Array;
}

/** Least share of a cell's ground, or of its neighbours' weight, that must hold data for the cell to hold a value. */
export const leastData = 0.5 - 1e-9;

/** The value of a cell of the grid from the raster's cells, NaN for none; `xs`, `ys` are in columns and rows of the raster. */
export type Resampler = (xs: Float64Array, ys: Float64Array, source: SourceCells, raster: Size) => number;
interface Size {
  readonly width: number;
  readonly height: number;
}

/** Resamplers that look at a cell's centre (one point), and those that look at its four corners. */
export const resamplers: Record<
  Exclude<ResamplingMethod, 'copy'>,
  { readonly points: 'centre' | 'corners'; readonly make: () => Resampler }
> = {
  nearest: { points: 'centre', make: () => nearest },
  bilinear: { points: 'centre', make: () => bilinear },
  'area-weighted': { points: 'corners', make: areaWeighted },
  majority: { points: 'corners', make: majority },
};

const inside = (x: number, y: number, { width, height }: Size): boolean =>
  x >= 0 && y >= 0 && x < width && y < height;

const nearest: Resampler = (xs, ys, { values, left, top, width }, raster) =>
  inside(xs[0], ys[0], raster) ? values[(Math.floor(ys[0]) - top) * width + Math.floor(xs[0]) - left] : NaN;

/**
 * Between the four cell centres around the point; beyond the outermost centres these count alone. Cells without data are
 * left out, as long as the others have at least half the weight.
 */
const bilinear: Resampler = (xs, ys, { values, left, top, width }, raster) => {
  if (!inside(xs[0], ys[0], raster)) return NaN;
  const column = Math.floor(xs[0] - 0.5);
  const row = Math.floor(ys[0] - 0.5);
  const u = xs[0] - 0.5 - column;
  const v = ys[0] - 0.5 - row;
  let sum = 0;
  let weight = 0;
  for (let j = 0; j < 2; j++)
    for (let i = 0; i < 2; i++) {
      const w = (i ? u : 1 - u) * (j ? v : 1 - v);
      if (w === 0) continue;
      const c = Math.min(raster.width - 1, Math.max(0, column + i));
      const r = Math.min(raster.height - 1, Math.max(0, row + j));
      const value = values[(r - top) * width + c - left];
      if (Number.isNaN(value)) continue;
      sum += w * value;
      weight += w;
    }
  return weight >= leastData ? sum / weight : NaN;
};

/** The mean of the cells below a cell, each with the share of it that lies there; half of the ground must hold data. */
function areaWeighted(): Resampler {
  const coverage = newCoverage();
  return (xs, ys, source, raster) => {
    cover(xs, ys, coverage);
    let sum = 0;
    let weight = 0;
    eachCovered(coverage, source, raster, (value, share) => {
      sum += share * value;
      weight += share;
    });
    return weight >= leastData * coverage.area && weight > 0 ? sum / weight : NaN;
  };
}

/** Areas of classes that differ by less are the same. */
const sameArea = 1e-9;

/**
 * The class with the most ground below a cell; of several with as much, the one at its centre, else the lowest number.
 * Half of the ground must hold data.
 */
function majority(): Resampler {
  const coverage = newCoverage();
  const classes: number[] = [];
  const areas: number[] = [];
  return (xs, ys, source, raster) => {
    cover(xs, ys, coverage);
    classes.length = 0;
    areas.length = 0;
    let weight = 0;
    eachCovered(coverage, source, raster, (value, share) => {
      weight += share;
      const at = classes.indexOf(value);
      if (at < 0) {
        classes.push(value);
        areas.push(share);
      } else areas[at] += share;
    });
    if (!(weight >= leastData * coverage.area && weight > 0)) return NaN;
    const most = Math.max(...areas) - sameArea;
    const winners = classes.filter((_, i) => areas[i] >= most);
    if (winners.length === 1) return winners[0];
    const [x, y] = [(xs[0] + xs[1] + xs[2] + xs[3]) / 4, (ys[0] + ys[1] + ys[2] + ys[3]) / 4];
    const middle = inside(x, y, raster)
      ? source.values[(Math.floor(y) - source.top) * source.width + Math.floor(x) - source.left]
      : NaN;
    return winners.includes(middle) ? middle : Math.min(...winners);
  };
}

function eachCovered(
  { left, top, width, height, shares }: ReturnType<typeof newCoverage>,
  source: SourceCells,
  raster: Size,
  tell: (value: number, share: number) => void,
): void {
  const lastRow = Math.min(top + height, raster.height);
  const [from, to] = [Math.max(0, left), Math.min(left + width, raster.width)];
  for (let row = Math.max(0, top); row < lastRow; row++) {
    let at = (row - top) * width + from - left;
    let value = (row - source.top) * source.width + from - source.left;
    for (let column = from; column < to; column++, at++, value++)
      if (shares[at] > 0 && !Number.isNaN(source.values[value])) tell(source.values[value], shares[at]);
  }
}
