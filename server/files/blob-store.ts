import { createHash, randomUUID, type Hash } from 'node:crypto';
import { createReadStream, createWriteStream } from 'node:fs';
import { mkdir, open, readdir, readFile, rename, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { Transform, type Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';

/** A file that has arrived but belongs to nothing yet: it is kept or discarded by whoever asked for it. */
export interface ReceivedFile {
  readonly path: string;
  /** SHA-256 of its bytes, hexadecimal */
  readonly hash: string;
  readonly bytes: number;
}

/**
 * Files addressed by the SHA-256 of their bytes, below the data folder. No part of a path ever comes from a client.
 * What nothing refers to any more is deleted by `server/files/blob-references.ts`, which knows every reference.
 */
export interface BlobStore {
  /**
   * Streams a source into the folder of arrivals while hashing it. On any failure, a broken connection included, nothing
   * is left behind.
   * @throws FileTooLarge as soon as more than `limit` bytes have come
   */
  receive(source: Readable, limit: number): Promise<ReceivedFile>;
  /** A fresh path among the arrivals, for a worker that writes the file itself. */
  reserve(): string;
  /** Moves an arrival into the store; content that is already there is not written twice. */
  keep(file: ReceivedFile): Promise<void>;
  /** Removes an arrival that was not kept; harmless when it was. */
  discard(file: { readonly path: string }): Promise<void>;
  /** Where a blob stands, for a worker that reads it itself. */
  locate(hash: string): string;
  /** Bytes of a blob. @throws BlobMissing */
  size(hash: string): Promise<number>;
  /** @throws BlobMissing */
  open(hash: string): Promise<{ stream: Readable; bytes: number }>;
  /** @throws BlobMissing */
  read(hash: string): Promise<Buffer>;
  delete(hash: string): Promise<void>;
  /** Every hash that is stored. */
  hashes(): Promise<string[]>;
}

/** More bytes came than were allowed. */
export class FileTooLarge extends Error {
  override name = 'FileTooLarge';
  readonly limit: number;
  constructor(limit: number) {
    super(`More than ${limit} bytes`);
    this.limit = limit;
  }
}

/** A row refers to a blob that is not there: the data folder was damaged or restored in part. */
export class BlobMissing extends Error {
  override name = 'BlobMissing';
}

const hashPattern = /^[0-9a-f]{64}$/;

/** Opens the store below `dataDir`, making its folders and clearing arrivals that an earlier process left behind. */
export async function openBlobStore(dataDir: string): Promise<BlobStore> {
  const arrivals = join(dataDir, 'incoming');
  const blobs = join(dataDir, 'blobs');
  await rm(arrivals, { recursive: true, force: true });
  await mkdir(arrivals, { recursive: true });
  await mkdir(blobs, { recursive: true });

  const folderOf = (hash: string) => join(blobs, hash.slice(0, 2));
  const pathOf = (hash: string) => {
    if (!hashPattern.test(hash)) throw new BlobMissing(`Not a SHA-256: ${hash.slice(0, 80)}`);
    return join(folderOf(hash), hash);
  };
  const missing = (hash: string) => (error: unknown) => {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') throw new BlobMissing(`No blob ${hash}`);
    throw error;
  };
  const size = async (hash: string) => (await stat(pathOf(hash)).catch(missing(hash))).size;
  const reserve = () => join(arrivals, randomUUID());

  return {
    reserve,
    async receive(source, limit) {
      const path = reserve();
      const hash = createHash('sha256');
      const meter = measuring(hash, limit);
      try {
        await pipeline(source, meter.stream, createWriteStream(path, { flags: 'wx' }));
      } catch (error) {
        await rm(path, { force: true });
        throw error;
      }
      return { path, hash: hash.digest('hex'), bytes: meter.bytes() };
    },
    async keep(file) {
      const target = pathOf(file.hash);
      if (await exists(target)) return void (await rm(file.path, { force: true }));
      await flush(file.path, 'r+');
      await mkdir(folderOf(file.hash), { recursive: true });
      await rename(file.path, target);
      await flush(folderOf(file.hash), 'r');
    },
    discard: (file) => rm(file.path, { force: true }),
    locate: pathOf,
    size,
    open: async (hash) => ({ bytes: await size(hash), stream: createReadStream(pathOf(hash)) }),
    read: async (hash) => readFile(pathOf(hash)).catch(missing(hash)),
    delete: (hash) => rm(pathOf(hash), { force: true }),
    async hashes() {
      const entries = await readdir(blobs, { recursive: true, withFileTypes: true });
      return entries.filter((e) => e.isFile() && hashPattern.test(e.name)).map((e) => e.name);
    },
  };
}

/** Hashes and counts what flows through, and breaks off beyond the limit. */
function measuring(hash: Hash, limit: number): { stream: Transform; bytes: () => number } {
  let bytes = 0;
  const stream = new Transform({
    transform(chunk: Buffer, _encoding, done) {
      bytes += chunk.length;
      if (bytes > limit) return done(new FileTooLarge(limit));
      hash.update(chunk);
      done(null, chunk);
    },
  });
  return { stream, bytes: () => bytes };
}

const exists = (path: string) =>
  stat(path).then(
    () => true,
    () => false,
  );

/** A row must never refer to bytes that a power cut can still take away. */
async function flush(path: string, flags: string): Promise<void> {
  const handle = await open(path, flags);
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}
