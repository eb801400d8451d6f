import type { Grid } from '#sim-core/grid/grid.ts';
import type { BandBlocks } from '#rasters/read/band-blocks.ts';
import { outputCells } from './output-cells.ts';
import { pacer, type Progress } from './progress.ts';
import type { Raster } from '#rasters/read/raster.ts';
import type { RasterDataType } from '#rasters/read/tiff-layout.ts';

export interface CopyWish {
  readonly target: Grid;
  /** by how many cells the grid's corner lies to the east and south of the raster's */
  readonly shift: { readonly columns: number; readonly rows: number };
  readonly southUp: boolean;
  readonly dataType: RasterDataType;
  readonly noData: number | null;
}

/**
 * Copies the cells that raster and grid share, bit for bit; only strips or tiles that hold some of them are decoded.
 * @throws RasterError what is wrong with the file
 */
export async function copyCells(
  blocks: BandBlocks,
  { target, shift, southUp, dataType, noData }: CopyWish,
  progress: Progress,
): Promise<Pick<Raster, 'dataType' | 'noData' | 'values'>> {
  const { layout } = blocks;
  const { width, height, blockWidth, blockHeight, blocksAcross } = layout;
  const out = outputCells(target.width * target.height, dataType, noData);
  markMissing(out.miss, target, shift, layout);
  const { values } = out.result;
  const tell = pacer(progress);
  const [left, right] = [Math.max(0, shift.columns), Math.min(width, shift.columns + target.width)];
  const fileTop = southUp ? height - shift.rows - target.height : shift.rows;
  const [top, bottom] = [Math.max(0, fileTop), Math.min(height, fileTop + target.height)];
  for (let blockRow = Math.floor(top / blockHeight); blockRow * blockHeight < bottom; blockRow++) {
    for (let column = Math.floor(left / blockWidth); column * blockWidth < right; column++) {
      const block = await blocks.read(blockRow * blocksAcross + column);
      const [from, to] = [Math.max(left, column * blockWidth), Math.min(right, (column + 1) * blockWidth)];
      for (
        let row = Math.max(top, blockRow * blockHeight);
        row < Math.min(bottom, (blockRow + 1) * blockHeight);
        row++
      ) {
        const outRow = southUp ? target.height - 1 - (row - fileTop) : row - fileTop;
        const at = outRow * target.width + from - shift.columns;
        const start = (row - blockRow * blockHeight) * blockWidth + from - column * blockWidth;
        // A block left out of a sparse file holds no data, or zero where the file has no such value.
        if (block) values.set(block.subarray(start, start + to - from), at);
        else values.fill(noData ?? 0, at, at + to - from);
      }
    }
    await tell((Math.min(bottom, (blockRow + 1) * blockHeight) - top) / (bottom - top));
  }
  return out.result;
}

/** Marks the cells of the grid that the raster does not reach. */
function markMissing(
  miss: (index: number) => void,
  { width, height }: Grid,
  { columns, rows }: CopyWish['shift'],
  raster: { readonly width: number; readonly height: number },
): void {
  for (let row = 0; row < height; row++)
    for (let column = 0; column < width; column++) {
      if (column === 0 && row + rows >= 0 && row + rows < raster.height && columns >= 0) {
        // The whole stretch that the raster reaches is passed over.
        column = Math.max(0, Math.min(width, raster.width - columns));
        if (column >= width) break;
      }
      const [x, y] = [column + columns, row + rows];
      if (x < 0 || y < 0 || x >= raster.width || y >= raster.height) miss(row * width + column);
    }
}
