/** One field of an image directory (TIFF 6.0, section 2). */
export type TiffField =
  | { readonly tag: number; readonly type: 'short' | 'long' | 'double'; readonly values: readonly number[] }
  | { readonly tag: number; readonly type: 'ascii'; readonly text: string };

const types = {
  ascii: { code: 2, size: 1 },
  short: { code: 3, size: 2 },
  long: { code: 4, size: 4 },
  double: { code: 12, size: 8 },
} as const;
const headerLength = 8;
const entryLength = 12;
const longestFile = 0xffffffff;

/**
 * Lays out a classic little-endian TIFF of one image: header, directory, field values, then the blocks in their order.
 * @param blockTags the tags that say where the blocks stand and how long they are; added to `fields`
 * @throws RangeError when the file would pass the 4 GB that classic TIFF can address
 */
export function layOutTiff(
  fields: readonly TiffField[],
  blocks: readonly Uint8Array[],
  blockTags: { readonly offsets: number; readonly byteCounts: number },
): Uint8Array {
  const places: number[] = blocks.map(() => 0);
  const all: TiffField[] = [
    ...fields,
    { tag: blockTags.offsets, type: 'long' as const, values: places },
    { tag: blockTags.byteCounts, type: 'long' as const, values: blocks.map((b) => b.length) },
  ].sort((a, b) => a.tag - b.tag);
  const encoded = all.map((field) =>
    field.type === 'ascii' ? new TextEncoder().encode(`${field.text}\0`) : undefined,
  );
  const counts = all.map(
    (field, i) => encoded[i]?.length ?? (field.type === 'ascii' ? 0 : field.values.length),
  );

  const outside: number[] = [];
  let end = headerLength + 2 + all.length * entryLength + 4;
  all.forEach((field, i) => {
    const length = counts[i] * types[field.type].size;
    outside.push(length > 4 ? end : 0);
    // Values stand on even bytes (TIFF 6.0, section 2).
    if (length > 4) end += length + (length & 1);
  });
  blocks.forEach((block, i) => {
    places[i] = end;
    end += block.length;
  });
  if (end > longestFile)
    throw new RangeError(`A TIFF of ${end} bytes would pass the 4 GB of the classic format.`);

  const file = new Uint8Array(end);
  const view = new DataView(file.buffer);
  view.setUint16(0, 0x4949);
  view.setUint16(2, 42, true);
  view.setUint32(4, headerLength, true);
  view.setUint16(headerLength, all.length, true);
  all.forEach((field, i) => {
    const entry = headerLength + 2 + i * entryLength;
    view.setUint16(entry, field.tag, true);
    view.setUint16(entry + 2, types[field.type].code, true);
    view.setUint32(entry + 4, counts[i], true);
    if (outside[i]) view.setUint32(entry + 8, outside[i], true);
    writeValues(view, outside[i] || entry + 8, field, encoded[i]);
  });
  blocks.forEach((block, i) => file.set(block, places[i]));
  return file;
}

function writeValues(view: DataView, at: number, field: TiffField, text: Uint8Array | undefined): void {
  if (field.type === 'ascii') {
    new Uint8Array(view.buffer).set(text ?? [], at);
    return;
  }
  const { size } = types[field.type];
  field.values.forEach((value, i) => {
    if (field.type === 'short') view.setUint16(at + i * size, value, true);
    else if (field.type === 'long') view.setUint32(at + i * size, value, true);
    else view.setFloat64(at + i * size, value, true);
  });
}
