/** Cells in rough order of time: whatever falls within one width of time comes out in any order. */
export interface ArrivalBuckets {
  /** Takes in a cell at a time no earlier than the bucket that is being emptied. */
  push(cell: number, time: number): void;
  /** Takes out a cell of the earliest bucket that holds any, or returns −1 of nothing. */
  take(): number;
}

/** Most buckets that are kept; a finer width is widened. */
const mostBuckets = 1 << 20;

/**
 * A queue of cells by buckets of time (Dial 1969, Communications of the ACM 12:632, from memory): constant time a cell
 * where a heap takes its logarithm. The same cell may lie in it several times.
 *
 * @param latest time beyond which nothing is pushed
 * @param width time that one bucket spans
 */
export function arrivalBuckets(latest: number, width: number): ArrivalBuckets {
  const buckets = Math.min(mostBuckets, Math.ceil(latest / width) + 2);
  const perTime = (buckets - 2) / latest;
  /** first entry of each bucket, −1 of an empty one */
  const heads = new Int32Array(buckets).fill(-1);
  /** cell of each entry, and the entry after it in its bucket, or among those that are free */
  let cells = new Int32Array(4096);
  let nexts = new Int32Array(4096);
  let used = 0;
  let free = -1;
  let held = 0;
  let current = buckets;

  function grow(): void {
    const [more, moreNexts] = [new Int32Array(2 * used), new Int32Array(2 * used)];
    more.set(cells);
    moreNexts.set(nexts);
    [cells, nexts] = [more, moreNexts];
  }

  return {
    push(cell, time) {
      let entry = free;
      if (entry >= 0) free = nexts[entry];
      else {
        if (used === cells.length) grow();
        entry = used++;
      }
      const bucket = (time * perTime) | 0;
      cells[entry] = cell;
      nexts[entry] = heads[bucket];
      heads[bucket] = entry;
      if (bucket < current) current = bucket;
      held++;
    },
    take() {
      if (held === 0) {
        current = buckets;
        return -1;
      }
      while (heads[current] < 0) current++;
      const entry = heads[current];
      heads[current] = nexts[entry];
      nexts[entry] = free;
      free = entry;
      held--;
      return cells[entry];
    },
  };
}
