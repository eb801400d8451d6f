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
 * Sums and patches of one map in one pass: patches by union-find over two rows of labels (Rosenfeld & Pfaltz 1966,
 * J. ACM 13:471; Hoshen & Kopelman 1976, Phys. Rev. B 14:3438), so memory follows the number of patches, not the map.
 *
 * @param cover Float32, row-major, width × height
 */
export function measureCover(cover: Float32Array, width: number, height: number): CoverMeasures {
  const patches = patchForest();
  /** label of each occupied cell of the row before and of this one, −1 elsewhere, with a column to spare on each side */
  let before = new Int32Array(width + 2).fill(-1);
  let here = new Int32Array(width + 2).fill(-1);
  let sum = 0;
  let occupied = 0;
  let edges = 0;
  for (let y = 0; y < height; y++) {
    const first = y * width - 1;
    for (let x = 1; x <= width; x++) {
      const c = cover[first + x];
      sum += c;
      const lives = c >= occupiedFrom;
      if (x > 1 && lives !== here[x - 1] >= 0) edges++;
      if (y > 0 && lives !== before[x] >= 0) edges++;
      if (!lives) {
        here[x] = -1;
        continue;
      }
      occupied++;
      let label = here[x - 1];
      if (before[x] >= 0) label = label < 0 ? before[x] : patches.join(label, before[x]);
      else {
        // North-west touches west and north-east stands alone: only where north is empty do they add a join.
        if (before[x - 1] >= 0) label = label < 0 ? before[x - 1] : patches.join(label, before[x - 1]);
        if (before[x + 1] >= 0) label = label < 0 ? before[x + 1] : patches.join(label, before[x + 1]);
      }
      here[x] = label = label < 0 ? patches.add() : label;
      patches.grow(label);
    }
    [before, here] = [here, before];
  }
  const { count, largest } = patches.total();
  return { cover: sum, occupied, edges, patches: count, largestPatch: largest };
}

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
    grow: (label: number) => {
      sizes[root(label)]++;
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
