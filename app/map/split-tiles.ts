/** A part of a raster that fits one texture, in cells. */
export interface Tile {
  readonly column: number;
  readonly row: number;
  readonly width: number;
  readonly height: number;
}

/** Splits width × height cells into the fewest tiles of at most `limit` cells a side, as even as they can be. */
export function splitTiles(width: number, height: number, limit: number): Tile[] {
  const cuts = (length: number) => {
    const parts = Math.ceil(length / limit);
    return Array.from({ length: parts + 1 }, (_, i) => Math.round((i * length) / parts));
  };
  const columns = cuts(width);
  const rows = cuts(height);
  return rows.slice(1).flatMap((end, r) =>
    columns.slice(1).map((right, c) => ({
      column: columns[c],
      row: rows[r],
      width: right - columns[c],
      height: end - rows[r],
    })),
  );
}

/** The cells of one tile out of a row-major raster of so many columns, into `target`. */
export function copyTile(values: Uint8Array, columns: number, tile: Tile, target: Uint8Array): void {
  for (let r = 0; r < tile.height; r++) {
    const start = (tile.row + r) * columns + tile.column;
    target.set(values.subarray(start, start + tile.width), r * tile.width);
  }
}
