/** Cells that cannot hold the plant, and cells that are still open at the horizon. */
export const cannotClose = -32768;
export const stillOpen = 0;
/** What a GeoTIFF of closing years says of its band, wherever it is written. */
export const closingBandName = 'closing year, 0 = open at the horizon';

export interface Closing {
  /** year of first C ≥ half its reference, 0 still open, −32768 cannot hold the plant; Int16, row-major */
  readonly years: Int16Array;
  /** cells that have closed so far */
  closed(): number;
  /** Marks what `year` has closed; returns how many cells. */
  update(cover: Float32Array, year: number): number;
}

/**
 * Year in which each cell closed. A cell's reference is K u.
 *
 * @param capacity,vigour k/255, row-major
 * @param references u by vigour byte, 256 values (`referenceShares`)
 */
export function closingYears(capacity: Uint8Array, vigour: Uint8Array, references: Float64Array): Closing {
  const years = new Int16Array(capacity.length);
  for (let i = 0; i < years.length; i++)
    if (capacity[i] === 0 || references[vigour[i]] === 0) years[i] = cannotClose;
  let closed = 0;
  return {
    years,
    closed: () => closed,
    update(cover, year) {
      let closing = 0;
      for (let i = 0; i < years.length; i++)
        // Bare ground, most of many maps, is told by its first two numbers: a reference that can close is above 0.
        if (
          years[i] === stillOpen &&
          cover[i] > 0 &&
          cover[i] >= 0.5 * references[vigour[i]] * (capacity[i] / 255)
        ) {
          years[i] = year;
          closing++;
        }
      closed += closing;
      return closing;
    },
  };
}

/** ΣC*, in cells. */
export function referenceSum(capacity: Uint8Array, vigour: Uint8Array, references: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < capacity.length; i++) sum += (capacity[i] / 255) * references[vigour[i]];
  return sum;
}
