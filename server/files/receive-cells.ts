import type { Readable } from 'node:stream';
import { CellValuesError } from '#rasters/cells/cell-header.ts';
import { ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { FileTooLarge, type ReceivedFile } from './blob-store.ts';
import { checkCellsFile } from './check-cells.ts';

/** What a map must be. */
export interface ExpectedCells {
  readonly width: number;
  readonly height: number;
  readonly type: typeof Uint8Array | typeof Int16Array;
  /** what it is called in a refusal */
  readonly what: string;
}

/**
 * Takes in cell values that a client sends and checks them to the last byte; the file then waits for `storeWithRows`.
 * @throws ProblemError `too-large`, or `invalid-request` for anything but the right binary; nothing is left of it then
 */
export async function receiveCells(
  services: Pick<Services, 'blobs'>,
  expected: ExpectedCells,
  body: Readable,
): Promise<ReceivedFile> {
  const file = await receive(services, expected, body);
  try {
    await check(file, expected);
    return file;
  } catch (error) {
    await services.blobs.discard(file);
    throw error;
  }
}

/** A zlib stream of what cannot be packed is a little longer than what it holds (RFC 1951: 5 bytes a stored block). */
const longestBinary = ({ width, height, type }: ExpectedCells) =>
  Math.ceil(width * height * type.BYTES_PER_ELEMENT * 1.01) + 4096;

async function receive(
  { blobs }: Pick<Services, 'blobs'>,
  expected: ExpectedCells,
  body: Readable,
): Promise<ReceivedFile> {
  const limit = longestBinary(expected);
  try {
    return await blobs.receive(body, limit);
  } catch (error) {
    if (error instanceof FileTooLarge)
      throw new ProblemError(
        'too-large',
        `Found more than ${limit} bytes; a ${expected.what} of ${expected.width} × ${expected.height} cells is shorter.`,
      );
    throw error;
  }
}

async function check(file: ReceivedFile, expected: ExpectedCells): Promise<void> {
  const { width, height, type } = await headerOf(file, expected);
  if (width !== expected.width || height !== expected.height || type !== expected.type)
    throw new ProblemError(
      'invalid-request',
      `Found ${type.name} of ${width} × ${height} cells; expected ${expected.type.name} of ${expected.width} × ${expected.height}, the grid of the run.`,
    );
}

async function headerOf(file: ReceivedFile, { width, height }: ExpectedCells) {
  try {
    return await checkCellsFile(file.path, { cells: width * height });
  } catch (error) {
    if (error instanceof CellValuesError) throw new ProblemError('invalid-request', error.message);
    throw error;
  }
}
