import { createReadStream } from 'node:fs';
import { open, readFile } from 'node:fs/promises';
import { Writable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { createInflate } from 'node:zlib';
import {
  damagedCells,
  headerLength,
  readCellHeader,
  type CellHeader,
  type CellLimits,
} from '#rasters/cells/cell-header.ts';
import { checkContextCode } from '#rasters/cells/context-code.ts';

const chunkSize = 256 * 1024;

/**
 * Checks a file of cell values to its last byte, checksum included, and says what it holds. A zlib stream is inflated
 * piece by piece in Node's own threads, so that neither memory nor other requests feel its size; no more comes out than the
 * header says. A coded map, a tenth of its cells in size, is read but not decoded: whatever it holds fills its cells.
 * @throws CellValuesError saying what was found and what was expected
 */
export async function checkCellsFile(path: string, limits: CellLimits): Promise<CellHeader> {
  const { start, size } = await readStart(path);
  const header = readCellHeader(start, limits);
  if (header.packing === 'context') {
    // Before it is read: no sound one is longer.
    if (size - headerLength >= header.byteLength)
      throw damagedCells(`${size} bytes for ${header.byteLength} cells`);
    checkContextCode((await readFile(path)).subarray(headerLength), header.byteLength);
    return header;
  }
  const inflate = createInflate({ chunkSize });
  let length = 0;
  const count = new Writable({
    write(piece: Buffer, _encoding, done) {
      length += piece.length;
      const tooLong = length > header.byteLength;
      done(tooLong ? damagedCells(`more than the ${header.byteLength} bytes that belong there`) : null);
    },
  });
  try {
    await pipeline(createReadStream(path, { start: headerLength, highWaterMark: chunkSize }), inflate, count);
  } catch (error) {
    // Zlib's own errors, of a broken stream and a failed checksum alike, carry codes such as Z_DATA_ERROR.
    const { code } = error as NodeJS.ErrnoException;
    throw code?.startsWith('Z_') ? damagedCells('a broken zlib stream') : error;
  }
  if (length < header.byteLength) throw damagedCells(`${length} bytes where ${header.byteLength} belong`);
  const rest = size - headerLength - inflate.bytesWritten;
  if (rest > 0) throw damagedCells(`${rest} bytes behind the end of the zlib stream`);
  return header;
}

async function readStart(path: string): Promise<{ start: Uint8Array; size: number }> {
  const file = await open(path);
  try {
    const { buffer, bytesRead } = await file.read(new Uint8Array(headerLength), 0, headerLength, 0);
    return { start: buffer.subarray(0, bytesRead), size: (await file.stat()).size };
  } finally {
    await file.close();
  }
}
