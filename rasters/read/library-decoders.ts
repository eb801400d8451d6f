import { inflateAtMost, InflateError } from '#rasters/cells/inflate-exactly.ts';
import { readLercBlob } from './lerc-blob.ts';
import { toHostOrder } from './predictor.ts';
import { damaged, RasterError } from './raster-error.ts';
import { compressions, type TiffLayout } from './tiff-layout.ts';
import { sizedZstdFrame } from './zstd-frame.ts';

/**
 * Runs one block through the decoder that geotiff.js has for a compression.
 * @throws RasterError `raster-truncated` whatever the decoder throws: it knows no other reason than damage
 */
async function decodeByLibrary(compression: number, block: ArrayBuffer): Promise<ArrayBufferLike> {
  // Most rasters need none of it, and it takes longer to load than a small one to read.
  const { getDecoder } = await import('geotiff');
  // As we undo predictors ourselves and hand over plain LERC blobs, the decoders look at these alone.
  const parameters = {
    predictor: 1,
    planarConfiguration: 1,
    bitsPerSample: 8,
    tileWidth: 0,
    tileHeight: 0,
    LercParameters: [4, 0],
  };
  const decoder = await getDecoder(compression, parameters);
  try {
    return await decoder.decode(block);
  } catch (error) {
    throw damaged(
      `a strip or tile that cannot be decoded (${error instanceof Error ? error.message : String(error)})`,
    );
  }
}

/** Decodes a ZSTD block into exactly `size` bytes. @throws RasterError `raster-truncated` */
export async function decodeZstd(block: Uint8Array, size: number): Promise<Uint8Array<ArrayBuffer>> {
  const frame = sizedZstdFrame(block, { accepts: (held) => held === size, otherwise: size });
  return exactly(size, new Uint8Array(await decodeByLibrary(compressions.zstd, frame.buffer)));
}

/**
 * Decodes a LERC block, which can be packed once more, into `rows` × the block's width cells in host order: GDAL
 * packs them in the file's. NaN cells are kept in a mask beside the values, which geotiff.js leaves out.
 * @throws RasterError `raster-truncated`; `raster-type` for whole numbers with a mask, which say nothing in its cells
 */
export async function decodeLerc(
  block: Uint8Array,
  rows: number,
  { blockWidth, samples, bytesPerCell, dataType, littleEndian, lercPacking }: TiffLayout,
): Promise<Uint8Array<ArrayBuffer>> {
  const size = rows * blockWidth * samples * bytesPerCell;
  const blob = await unpackBlob(block, size, lercPacking);
  const { mask } = readLercBlob(blob, { width: blockWidth, samples, rows, dataType });
  const decoded = await decodeByLibrary(compressions.lerc, blob.buffer);
  // 8-bit cells that were kept as they are come back as the blob they lie in, at its end.
  const bytes =
    decoded === blob.buffer ? blob.slice(blob.length - size) : exactly(size, new Uint8Array(decoded));
  toHostOrder(bytes, bytesPerCell, littleEndian);
  if (mask) setMissing(bytes, mask, { dataType, samples });
  return bytes;
}

function exactly(size: number, bytes: Uint8Array<ArrayBufferLike>): Uint8Array<ArrayBuffer> {
  if (bytes.length !== size)
    throw damaged(`a strip or tile that decodes to ${bytes.length} bytes where ${size} belong`);
  return bytes as Uint8Array<ArrayBuffer>;
}

/** The plain LERC blob in a block, alone in its buffer. */
async function unpackBlob(
  block: Uint8Array,
  size: number,
  packing: TiffLayout['lercPacking'],
): Promise<Uint8Array<ArrayBuffer>> {
  // A blob that gains nothing holds the cells as they are, beside a header and a mask of a bit a cell.
  const most = 2 * size + 1024;
  if (packing === compressions.none) return new Uint8Array(block);
  if (packing === compressions.zstd) {
    const frame = sizedZstdFrame(block, { accepts: (held) => held <= most, otherwise: undefined });
    return new Uint8Array(await decodeByLibrary(compressions.zstd, frame.buffer)).slice();
  }
  try {
    return inflateAtMost(block, most).slice();
  } catch (error) {
    if (error instanceof InflateError) throw damaged(`a strip or tile that holds ${error.message}`);
    throw error;
  }
}

function setMissing(
  bytes: Uint8Array<ArrayBuffer>,
  mask: Uint8Array,
  { dataType, samples }: Pick<TiffLayout, 'dataType' | 'samples'>,
): void {
  if (!dataType.startsWith('float'))
    throw new RasterError('raster-type', {
      found: `a LERC block of ${dataType} numbers with cells left out`,
      expected: 'a no-data value in such cells',
      remedy: 'Write it again with gdal_translate -co COMPRESS=DEFLATE IN.tif OUT.tif.',
    });
  const cells = dataType === 'float32' ? new Float32Array(bytes.buffer) : new Float64Array(bytes.buffer);
  for (let i = 0; i < cells.length / samples; i++)
    if ((mask[i >> 3] & (0x80 >> (i & 7))) === 0) cells.fill(NaN, i * samples, (i + 1) * samples);
}
