import { inflateExactly, InflateError } from '#rasters/cells/inflate-exactly.ts';
import { decodeLerc, decodeZstd } from './library-decoders.ts';
import { decodeLzw } from './lzw.ts';
import { decodePackBits } from './pack-bits.ts';
import { toHostOrder, undoDifferences, undoFloatDifferences } from './predictor.ts';
import { damaged } from './raster-error.ts';
import { compressions, type TiffLayout } from './tiff-layout.ts';

/**
 * The cells of one strip or tile, in this machine's byte order: `rows` × the block's width × the samples of a cell ×
 * their bytes, in a fresh buffer. No decoder writes a byte more, whatever the block claims.
 * @throws RasterError `raster-truncated` when the block is damaged or does not hold so many bytes
 */
export async function decodeBlock(
  block: Uint8Array,
  rows: number,
  layout: TiffLayout,
): Promise<Uint8Array<ArrayBuffer>> {
  const { compression, predictor, blockWidth, samples, bytesPerCell, littleEndian } = layout;
  if (compression === compressions.lerc) return decodeLerc(block, rows, layout);
  const size = rows * blockWidth * samples * bytesPerCell;
  const bytes =
    compression === compressions.zstd ? await decodeZstd(block, size) : unpack(block, size, compression);
  const shape = { width: blockWidth, samples, rows, bytesPerCell, littleEndian };
  if (predictor === 3) {
    undoFloatDifferences(bytes, shape);
    return bytes;
  }
  toHostOrder(bytes, bytesPerCell, littleEndian);
  if (predictor === 2) undoDifferences(bytes, shape);
  return bytes;
}

type OwnCompression = Exclude<TiffLayout['compression'], typeof compressions.lerc | typeof compressions.zstd>;

function unpack(block: Uint8Array, size: number, compression: OwnCompression): Uint8Array<ArrayBuffer> {
  switch (compression) {
    case compressions.none:
      if (block.length < size) throw damaged(`a strip or tile of ${block.length} bytes where ${size} belong`);
      // Not slice: a Node Buffer would give a view of the source, and the cells are put in order in place.
      return new Uint8Array(block.subarray(0, size));
    case compressions.lzw:
      return decodeLzw(block, size);
    case compressions.packBits:
      return decodePackBits(block, size);
    case compressions.deflate:
    case compressions.oldDeflate:
      try {
        return inflateExactly(block, size);
      } catch (error) {
        if (error instanceof InflateError) throw damaged(`a strip or tile that holds ${error.message}`);
        throw error;
      }
  }
}
