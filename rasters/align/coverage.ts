/** A polygon's share of each cell of the box around it, row-major: 0 outside, 1 inside. */
export interface Coverage {
  left: number;
  top: number;
  width: number;
  height: number;
  /** of at least width × height numbers; used again for the next polygon */
  shares: Float64Array;
  /** sum of the shares: the polygon's area in cells */
  area: number;
}

export const newCoverage = (): Coverage => ({
  left: 0,
  top: 0,
  width: 0,
  height: 0,
  shares: new Float64Array(0),
  area: 0,
});

/** Shares smaller than this are what is left of rounding. */
const dust = 1e-12;

/**
 * Works out exactly how much of each cell a four-cornered piece of ground covers: each edge adds, to the cells of the
 * rows that it crosses, the area that lies to its east, with the sign of its direction, and sums along the rows then hold
 * the shares. Pieces that share corners share all ground between them: their shares of a cell add up to 1.
 * (Green's theorem cell by cell, as font renderers use it; common practice, no source.)
 * @param x, y the four corners in cells, in either order of turning
 */
export function cover(x: Float64Array, y: Float64Array, out: Coverage): void {
  out.left = Math.floor(Math.min(x[0], x[1], x[2], x[3]));
  out.top = Math.floor(Math.min(y[0], y[1], y[2], y[3]));
  out.width = Math.max(1, Math.ceil(Math.max(x[0], x[1], x[2], x[3])) - out.left);
  out.height = Math.max(1, Math.ceil(Math.max(y[0], y[1], y[2], y[3])) - out.top);
  const cells = out.width * out.height;
  // The last cell's edge adds to the one after it.
  if (out.shares.length < cells + 2) out.shares = new Float64Array(2 * (cells + 2));
  else out.shares.fill(0, 0, cells + 2);
  for (let i = 0; i < 4; i++) {
    const j = (i + 1) & 3;
    addEdge(x[i] - out.left, y[i] - out.top, x[j] - out.left, y[j] - out.top, out);
  }
  out.area = 0;
  for (let row = 0, at = 0; row < out.height; row++) {
    let sum = 0;
    for (let column = 0; column < out.width; column++, at++) {
      sum += out.shares[at];
      const share = Math.abs(sum) < dust ? 0 : Math.abs(sum);
      out.shares[at] = share;
      out.area += share;
    }
  }
}

function addEdge(x0: number, y0: number, x1: number, y1: number, { shares, width }: Coverage): void {
  if (y0 === y1) return;
  const down = y0 < y1;
  const sign = down ? 1 : -1;
  const topX = down ? x0 : x1;
  const topY = down ? y0 : y1;
  const bottomX = down ? x1 : x0;
  const bottomY = down ? y1 : y0;
  const slope = (bottomX - topX) / (bottomY - topY);
  for (let row = Math.floor(topY); row < bottomY; row++) {
    const from = Math.max(row, topY);
    const to = Math.min(row + 1, bottomY);
    const a = topX + slope * (from - topY);
    const b = topX + slope * (to - topY);
    addStretch(Math.min(a, b), Math.max(a, b), sign * (to - from), row * width, width, shares);
  }
}

/** Adds a stretch of an edge within one row of cells, from west to east, of signed height `height`. */
function addStretch(
  west: number,
  east: number,
  height: number,
  rowAt: number,
  width: number,
  shares: Float64Array,
): void {
  const first = Math.min(Math.floor(west), width - 1);
  const last = Math.min(Math.max(first, Math.ceil(east) - 1), width - 1);
  if (first === last) {
    // The mean distance to the cell's eastern side is the share of it that lies to the east of the edge.
    const inside = height * (first + 1 - (west + east) / 2);
    shares[rowAt + first] += inside;
    if (first + 1 < width) shares[rowAt + first + 1] += height - inside;
    return;
  }
  const perColumn = height / (east - west);
  let given = 0;
  for (let column = first; column <= last; column++) {
    // Height of the edge within this column, and what lies to its east, with all columns before it wholly so.
    const from = Math.max(column, west);
    const to = Math.min(column + 1, east);
    const here = perColumn * (to - from);
    const before = perColumn * (from - west);
    const total = before + here * (column + 1 - (from + to) / 2);
    shares[rowAt + column] += total - given;
    given = total;
  }
  if (last + 1 < width) shares[rowAt + last + 1] += height - given;
}
