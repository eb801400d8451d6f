/** Shape of a decoded block: rows of cells, each of one or several samples of 1, 2, 4 or 8 bytes. */
export interface BlockShape {
  readonly width: number;
  /** values of a cell, one beside the other */
  readonly samples: number;
  readonly rows: number;
  readonly bytesPerCell: number;
  readonly littleEndian: boolean;
}

const hostIsLittleEndian = new Uint8Array(Uint16Array.of(1).buffer)[0] === 1;

/** Puts the bytes of each cell into this machine's order, in place. */
export function toHostOrder(bytes: Uint8Array, bytesPerCell: number, littleEndian: boolean): void {
  if (bytesPerCell === 1 || littleEndian === hostIsLittleEndian) return;
  for (let start = 0; start < bytes.length; start += bytesPerCell)
    for (let i = start, j = start + bytesPerCell - 1; i < j; i++, j--) {
      const byte = bytes[i];
      bytes[i] = bytes[j];
      bytes[j] = byte;
    }
}

/**
 * Undoes horizontal differencing (TIFF 6.0, section 14) in place: each value was stored as its difference to that of
 * the cell on its left, in whole-number arithmetic of the cell's width. Expects and leaves cells in host order.
 */
export function undoDifferences(
  bytes: Uint8Array<ArrayBuffer>,
  { width, samples, rows, bytesPerCell }: BlockShape,
): void {
  const across = width * samples;
  if (bytesPerCell === 8) {
    const cells = new BigUint64Array(bytes.buffer, bytes.byteOffset, across * rows);
    for (let row = 0; row < rows; row++)
      for (let i = row * across + samples; i < (row + 1) * across; i++) cells[i] += cells[i - samples];
    return;
  }
  const type = bytesPerCell === 1 ? Uint8Array : bytesPerCell === 2 ? Uint16Array : Uint32Array;
  const cells = new type(bytes.buffer, bytes.byteOffset, across * rows);
  for (let row = 0; row < rows; row++)
    for (let i = row * across + samples; i < (row + 1) * across; i++) cells[i] += cells[i - samples];
}

/**
 * Undoes floating-point differencing (Adobe Photoshop TIFF Technical Note 3): each row holds its most significant
 * bytes first, then the next ones and so on, differenced byte by byte, in both byte orders alike. Gives host order.
 */
export function undoFloatDifferences(
  bytes: Uint8Array,
  { width, samples, rows, bytesPerCell }: BlockShape,
): void {
  const across = width * samples;
  const rowBytes = across * bytesPerCell;
  const planes = new Uint8Array(rowBytes);
  for (let start = 0; start < rows * rowBytes; start += rowBytes) {
    for (let i = 0; i < rowBytes; i++) planes[i] = bytes[start + i] + (i < samples ? 0 : planes[i - samples]);
    for (let plane = 0; plane < bytesPerCell; plane++) {
      const place = hostIsLittleEndian ? bytesPerCell - 1 - plane : plane;
      for (let i = 0; i < across; i++) bytes[start + i * bytesPerCell + place] = planes[plane * across + i];
    }
  }
}
