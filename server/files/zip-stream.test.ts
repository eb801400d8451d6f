import { Readable } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { unzipSync } from 'fflate';
import { expect, it } from 'vitest';
import { ZipTooLarge, zipStream, type ZipPart } from './zip-stream.ts';

const time = new Date('2026-12-01T08:00:00Z');
const text = (path: string, content: string): ZipPart => ({
  path,
  bytes: content.length,
  open: () => [Buffer.from(content)],
});

it('holds every part under its path, whether it comes whole or in pieces', async () => {
  const pieces = Array.from({ length: 50 }, (_, i) => Buffer.alloc(70_000, i));
  const parts: ZipPart[] = [
    text('spec.json', '{}'),
    { path: 'rasters/é.tif', bytes: 50 * 70_000, open: () => Promise.resolve(Readable.from(pieces)) },
    text('empty.txt', ''),
  ];
  const archive = await buffer(zipStream(parts, time));
  const found = unzipSync(archive);
  expect(Object.keys(found)).toEqual(['spec.json', 'rasters/é.tif', 'empty.txt']);
  expect(Buffer.from(found['rasters/é.tif']).equals(Buffer.concat(pieces))).toBe(true);
  expect(Buffer.from(found['spec.json']).toString()).toBe('{}');
  expect((await buffer(zipStream(parts, time))).equals(archive)).toBe(true);
});

it('asks for a part when its turn comes, reads no further than is taken, and closes it when nobody listens', async () => {
  let given = 0;
  const source = new Readable({
    read() {
      this.push(given++ < 1000 ? Buffer.alloc(65_536) : null);
    },
  });
  const asked: string[] = [];
  const part = (path: string): ZipPart => ({
    path,
    bytes: 65_536_000,
    open: () => (asked.push(path), Promise.resolve(source)),
  });
  const archive = zipStream([part('a'), part('b')], time);
  for await (const piece of archive) if ((piece as Buffer).length > 1000) break;
  expect(asked).toEqual(['a']);
  expect(given).toBeLessThan(20);
  await expect.poll(() => source.destroyed).toBe(true);
});

it('fails where a part cannot be read, and refuses what one archive cannot hold', async () => {
  const broken = { path: 'a', bytes: 1, open: () => Promise.reject(new Error('no such blob')) };
  await expect(buffer(zipStream([broken], time))).rejects.toThrow('no such blob');
  const huge = { ...text('a', ''), bytes: 2 ** 31 };
  expect(() => zipStream([huge, huge], time)).toThrow(ZipTooLarge);
});
