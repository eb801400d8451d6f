/** Cover from which a cell counts as occupied. */
export const occupiedFrom = 0.05;

/** What the map of one moment comes to, in cells and cell sides. */
export interface CoverMeasures {
  /** ΣC */
  readonly cover: number;
  /** cells with C ≥ 0.05 */
  readonly occupied: number;
  /** sides between an occupied cell and one that is not; the border of the map is none */
  readonly edges: number;
  /** 8-neighbour patches of occupied cells */
  readonly patches: number;
  /** cells of the largest patch */
  readonly largestPatch: number;
}

/**
 * Sums and patches of one map in one pass over its cells: patches by union-find over the stretches of occupied cells of
 * two rows (Rosenfeld & Pfaltz 1966, J. ACM 13:471; Hoshen & Kopelman 1976, Phys. Rev. B 14:3438; stretches instead of
 * cells: He, Chao & Suzuki 2008, IEEE Trans. Image Process. 17:749, from memory), so the work beside the sum follows the
 * edges, and memory the number of stretches that were ever labelled.
 *
 * @param cover Float32, row-major, width × height
 */
export function measureCover(cover: Float32Array, width: number, height: number): CoverMeasures {
  const patches = patchForest();
  let before = rowOfStretches(width);
  let here = rowOfStretches(width);
  let sum = 0;
  let occupied = 0;
  let edges = 0;
  for (let y = 0; y < height; y++) {
    const first = y * width;
    let count = 0;
    let lived = false;
    for (let x = 0; x < width; x++) {
      const c = cover[first + x];
      sum += c;
      const lives = c >= occupiedFrom;
      if (lives === lived) continue;
      if (lives) here.starts[count] = x;
      else here.ends[count++] = x;
      lived = lives;
      if (x > 0) edges++;
    }
    if (lived) here.ends[count++] = width;
    here.count = count;
    const { cells, shared } = label(here, before, patches);
    occupied += cells;
    if (y > 0) edges += cells + before.cells - 2 * shared;
    here.cells = cells;
    [before, here] = [here, before];
  }
  const { count, largest } = patches.total();
  return { cover: sum, occupied, edges, patches: count, largestPatch: largest };
}

/** Stretches of occupied cells of a row, from the west: first column, the column behind the last, and patch. */
interface Row {
  readonly starts: Int32Array;
  readonly ends: Int32Array;
  readonly labels: Int32Array;
  count: number;
  /** occupied cells */
  cells: number;
}

function rowOfStretches(width: number): Row {
  const most = (width + 1) >> 1;
  const [starts, ends, labels] = [new Int32Array(most), new Int32Array(most), new Int32Array(most)];
  return { starts, ends, labels, count: 0, cells: 0 };
}

/** Gives each stretch its patch, joining those that touch; says how many cells there are, and how many also lived before. */
function label(here: Row, before: Row, patches: PatchForest): { cells: number; shared: number } {
  let cells = 0;
  let shared = 0;
  let b = 0;
  for (let s = 0; s < here.count; s++) {
    const start = here.starts[s];
    const end = here.ends[s];
    let patch = -1;
    // A stretch may reach beyond the end of this one, and touch the next.
    while (b < before.count && before.ends[b] < start) b++;
    for (let t = b; t < before.count && before.starts[t] <= end; t++) {
      patch = patch < 0 ? before.labels[t] : patches.join(patch, before.labels[t]);
      shared += Math.max(0, Math.min(end, before.ends[t]) - Math.max(start, before.starts[t]));
    }
    if (patch < 0) patch = patches.add();
    here.labels[s] = patch;
    patches.grow(patch, end - start);
    cells += end - start;
  }
  return { cells, shared };
}

type PatchForest = ReturnType<typeof patchForest>;

/** Disjoint sets with a size each. */
function patchForest() {
  /** set that each set was joined to, or itself */
  const parents: number[] = [];
  const sizes: number[] = [];
  const root = (label: number): number => {
    let at = label;
    while (parents[at] !== at) at = parents[at] = parents[parents[at]];
    return at;
  };
  return {
    add: (): number => {
      sizes.push(0);
      return parents.push(parents.length) - 1;
    },
    grow: (label: number, cells: number) => {
      sizes[root(label)] += cells;
    },
    join: (a: number, b: number): number => {
      const keep = root(a);
      const gone = root(b);
      if (keep === gone) return keep;
      parents[gone] = keep;
      sizes[keep] += sizes[gone];
      return keep;
    },
    total: () => {
      let count = 0;
      let largest = 0;
      parents.forEach((parent, label) => {
        if (parent !== label) return;
        count++;
        if (sizes[label] > largest) largest = sizes[label];
      });
      return { count, largest };
    },
  };
}
