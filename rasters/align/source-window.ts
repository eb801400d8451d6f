import type { CellValues } from '#sim-core/grid/ground.ts';
import { infiniteValue } from '#rasters/read/check-values.ts';
import type { BandBlocks } from '#rasters/read/band-blocks.ts';

/** A rectangle of a raster's cells, rows counted from the north. */
export interface Window {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** Gives rectangles of a band, decoding each strip or tile as rarely as its memory allows. */
export interface SourceWindow {
  /**
   * Values of a rectangle that lies within the raster, row-major; NaN where there is no data. The array is used again by
   * the next call.
   * @throws RasterError `raster-truncated`, `raster-values` at an infinite value
   */
  load(window: Window): Promise<Float64Array>;
}

/**
 * @param noData stored value that means no data; null for none
 * @param southUp whether the file's first row is the southernmost
 * @param most bytes of decoded strips or tiles that are kept; one more is held while it is decoded
 */
export function sourceWindow(
  blocks: BandBlocks,
  { noData, southUp, most }: { noData: number | null; southUp: boolean; most: number },
): SourceWindow {
  const { layout } = blocks;
  const { height, blockWidth, blockHeight, blocksAcross } = layout;
  const kept = new Map<number, CellValues | null>();
  let bytes = 0;
  let held = new Float64Array(0);

  async function block(index: number): Promise<CellValues | null> {
    const known = kept.get(index);
    if (known !== undefined) {
      // The last one used goes to the end of the map, whose first is then the one to go.
      kept.delete(index);
      kept.set(index, known);
      return known;
    }
    const values = await blocks.read(index);
    kept.set(index, values);
    bytes += values?.byteLength ?? 0;
    for (const [oldest, old] of kept) {
      if (bytes <= most || oldest === index) break;
      kept.delete(oldest);
      bytes -= old?.byteLength ?? 0;
    }
    return values;
  }

  return {
    async load({ left, top, width, height: rows }) {
      if (held.length < width * rows) held = new Float64Array(width * rows);
      const out = held.subarray(0, width * rows);
      const fileTop = southUp ? height - top - rows : top;
      for (
        let blockRow = Math.floor(fileTop / blockHeight);
        blockRow * blockHeight < fileTop + rows;
        blockRow++
      )
        for (
          let blockColumn = Math.floor(left / blockWidth);
          blockColumn * blockWidth < left + width;
          blockColumn++
        ) {
          const values = await block(blockRow * blocksAcross + blockColumn);
          const [x0, y0] = [blockColumn * blockWidth, blockRow * blockHeight];
          const [from, to] = [Math.max(left, x0), Math.min(left + width, x0 + blockWidth)];
          const lastRow = Math.min(fileTop + rows, y0 + blockHeight);
          for (let row = Math.max(fileTop, y0); row < lastRow; row++) {
            const outRow = southUp ? fileTop + rows - 1 - row : row - fileTop;
            let at = outRow * width + from - left;
            if (!values) {
              // A block left out of a sparse file holds no data, or zero where the file has no such value.
              out.fill(noData === null ? 0 : NaN, at, at + to - from);
              continue;
            }
            const rowAt = (row - y0) * blockWidth - x0;
            for (let column = from; column < to; column++) {
              const value = values[rowAt + column];
              if (value === Infinity || value === -Infinity) throw infiniteValue(column, row);
              out[at++] = value === noData ? NaN : value;
            }
          }
        }
      return out;
    },
  };
}
