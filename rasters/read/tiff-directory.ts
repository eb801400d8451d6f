import { damaged, RasterError } from './raster-error.ts';
import { readBytes, type RasterSource } from './raster-source.ts';

/** Bytes of one value of each TIFF field type (TIFF 6.0, section 2; 13 to 18 from the BigTIFF addition). */
const typeSizes: Readonly<Record<number, number>> = {
  1: 1,
  2: 1,
  3: 2,
  4: 4,
  5: 8,
  6: 1,
  7: 1,
  8: 2,
  9: 4,
  10: 8,
  11: 4,
  12: 8,
  13: 4,
  16: 8,
  17: 8,
  18: 8,
};
const mostEntries = 4096;
const mostDirectories = 128;

interface Field {
  readonly type: number;
  readonly count: number;
  /** where the values stand in the file */
  readonly offset: number;
}

/** The first image directory of a TIFF, with its fields unread, and what later directories hold. */
export interface TiffDirectory {
  readonly source: RasterSource;
  readonly littleEndian: boolean;
  /** BigTIFF: offsets of 64 bits */
  readonly big: boolean;
  readonly fields: ReadonlyMap<number, Field>;
  /** NewSubfileType of each later directory: bit 0 a reduced copy, bit 2 a mask, 0 a picture of its own */
  readonly laterKinds: readonly number[];
}

const newSubfileType = 254;

/**
 * Walks the header and the image directories of a classic or big TIFF without reading any field's values.
 * @throws RasterError `not-a-geotiff` or `raster-truncated`
 */
export async function readTiffDirectory(source: RasterSource): Promise<TiffDirectory> {
  const head = await source.read(0, Math.min(16, source.size));
  const order = head.length < 8 ? '' : String.fromCharCode(head[0], head[1]);
  const littleEndian = order === 'II';
  const view = new DataView(head.buffer, head.byteOffset, head.byteLength);
  const version = littleEndian || order === 'MM' ? view.getUint16(2, littleEndian) : 0;
  const big = version === 43;
  if (version !== 42 && !big) throw notATiff(head, source.size);
  if (big && (head.length < 16 || view.getUint16(4, littleEndian) !== 8))
    throw damaged('a BigTIFF header that is not whole');

  const walk = { source, littleEndian, big };
  const first = await readDirectory(
    walk,
    big ? readOffset(view, 8, littleEndian) : view.getUint32(4, littleEndian),
  );
  const laterKinds: number[] = [];
  const seen = new Set<number>();
  for (let next = first.next; next !== 0 && laterKinds.length < mostDirectories;) {
    if (seen.has(next)) throw damaged('image directories that point at each other');
    seen.add(next);
    const directory = await readDirectory(walk, next);
    laterKinds.push(
      (await fieldNumbers({ ...walk, ...directory, laterKinds: [] }, newSubfileType, 1))?.[0] ?? 0,
    );
    next = directory.next;
  }
  return { ...walk, fields: first.fields, laterKinds };
}

async function readDirectory(
  { source, littleEndian, big }: { source: RasterSource; littleEndian: boolean; big: boolean },
  offset: number,
): Promise<{ fields: Map<number, Field>; next: number }> {
  const countSize = big ? 8 : 2;
  const entrySize = big ? 20 : 12;
  const nextSize = big ? 8 : 4;
  const head = await readBytes(source, offset, countSize, 'the image directory');
  const headView = new DataView(head.buffer, head.byteOffset, head.byteLength);
  const entries = big ? readOffset(headView, 0, littleEndian) : headView.getUint16(0, littleEndian);
  if (entries === 0 || entries > mostEntries) throw damaged(`an image directory of ${entries} entries`);
  const start = offset + countSize;
  const body = await readBytes(source, start, entries * entrySize + nextSize, 'the image directory');
  const view = new DataView(body.buffer, body.byteOffset, body.byteLength);
  const fields = new Map<number, Field>();
  for (let at = 0; at < entries * entrySize; at += entrySize) {
    const tag = view.getUint16(at, littleEndian);
    const type = view.getUint16(at + 2, littleEndian);
    const count = big ? readOffset(view, at + 4, littleEndian) : view.getUint32(at + 4, littleEndian);
    const size = (typeSizes[type] ?? 0) * count;
    const valueAt = at + (big ? 12 : 8);
    const inline = size <= (big ? 8 : 4);
    const target = big ? readOffset(view, valueAt, littleEndian) : view.getUint32(valueAt, littleEndian);
    if (!fields.has(tag)) fields.set(tag, { type, count, offset: inline ? start + valueAt : target });
  }
  const nextAt = entries * entrySize;
  return {
    fields,
    next: big ? readOffset(view, nextAt, littleEndian) : view.getUint32(nextAt, littleEndian),
  };
}

/**
 * The numbers of a field, or undefined when the file has no such field or it holds no numbers.
 * @param most the largest count that makes sense; more is damage, so that nothing huge is read
 * @throws RasterError `raster-truncated`
 */
export async function fieldNumbers(
  { source, littleEndian, fields }: TiffDirectory,
  tag: number,
  most: number,
): Promise<number[] | undefined> {
  const field = fields.get(tag);
  const size = typeSizes[field?.type ?? 0];
  if (!field || !size || field.count === 0) return undefined;
  if (field.count > most) throw damaged(`${field.count} values in tag ${tag}, which takes ${most} at most`);
  const bytes = await readBytes(source, field.offset, field.count * size, `tag ${tag}`);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const read = numberReader(field.type);
  if (!read) return undefined;
  return Array.from({ length: field.count }, (_, i) => read(view, i * size, littleEndian));
}

/** The text of an ASCII field up to its closing zero, or undefined. @throws RasterError `raster-truncated` */
export async function fieldText(
  directory: TiffDirectory,
  tag: number,
  most: number,
): Promise<string | undefined> {
  if (directory.fields.get(tag)?.type !== 2) return undefined;
  const codes = await fieldNumbers(directory, tag, most);
  return codes && new TextDecoder().decode(Uint8Array.from(codes)).replace(/\0[^]*$/, '');
}

type NumberReader = (view: DataView, at: number, littleEndian: boolean) => number;
function numberReader(type: number): NumberReader | undefined {
  switch (type) {
    case 1:
    case 2:
    case 7:
      return (v, at) => v.getUint8(at);
    case 3:
      return (v, at, le) => v.getUint16(at, le);
    case 4:
    case 13:
      return (v, at, le) => v.getUint32(at, le);
    case 9:
      return (v, at, le) => v.getInt32(at, le);
    case 11:
      return (v, at, le) => v.getFloat32(at, le);
    case 12:
      return (v, at, le) => v.getFloat64(at, le);
    case 16:
    case 18:
      return readOffset;
    default:
      return undefined;
  }
}

/** A 64-bit offset or count; past 2⁵³ it is Infinity, which lies outside every file. */
function readOffset(view: DataView, at: number, littleEndian: boolean): number {
  const value = Number(view.getBigUint64(at, littleEndian));
  return Number.isSafeInteger(value) ? value : Infinity;
}

const otherFiles: readonly (readonly [start: string, name: string])[] = [
  ['\x89PNG', 'a PNG picture'],
  ['\xff\xd8\xff', 'a JPEG picture'],
  ['PK\x03\x04', 'a ZIP archive'],
  ['%PDF', 'a PDF'],
  ['GIF8', 'a GIF picture'],
  ['\x89HDF', 'an HDF5 file'],
  ['CDF', 'a netCDF file'],
  ['\0\0\0\x0cjP', 'a JPEG 2000 picture'],
];

function notATiff(head: Uint8Array, size: number): RasterError {
  const start = String.fromCharCode(...head);
  const name = otherFiles.find(([magic]) => start.startsWith(magic))?.[1];
  return new RasterError('not-a-geotiff', {
    found: name ?? (size === 0 ? 'an empty file' : 'a file that is no TIFF'),
    expected: 'a GeoTIFF',
    remedy: 'Export the raster as GeoTIFF, for example with gdal_translate -of GTiff IN OUT.tif.',
  });
}
