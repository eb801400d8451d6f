import { zlibSync } from 'fflate';
import type { CellValues } from '#sim-core/grid/ground.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { differenceFloats } from './difference-floats.ts';
import { layOutTiff, type TiffField } from './tiff-file.ts';

export interface GeoTiffContent {
  readonly grid: Grid;
  /** width × height values, row-major from the north-west */
  readonly values: CellValues;
  /** name of the CRS for the citation key, ASCII; left out otherwise */
  readonly crsName?: string;
  /** value that means no data; NaN for floats whose missing cells are NaN */
  readonly noData?: number;
  /** what the band holds, e.g. `cover 2031` */
  readonly bandName?: string;
  /** unit of the values, e.g. `share` or `year` */
  readonly unit?: string;
  /** what the values are worth, in a sentence, ASCII: the field ImageDescription */
  readonly description?: string;
  /** further facts for the file's metadata, such as where the data comes from */
  readonly facts?: Readonly<Record<string, string>>;
}

export interface GeoTiffOptions {
  /** `strips` (default) for exports that are read whole, `tiles` of 256 × 256 for those that are read in parts */
  readonly blocks?: 'strips' | 'tiles';
}

const tileSize = 256;
const stripBytes = 65_536;
const predictor = { none: 1, floats: 3 } as const;

/**
 * A GeoTIFF 1.1 (OGC 19-008r4) of one DEFLATE-compressed band, north up, PixelIsArea, in a projected CRS in metres.
 * Strips or tiles are compressed one by one, so memory is the compressed file twice at most.
 * @throws RangeError when there is not one value a cell
 */
export function encodeGeoTiff(
  content: GeoTiffContent,
  { blocks = 'strips' }: GeoTiffOptions = {},
): Uint8Array {
  const { grid, values } = content;
  if (values.length !== grid.width * grid.height)
    throw new RangeError(`Found ${values.length} values for ${grid.width} × ${grid.height} cells.`);
  const rowBytes = grid.width * values.BYTES_PER_ELEMENT;
  const tiled = blocks === 'tiles';
  const blockHeight = tiled
    ? tileSize
    : Math.min(grid.height, Math.max(1, Math.floor(stripBytes / rowBytes)));
  const packed = packBlocks(content, tiled ? tileSize : grid.width, blockHeight, tiled);
  const fields: TiffField[] = [
    { tag: 256, type: 'long', values: [grid.width] },
    { tag: 257, type: 'long', values: [grid.height] },
    { tag: 258, type: 'short', values: [8 * values.BYTES_PER_ELEMENT] },
    { tag: 259, type: 'short', values: [8] }, // DEFLATE
    { tag: 262, type: 'short', values: [1] }, // black is zero
    { tag: 277, type: 'short', values: [1] },
    { tag: 317, type: 'short', values: [values instanceof Float32Array ? predictor.floats : predictor.none] },
    ...(tiled
      ? ([
          { tag: 322, type: 'short', values: [tileSize] },
          { tag: 323, type: 'short', values: [tileSize] },
        ] as const)
      : ([{ tag: 278, type: 'long', values: [blockHeight] }] as const)),
    { tag: 284, type: 'short', values: [1] },
    { tag: 339, type: 'short', values: [sampleFormat(values)] },
    ...geoFields(content),
    ...textFields(content),
  ];
  return layOutTiff(
    fields,
    packed,
    tiled ? { offsets: 324, byteCounts: 325 } : { offsets: 273, byteCounts: 279 },
  );
}

const sampleFormat = (values: CellValues): number => {
  if (values instanceof Float32Array || values instanceof Float64Array) return 3;
  return values instanceof Int8Array || values instanceof Int16Array || values instanceof Int32Array ? 2 : 1;
};

function packBlocks(
  { grid: { width, height }, values, noData = 0 }: GeoTiffContent,
  blockWidth: number,
  blockHeight: number,
  tiled: boolean,
): Uint8Array[] {
  const packed: Uint8Array[] = [];
  for (let top = 0; top < height; top += blockHeight)
    for (let left = 0; left < width; left += blockWidth) {
      const rows = Math.min(blockHeight, height - top);
      const columns = Math.min(blockWidth, width - left);
      // A tile at the edge is as large as any other; a last strip holds its own rows alone.
      const block = values.slice(0, 0).constructor as new (length: number) => CellValues;
      const cells = new block(blockWidth * (tiled ? blockHeight : rows));
      if (columns < blockWidth || (tiled && rows < blockHeight)) cells.fill(noData);
      for (let row = 0; row < rows; row++) {
        const start = (top + row) * width + left;
        cells.set(values.subarray(start, start + columns), row * blockWidth);
      }
      const bytes = littleEndianBytes(cells);
      packed.push(
        cells instanceof Float32Array
          ? zlibSync(differenceFloats(bytes, blockWidth), { level: 3 })
          : zlibSync(bytes, { level: 6 }),
      );
    }
  return packed;
}

function littleEndianBytes(cells: CellValues): Uint8Array {
  const bytes = new Uint8Array(cells.buffer, cells.byteOffset, cells.byteLength);
  if (new Uint8Array(Uint16Array.of(1).buffer)[0] === 1 || cells.BYTES_PER_ELEMENT === 1) return bytes;
  for (let start = 0; start < bytes.length; start += cells.BYTES_PER_ELEMENT)
    bytes.subarray(start, start + cells.BYTES_PER_ELEMENT).reverse();
  return bytes;
}

/** GeoTIFF 1.1, section 7: pixel scale, one tie point at the outer north-western corner, and the keys. */
function geoFields({ grid, crsName }: GeoTiffContent): TiffField[] {
  const { cellSize, originX, originY, epsg } = grid;
  // The bar closes a text among the ASCII parameters.
  const citation = crsName && /^[\x20-\x7b\x7d\x7e]+$/.test(crsName) ? `${crsName}|` : undefined;
  const keys: number[][] = [
    [1024, 0, 1, 1], // a projected CRS
    [1025, 0, 1, 1], // PixelIsArea
    ...(citation ? [[1026, 34737, citation.length, 0]] : []),
    [3072, 0, 1, epsg],
    [3076, 0, 1, 9001], // metre
  ];
  return [
    { tag: 33550, type: 'double', values: [cellSize, cellSize, 0] },
    { tag: 33922, type: 'double', values: [0, 0, 0, originX, originY, 0] },
    { tag: 34735, type: 'short', values: [1, 1, 1, keys.length, ...keys.flat()] },
    ...(citation ? [{ tag: 34737, type: 'ascii', text: citation } as const] : []),
  ];
}

/** The description, and GDAL's own tags: 42112 metadata as XML, 42113 the no-data value as text. */
function textFields({ noData, bandName, unit, description, facts = {} }: GeoTiffContent): TiffField[] {
  const items = [
    ...Object.entries(facts).map(
      ([name, value]) => `<Item name="${escapeXml(name)}">${escapeTwice(value)}</Item>`,
    ),
    ...(bandName
      ? [`<Item name="DESCRIPTION" sample="0" role="description">${escapeTwice(bandName)}</Item>`]
      : []),
    ...(unit ? [`<Item name="UNITTYPE" sample="0" role="unittype">${escapeTwice(unit)}</Item>`] : []),
  ];
  const noDataText = noData === undefined ? undefined : Number.isNaN(noData) ? 'nan' : String(noData);
  return [
    ...(description ? [{ tag: 270, type: 'ascii', text: description } as const] : []),
    ...(items.length > 0
      ? [{ tag: 42112, type: 'ascii', text: `<GDALMetadata>${items.join('')}</GDALMetadata>` } as const]
      : []),
    ...(noDataText !== undefined ? [{ tag: 42113, type: 'ascii', text: noDataText } as const] : []),
  ];
}

const escapeXml = (text: string): string =>
  text.replace(/[<>&"]/g, (c) => ({ '<': '&lt;', '>': '&gt;', '&': '&amp;', '"': '&quot;' })[c] ?? c);

/** GDAL escapes values once more before they go into the XML, and undoes both. */
const escapeTwice = (text: string): string => escapeXml(escapeXml(text));
