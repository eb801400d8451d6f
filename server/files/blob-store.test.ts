import { createHash } from 'node:crypto';
import { mkdtemp, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { PassThrough, Readable } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { BlobMissing, FileTooLarge, openBlobStore, type BlobStore } from './blob-store.ts';

let dataDir: string;
let blobs: BlobStore;
const arrivals = () => readdir(join(dataDir, 'incoming'));
const sha256 = (text: string) => createHash('sha256').update(text).digest('hex');

beforeEach(async () => {
  dataDir = await mkdtemp(join(tmpdir(), 'foothold-blobs-'));
  blobs = await openBlobStore(dataDir);
});
afterEach(() => rm(dataDir, { recursive: true, force: true }));

test('what is kept comes back by the SHA-256 of its bytes', async () => {
  const file = await blobs.receive(Readable.from([Buffer.from('tide '), Buffer.from('table')]), 100);
  expect(file).toMatchObject({ hash: sha256('tide table'), bytes: 10 });
  await blobs.keep(file);

  expect((await blobs.read(file.hash)).toString()).toBe('tide table');
  const { stream, bytes } = await blobs.open(file.hash);
  expect(bytes).toBe(10);
  expect((await buffer(stream)).toString()).toBe('tide table');
  expect(await arrivals()).toEqual([]);
});

test('the same content is stored once, and its second arrival is removed', async () => {
  for (let i = 0; i < 2; i++)
    await blobs.keep(await blobs.receive(Readable.from([Buffer.from('twice')]), 100));
  expect(await blobs.hashes()).toEqual([sha256('twice')]);
  expect(await arrivals()).toEqual([]);
});

test('a source beyond the limit is broken off and leaves nothing', async () => {
  const chunks = Array.from({ length: 50 }, () => Buffer.alloc(1000));
  await expect(blobs.receive(Readable.from(chunks), 10_000)).rejects.toBeInstanceOf(FileTooLarge);
  expect(await arrivals()).toEqual([]);
});

test('a source that breaks off leaves nothing', async () => {
  const source = new PassThrough();
  const received = blobs.receive(source, 1e6);
  source.write(Buffer.alloc(5000));
  setImmediate(() => source.destroy(new Error('the line is dead')));
  await expect(received).rejects.toThrow('the line is dead');
  expect(await arrivals()).toEqual([]);
});

test('an arrival can be discarded, and so can one that is already gone', async () => {
  const file = await blobs.receive(Readable.from([Buffer.from('x')]), 10);
  await blobs.discard(file);
  await blobs.discard(file);
  expect(await arrivals()).toEqual([]);
  expect(await blobs.hashes()).toEqual([]);
});

test('arrivals that an earlier process left behind are cleared at the start, blobs are not', async () => {
  await blobs.keep(await blobs.receive(Readable.from([Buffer.from('kept')]), 10));
  await writeFile(join(dataDir, 'incoming', 'left-over'), 'half an upload');
  blobs = await openBlobStore(dataDir);
  expect(await arrivals()).toEqual([]);
  expect(await blobs.hashes()).toEqual([sha256('kept')]);
});

test('deleting frees the blob; reading it then says that it is missing', async () => {
  const file = await blobs.receive(Readable.from([Buffer.from('gone')]), 10);
  await blobs.keep(file);
  await blobs.delete(file.hash);
  await expect(blobs.read(file.hash)).rejects.toBeInstanceOf(BlobMissing);
  await expect(blobs.open(file.hash)).rejects.toBeInstanceOf(BlobMissing);
});

test('only a SHA-256 can name a blob: no path gets through', async () => {
  await writeFile(join(dataDir, 'secret'), 'secret');
  for (const name of ['../../secret', '..%2fsecret', 'a'.repeat(63), `${'a'.repeat(62)}/x`])
    await expect(blobs.read(name)).rejects.toBeInstanceOf(BlobMissing);
});
