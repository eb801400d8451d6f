import type { CellValues } from '#sim-core/grid/ground.ts';
import { decodeBlock } from './decode-block.ts';
import { arrayTypes } from './raster.ts';
import { readAhead, readBytes, type RasterSource } from './raster-source.ts';
import type { TiffLayout } from './tiff-layout.ts';

/** The strips or tiles of one band. */
export interface BandBlocks {
  readonly layout: TiffLayout;
  /**
   * Values of block number `index` (row by row of blocks), as wide as a block and as high as one, the last strip being as
   * high as what is left; null for a block that a sparse file leaves out.
   * @throws RasterError `raster-truncated`, `raster-type`
   */
  read(index: number): Promise<CellValues | null>;
}

/**
 * Opens a band, counted from 1. Where the file has an alpha band, cells where it is 0 come as NaN among 64-bit floats.
 * Nothing is kept between two reads but some bytes read ahead.
 */
export function openBand(
  input: RasterSource,
  layout: TiffLayout,
  { index: band, noData }: { readonly index: number; readonly noData: number | null },
): BandBlocks {
  const source = readAhead(input);
  const { alphaBand, samples } = layout;
  const alpha = alphaBand === null || alphaBand === band ? undefined : alphaBand;
  return {
    layout,
    async read(index) {
      const together = samples > 1 ? await readBlock(source, layout, index) : undefined;
      const take = async (which: number) =>
        samples > 1
          ? together && pick(together, samples, which - 1)
          : readBlock(source, layout, (which - 1) * layout.blocks + index);
      const values = await take(band);
      if (alpha === undefined) return values ?? null;
      const seen = values
        ? Float64Array.from(values)
        : new Float64Array(layout.blockWidth * rowsOf(layout, index)).fill(noData ?? 0);
      return hide(seen, await take(alpha));
    },
  };
}

/** Rows of a block: tiles are whole also at the lower edge, strips end with the raster. */
function rowsOf({ tiled, height, blockHeight, blocks, blocksAcross }: TiffLayout, index: number): number {
  const top = Math.floor((index % blocks) / blocksAcross) * blockHeight;
  return tiled ? blockHeight : Math.min(blockHeight, height - top);
}

async function readBlock(
  source: RasterSource,
  layout: TiffLayout,
  index: number,
): Promise<CellValues | undefined> {
  const { offsets, byteCounts, dataType } = layout;
  if (byteCounts[index] === 0) return undefined;
  const packed = await readBytes(source, offsets[index], byteCounts[index], 'a strip or tile');
  return new arrayTypes[dataType]((await decodeBlock(packed, rowsOf(layout, index), layout)).buffer);
}

function pick(values: CellValues, samples: number, which: number): CellValues {
  const picked = new (values.constructor as { new (length: number): CellValues })(values.length / samples);
  for (let i = 0, from = which; i < picked.length; i++, from += samples) picked[i] = values[from];
  return picked;
}

function hide(seen: Float64Array, alpha: CellValues | undefined): Float64Array {
  // A block of alpha that is left out is all zero.
  for (let i = 0; i < seen.length; i++) if (!alpha || alpha[i] === 0) seen[i] = NaN;
  return seen;
}
