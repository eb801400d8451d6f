import { cellCentre, type Grid } from '#sim-core/grid/grid.ts';

export interface SurveyedMound {
  /** easting and northing of its strongest cells' middle, m */
  readonly x: number;
  readonly y: number;
  readonly cells: number;
}

/** Refuge of half strength and more counts as a mound. */
const strong = 128;

/**
 * The mounds of a refuge layer: each patch of touching cells (8 neighbours) of at least half strength, at the middle of
 * its strongest cells.
 *
 * @param refuge strength in 8 bits, row-major, width × height
 * @param most mounds to return, the largest first
 */
export function surveyedMounds(grid: Grid, refuge: Uint8Array, most = 20_000): SurveyedMound[] {
  const { width, height } = grid;
  const seen = new Uint8Array(refuge.length);
  const found: SurveyedMound[] = [];
  const waiting: number[] = [];
  for (let first = 0; first < refuge.length; first++) {
    if (refuge[first] < strong || seen[first]) continue;
    let top = 0;
    let columns = 0;
    let rows = 0;
    let strongest = 0;
    let cells = 0;
    seen[first] = 1;
    waiting.push(first);
    for (let cell = waiting.pop(); cell !== undefined; cell = waiting.pop()) {
      const row = Math.floor(cell / width);
      const column = cell - row * width;
      cells++;
      if (refuge[cell] > top) {
        top = refuge[cell];
        columns = rows = strongest = 0;
      }
      if (refuge[cell] === top) {
        columns += column;
        rows += row;
        strongest++;
      }
      for (let r = Math.max(0, row - 1); r <= Math.min(height - 1, row + 1); r++)
        for (let c = Math.max(0, column - 1); c <= Math.min(width - 1, column + 1); c++) {
          const near = r * width + c;
          if (seen[near] || refuge[near] < strong) continue;
          seen[near] = 1;
          waiting.push(near);
        }
    }
    found.push({ ...cellCentre(grid, columns / strongest, rows / strongest), cells });
  }
  return found.sort((a, b) => b.cells - a.cells).slice(0, most);
}
