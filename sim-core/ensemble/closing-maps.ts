import { cannotClose, stillOpen } from '#sim-core/measure/closing.ts';

/** All that the maps are made of: enough to go on from. */
export interface ClosingCounts {
  readonly count: number;
  /** 1 where some replicate can hold the plant */
  readonly canClose: Uint8Array;
  /** by kept year: replicates that closed each cell in it since the kept year before; undefined where none did */
  readonly planes: readonly (Uint8Array | Uint16Array | undefined)[];
}

export interface ClosingMaps {
  /** A replicate's closing years, Int16, row-major: 0 still open, −32768 cannot hold the plant. */
  add(closing: Int16Array): void;
  readonly count: number;
  /** live arrays: whoever keeps them copies them */
  counts(): ClosingCounts;
  /**
   * chance that each cell has closed by the end of a year, Float32, row-major; NaN where it cannot hold the plant.
   * @throws RangeError of a year that is not kept
   */
  chanceBy(year: number): Float32Array;
  /**
   * first kept year by which half the replicates have closed the cell, Int16, as `add` takes them: 0 where more than
   * half are open at the last kept year
   */
  medianYear(): Int16Array;
  /**
   * mean closing year with what is open counted as closing in the last kept year, Float32; NaN where the plant cannot
   * be held. Of the kept years: exact where all are kept.
   */
  restrictedMeanYear(): Float32Array;
}

const mostReplicates = 0xffff;

/**
 * How often each cell has closed by which year, from replicates that stream in: a byte a cell for each kept year in
 * which any cell ever closed, two from the 256th replicate on, however many follow; the same whatever their order.
 *
 * @param years kept years, ascending; a closing counts in the first kept year that is not before it, and later ones
 * not at all. Fewer years take less memory
 * @param from counts to go on from, taken over
 */
export function closingMaps(cells: number, years: readonly number[], from?: ClosingCounts): ClosingMaps {
  if (years.length === 0 || years.some((year, i) => i > 0 && year <= years[i - 1]))
    throw new RangeError('The years to keep must be given, ascending');
  /** replicates that closed each cell in each kept year since the one before */
  const planes = from ? [...from.planes] : new Array<Uint8Array | Uint16Array | undefined>(years.length);
  /** 1 where some replicate can hold the plant */
  const canClose = from ? from.canClose : new Uint8Array(cells);
  const last = years.length - 1;
  /** kept year by calendar year, from the first kept one on */
  const slots = Uint16Array.from({ length: years[last] - years[0] + 1 }, (_, i) =>
    years.findIndex((year) => year >= years[0] + i),
  );
  let count = from?.count ?? 0;
  if (
    planes.length !== years.length ||
    [canClose, ...planes].some((plane) => plane && plane.length !== cells)
  )
    throw new RangeError('The counts to go on from are of other years or of another map');

  /** closings up to a kept year, so that whoever asks year after year does not sum from the first one each time */
  let summed: { readonly count: number; slot: number; readonly closed: Uint16Array } | undefined;

  /** Calls `then` with how many replicates closed each cell in each kept year from `from` to `until`, where any did. */
  function each(until: number, then: (closings: number, cell: number, year: number) => void, from = 0): void {
    for (let slot = from; slot <= until; slot++) {
      const plane = planes[slot];
      if (plane)
        for (let cell = 0; cell < cells; cell++) if (plane[cell]) then(plane[cell], cell, years[slot]);
    }
  }
  function blank(): Float32Array {
    const values = new Float32Array(cells);
    for (let cell = 0; cell < cells; cell++) if (!canClose[cell]) values[cell] = NaN;
    return values;
  }

  return {
    add(closing) {
      if (closing.length !== cells)
        throw new RangeError(`Found ${closing.length} closing years; expected ${cells}, one for each cell`);
      if (count === mostReplicates)
        throw new RangeError(`No more than ${mostReplicates} replicates can be counted`);
      if (++count === 256)
        planes.forEach((plane, slot) => {
          if (plane) planes[slot] = Uint16Array.from(plane);
        });
      for (let cell = 0; cell < cells; cell++) {
        const year = closing[cell];
        if (year === cannotClose) continue;
        canClose[cell] = 1;
        if (year === stillOpen || year > years[last]) continue;
        const slot = year <= years[0] ? 0 : slots[year - years[0]];
        const plane = (planes[slot] ??= count < 256 ? new Uint8Array(cells) : new Uint16Array(cells));
        plane[cell]++;
      }
    },
    get count() {
      return count;
    },
    counts: () => ({ count, canClose, planes }),
    chanceBy(year) {
      const until = years.indexOf(year);
      if (until < 0) throw new RangeError(`${year} is not kept; the years are ${years.join(', ')}`);
      if (summed?.count !== count || summed.slot > until)
        summed = { count, slot: -1, closed: new Uint16Array(cells) };
      const { closed } = summed;
      each(until, (n, cell) => (closed[cell] += n), summed.slot + 1);
      summed.slot = until;
      const chance = blank();
      for (let cell = 0; cell < cells; cell++) chance[cell] += closed[cell] / count;
      return chance;
    },
    medianYear() {
      const median = new Int16Array(cells);
      for (let cell = 0; cell < cells; cell++) median[cell] = canClose[cell] ? stillOpen : cannotClose;
      const closed = new Uint16Array(cells);
      each(last, (n, cell, year) => {
        closed[cell] += n;
        if (median[cell] === stillOpen && 2 * closed[cell] >= count) median[cell] = year;
      });
      return median;
    },
    restrictedMeanYear() {
      // Summed as years before the last one: small numbers, of which a 32-bit float loses next to nothing.
      const early = blank();
      each(last, (n, cell, year) => (early[cell] += n * (years[last] - year)));
      for (let cell = 0; cell < cells; cell++) early[cell] = years[last] - early[cell] / count;
      return early;
    },
  };
}
