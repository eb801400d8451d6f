import { Readable } from 'node:stream';
import { Zip, ZipPassThrough } from 'fflate';

/** One file of an archive. */
export interface ZipPart {
  /** with / between folders */
  readonly path: string;
  readonly bytes: number;
  /** its bytes, piece by piece; asked for when its turn comes */
  readonly open: () => Iterable<Uint8Array> | Promise<Readable>;
}

/** What the sizes and places of a plain archive (without Zip64) can count. */
const largest = 0xffff_ffff;

/** The parts are more than one archive holds. */
export class ZipTooLarge extends Error {
  override name = 'ZipTooLarge';
}

/**
 * A ZIP archive of the parts, in their order, written as it is read: one piece of one part is in memory at a time. Parts
 * are stored, not packed: the rasters that leave the product are packed already.
 *
 * @param time that every part is dated with, so that the same parts make the same archive; years 1980 to 2099
 * @throws ZipTooLarge when all parts together reach 4 GB
 */
export function zipStream(parts: readonly ZipPart[], time: Date): Readable {
  const bytes = parts.reduce((sum, part) => sum + part.bytes + 2 * part.path.length + 200, 0);
  if (bytes > largest) throw new ZipTooLarge(`${bytes} bytes; at most ${largest} fit`);
  return Readable.from(pieces(parts, time), { objectMode: false });
}

async function* pieces(parts: readonly ZipPart[], time: Date): AsyncGenerator<Uint8Array> {
  let ready: Uint8Array[] = [];
  const taken = () => {
    const now = ready;
    ready = [];
    return now;
  };
  const zip = new Zip((error, piece) => {
    if (error) throw error;
    ready.push(piece);
  });
  for (const part of parts) {
    const file = new ZipPassThrough(part.path);
    file.mtime = time;
    zip.add(file);
    for await (const piece of await part.open()) {
      file.push(piece as Uint8Array);
      yield* taken();
    }
    file.push(new Uint8Array(), true);
    yield* taken();
  }
  zip.end();
  yield* taken();
}
