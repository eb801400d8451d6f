import { damaged, RasterError } from './raster-error.ts';
import { fieldNumbers, type TiffDirectory } from './tiff-directory.ts';

export type RasterDataType =
  'uint8' | 'int8' | 'uint16' | 'int16' | 'uint32' | 'int32' | 'float32' | 'float64';

export interface RasterLimits {
  /** most cells of a raster */
  readonly cells: number;
  /** most decoded bytes of one strip or tile */
  readonly blockBytes: number;
}

/** A site of 8,192 × 8,192 cells, and a raster of 4,000 × 4,000 doubles kept in one strip. */
export const defaultRasterLimits: RasterLimits = { cells: 67_108_864, blockBytes: 134_217_728 };

/** A raster that a site's is cut out of, or made of by larger cells: 32,768 × 32,768, never held whole. */
export const largestSource: RasterLimits = { ...defaultRasterLimits, cells: 1_073_741_824 };

export const compressions = {
  none: 1,
  lzw: 5,
  deflate: 8,
  oldDeflate: 32946,
  packBits: 32773,
  lerc: 34887,
  zstd: 50000,
} as const;
export type Compression = (typeof compressions)[keyof typeof compressions];
export type CompressionName = keyof typeof compressions;
export type LercPacking = typeof compressions.none | typeof compressions.deflate | typeof compressions.zstd;

/** How the cells of a TIFF are kept, all of it checked against the limits and the length of the file. */
export interface TiffLayout {
  readonly width: number;
  readonly height: number;
  readonly dataType: RasterDataType;
  readonly bytesPerCell: number;
  /** bands of the file */
  readonly bands: number;
  /** the band, counted from 1, whose 0 says that a cell holds no data; null where there is none */
  readonly alphaBand: number | null;
  /** values of one cell in a block: all bands, or 1 where each band has blocks of its own, one band after another */
  readonly samples: number;
  readonly littleEndian: boolean;
  readonly compression: Compression;
  /** how a LERC block is packed once more */
  readonly lercPacking: LercPacking;
  readonly predictor: 1 | 2 | 3;
  /** strips are blocks as wide as the raster */
  readonly tiled: boolean;
  readonly blockWidth: number;
  readonly blockHeight: number;
  readonly blocksAcross: number;
  /** blocks that hold the whole width and height once */
  readonly blocks: number;
  /** where each block stands, row by row, and how long it is; 0 and 0 is a block left out */
  readonly offsets: readonly number[];
  readonly byteCounts: readonly number[];
}

const mostBlocks = 1_048_576;
const mostBands = 1024;
const tags = {
  width: 256,
  height: 257,
  bits: 258,
  compression: 259,
  fillOrder: 266,
  stripOffsets: 273,
  samples: 277,
  planar: 284,
  rowsPerStrip: 278,
  stripByteCounts: 279,
  predictor: 317,
  tileWidth: 322,
  tileHeight: 323,
  tileOffsets: 324,
  tileByteCounts: 325,
  extraSamples: 338,
  sampleFormat: 339,
  lercParameters: 50674,
} as const;

/** Width × height as the header claims them, unchecked; 0 where it does not say. @throws RasterError `raster-truncated` */
export async function claimedCells(directory: TiffDirectory): Promise<number> {
  const [width = 0] = (await fieldNumbers(directory, tags.width, 1)) ?? [];
  const [height = 0] = (await fieldNumbers(directory, tags.height, 1)) ?? [];
  return width * height;
}

/**
 * Reads how the bands are kept. Nothing is decoded and nothing of the size of the raster is allocated.
 * @throws RasterError `raster-too-large`, `raster-bands`, `raster-type`, `raster-truncated`
 */
export async function readTiffLayout(directory: TiffDirectory, limits: RasterLimits): Promise<TiffLayout> {
  const one = async (tag: number) => (await fieldNumbers(directory, tag, 1))?.[0];
  const width = await one(tags.width);
  const height = await one(tags.height);
  if (!isCount(width) || !isCount(height)) throw damaged('a TIFF that does not say how wide and high it is');
  if (width * height > limits.cells)
    throw new RasterError('raster-too-large', {
      found: `${width} × ${height} cells`,
      expected: `at most ${limits.cells} cells`,
      remedy:
        'Clip the raster to the site (gdal_translate -projwin) or use larger cells (gdal_translate -tr 2 2).',
    });
  checkPictures(directory);
  const bands = (await one(tags.samples)) ?? 1;
  if (!isCount(bands) || bands > mostBands) throw damaged(`${bands} bands`);
  const apart = bands > 1 && (await one(tags.planar)) === 2;
  const samples = apart ? 1 : bands;
  const cell = await readCellType(directory, bands);
  const compression = readCompression((await one(tags.compression)) ?? 1);
  const lercPacking = readLercPacking(await fieldNumbers(directory, tags.lercParameters, 16));
  if (((await one(tags.fillOrder)) ?? 1) !== 1)
    throw otherType('bits kept in reverse order', 'bits in their usual order');
  const predictor = readPredictor(compression, (await one(tags.predictor)) ?? 1, cell);

  const tiled = directory.fields.has(tags.tileOffsets);
  const blockWidth = tiled ? await one(tags.tileWidth) : width;
  const blockHeight = tiled
    ? await one(tags.tileHeight)
    : Math.min((await one(tags.rowsPerStrip)) ?? height, height);
  if (!isCount(blockWidth) || !isCount(blockHeight)) throw damaged('strips or tiles without a size');
  const blocksAcross = Math.ceil(width / blockWidth);
  const blocks = blocksAcross * Math.ceil(height / blockHeight);
  const all = apart ? blocks * bands : blocks;
  const blockCells = blockWidth * blockHeight;
  if (
    all > mostBlocks ||
    blockCells * samples * cell.bytesPerCell > limits.blockBytes ||
    blocks * blockCells > 4 * limits.cells
  )
    throw new RasterError('raster-too-large', {
      found: `${all} strips or tiles of ${blockWidth} × ${blockHeight} cells`,
      expected: `strips or tiles of at most ${limits.blockBytes} bytes, and at most ${mostBlocks} of them`,
      remedy: 'Write it again with gdal_translate -co TILED=YES -co COMPRESS=DEFLATE IN.tif OUT.tif.',
    });
  const offsets = await blockNumbers(directory, tiled ? tags.tileOffsets : tags.stripOffsets, all);
  const byteCounts = await blockNumbers(directory, tiled ? tags.tileByteCounts : tags.stripByteCounts, all);
  checkBlocks(offsets, byteCounts, directory.source.size);
  return {
    width,
    height,
    ...cell,
    bands,
    alphaBand: await readAlphaBand(directory, bands),
    samples,
    littleEndian: directory.littleEndian,
    compression,
    lercPacking,
    predictor,
    tiled,
    blockWidth,
    blockHeight,
    blocksAcross,
    blocks,
    offsets,
    byteCounts,
  };
}

const isCount = (n: number | undefined): n is number => n !== undefined && Number.isSafeInteger(n) && n > 0;

function checkPictures(directory: TiffDirectory): void {
  const pictures = 1 + directory.laterKinds.filter((kind) => (kind & 5) === 0).length;
  if (pictures > 1)
    throw new RasterError('raster-bands', {
      found: `${pictures} pictures in one file`,
      expected: 'one picture',
      remedy: 'Pick one, for example gdal_translate GTIFF_DIR:1:IN.tif OUT.tif.',
    });
  if (directory.laterKinds.some((kind) => (kind & 4) !== 0))
    throw new RasterError('raster-bands', {
      found: 'a picture and a mask beside it',
      expected: 'one picture whose missing cells hold a no-data value',
      remedy: 'Burn the mask in, for example gdalwarp -dstnodata -9999 -ot Float32 IN.tif OUT.tif.',
    });
}

const otherType = (found: string, expected: string, remedy?: string): RasterError =>
  new RasterError('raster-type', {
    found,
    expected,
    remedy:
      remedy ?? 'Write it again, for example gdal_translate -ot Float32 -co COMPRESS=DEFLATE IN.tif OUT.tif.',
  });

const dataTypes: Readonly<Record<string, RasterDataType>> = {
  '1/8': 'uint8',
  '2/8': 'int8',
  '1/16': 'uint16',
  '2/16': 'int16',
  '1/32': 'uint32',
  '2/32': 'int32',
  '3/32': 'float32',
  '3/64': 'float64',
};
const formatNames = ['', 'unsigned', 'signed', 'floating-point', 'untyped', 'complex', 'complex'];

async function readCellType(
  directory: TiffDirectory,
  bands: number,
): Promise<{ dataType: RasterDataType; bytesPerCell: number }> {
  const allBits = (await fieldNumbers(directory, tags.bits, bands)) ?? [1];
  const formats = (await fieldNumbers(directory, tags.sampleFormat, bands)) ?? [1];
  const [[bits], [format]] = [allBits, formats];
  if (allBits.some((b) => b !== bits) || formats.some((f) => f !== format))
    throw otherType('bands of different number types', 'bands of one number type');
  const dataType = dataTypes[`${format}/${bits}`];
  if (!dataType)
    throw otherType(
      `${formatNames[format] ?? 'unknown'} numbers of ${bits} bits`,
      'whole numbers of 8, 16 or 32 bits or floating-point numbers of 32 or 64 bits',
    );
  return { dataType, bytesPerCell: bits / 8 };
}

/** The first extra sample that is alpha (TIFF 6.0, section 18): associated (1) or not (2). */
async function readAlphaBand(directory: TiffDirectory, bands: number): Promise<number | null> {
  const extra = (await fieldNumbers(directory, tags.extraSamples, bands)) ?? [];
  const first = extra.findIndex((kind) => kind === 1 || kind === 2);
  return first < 0 || extra.length >= bands ? null : bands - extra.length + first + 1;
}

const refusedCompressions: Readonly<Record<number, string>> = {
  6: 'JPEG',
  7: 'JPEG',
  34925: 'LZMA',
  50001: 'WebP',
  50002: 'JPEG XL',
};

function readCompression(code: number): Compression {
  const known = Object.values(compressions).find((c) => c === code);
  if (known === undefined)
    throw otherType(
      refusedCompressions[code] ? `${refusedCompressions[code]} compression` : `compression number ${code}`,
      'no compression, DEFLATE, LZW, ZSTD, LERC or PackBits',
      'Write it again with gdal_translate -co COMPRESS=DEFLATE IN.tif OUT.tif.',
    );
  return known;
}

/** The LercParameters tag holds the version and the additional compression (libtiff, tif_lerc.c; from memory). */
function readLercPacking([, packing = 0]: readonly number[] = []): LercPacking {
  const packings = [compressions.none, compressions.deflate, compressions.zstd] as const;
  if (!(packing in packings)) throw damaged(`a LERC packing number ${packing}, which does not exist`);
  return packings[packing];
}

/** LZW, DEFLATE and ZSTD alone take a predictor; elsewhere the tag means nothing (TIFF 6.0, section 14). */
function readPredictor(
  compression: Compression,
  predictor: number,
  { dataType }: { dataType: RasterDataType },
): 1 | 2 | 3 {
  const takes: readonly number[] = [
    compressions.lzw,
    compressions.deflate,
    compressions.oldDeflate,
    compressions.zstd,
  ];
  if (!takes.includes(compression)) return 1;
  const floating = dataType.startsWith('float');
  if (predictor === 1 || predictor === 2 || (predictor === 3 && floating)) return predictor;
  throw otherType(
    `predictor ${predictor} on ${dataType} numbers`,
    'predictor 1 or 2, or 3 on floating-point numbers',
  );
}

async function blockNumbers(directory: TiffDirectory, tag: number, blocks: number): Promise<number[]> {
  const numbers = await fieldNumbers(directory, tag, mostBlocks);
  if (!numbers || numbers.length < blocks)
    throw damaged(`places for ${numbers?.length ?? 0} of ${blocks} strips or tiles`);
  return numbers;
}

function checkBlocks(offsets: readonly number[], byteCounts: readonly number[], size: number): void {
  for (let i = 0; i < Math.min(offsets.length, byteCounts.length); i++) {
    if (offsets[i] === 0 && byteCounts[i] === 0) continue;
    if (!(offsets[i] > 0 && byteCounts[i] > 0 && offsets[i] + byteCounts[i] <= size))
      throw damaged(
        `strip or tile ${i + 1} of ${offsets.length} at byte ${offsets[i]}, ${byteCounts[i]} long, in a file of ${size} bytes`,
      );
  }
}
