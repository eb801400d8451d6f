/**
 * The working grid of a site: square cells in a projected CRS in metres, row 0 in the north, column 0 in the west.
 * `originX`, `originY` are the outer corner of the north-western cell (never its centre), in metres.
 */
export interface Grid {
  readonly width: number;
  readonly height: number;
  /** side of a square cell, m */
  readonly cellSize: number;
  readonly originX: number;
  readonly originY: number;
  /** EPSG code of a projected CRS in metres */
  readonly epsg: number;
}

/** Index of a cell in a row-major array of width × height. */
export const cellIndex = (grid: Grid, column: number, row: number): number => row * grid.width + column;

/** Column and row of the cell that holds a point in the grid's CRS, or undefined when it lies outside. */
export function cellAt(grid: Grid, x: number, y: number): { column: number; row: number } | undefined {
  const column = Math.floor((x - grid.originX) / grid.cellSize);
  const row = Math.floor((grid.originY - y) / grid.cellSize);
  return column >= 0 && row >= 0 && column < grid.width && row < grid.height ? { column, row } : undefined;
}

/** Centre of a cell in the grid's CRS, m. */
export const cellCentre = (grid: Grid, column: number, row: number): { x: number; y: number } => ({
  x: grid.originX + (column + 0.5) * grid.cellSize,
  y: grid.originY - (row + 0.5) * grid.cellSize,
});

/** What differs between two grids, in words, or an empty list when they are the same cells. */
export function gridDifferences(found: Grid, expected: Grid): string[] {
  const tolerance = 1e-6 * expected.cellSize;
  const differences: string[] = [];
  if (found.epsg !== expected.epsg) differences.push(`EPSG:${found.epsg} instead of EPSG:${expected.epsg}`);
  if (Math.abs(found.cellSize - expected.cellSize) > tolerance)
    differences.push(`cells of ${found.cellSize} m instead of ${expected.cellSize} m`);
  if (found.width !== expected.width || found.height !== expected.height)
    differences.push(
      `${found.width} × ${found.height} cells instead of ${expected.width} × ${expected.height}`,
    );
  if (
    Math.abs(found.originX - expected.originX) > tolerance ||
    Math.abs(found.originY - expected.originY) > tolerance
  )
    differences.push(
      `north-west corner at ${found.originX}, ${found.originY} instead of ${expected.originX}, ${expected.originY}`,
    );
  return differences;
}
