import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { deflateSync } from 'node:zlib';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { CellValuesError, encodeCellValues } from '#rasters/cells/cell-values.ts';
import { checkCellsFile } from './check-cells.ts';

let folder: string;
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'check-cells-'));
});
afterAll(() => rm(folder, { recursive: true }));

const check = async (bytes: Uint8Array, cells = 1_000_000) => {
  const path = join(folder, 'cells');
  await writeFile(path, bytes);
  return checkCellsFile(path, { cells });
};
const noise = Int16Array.from({ length: 600 * 700 }, (_, i) => (i * i * 31) >> 3);
const good = Buffer.from(encodeCellValues({ width: 600, height: 700, values: noise }));
const withBody = (body: Uint8Array) => Buffer.concat([good.subarray(0, 16), body]);

describe('checkCellsFile', () => {
  it('says what a sound file holds', async () => {
    expect(await check(good)).toMatchObject({ width: 600, height: 700, type: Int16Array });
  });

  it.each<[string, Buffer, RegExp]>([
    ['nothing', Buffer.alloc(0), /no cell values/],
    ['a header alone', good.subarray(0, 16), /damaged/],
    ['a cut', good.subarray(0, good.length - 3), /damaged/],
    ['no zlib', withBody(Buffer.from('a picture of a marsh')), /damaged: found a broken zlib stream/],
    ['too few bytes', withBody(deflateSync(Buffer.alloc(839_999))), /found 839999 bytes where 840000 belong/],
    ['too many bytes', withBody(deflateSync(Buffer.alloc(50_000_000))), /more than the 840000 bytes/],
    ['something behind its end', Buffer.concat([good, Buffer.alloc(7)]), /7 bytes behind the end/],
  ])('refuses %s', async (_, bytes, message) => {
    await expect(check(bytes)).rejects.toThrow(CellValuesError);
    await expect(check(bytes)).rejects.toThrow(message);
  });

  it('checks a coded map to its last byte', async () => {
    const few = Uint8Array.from({ length: 420_000 }, (_, i) => (i >> 8) & 3);
    const coded = Buffer.from(encodeCellValues({ width: 600, height: 700, values: few }));
    expect(await check(coded)).toMatchObject({ width: 600, packing: 'context' });
    await expect(check(coded.subarray(0, coded.length - 1))).rejects.toThrow(/fails its checksum/);
    await expect(check(Buffer.concat([coded, Buffer.alloc(1)]))).rejects.toThrow(/fails its checksum/);
    const long = Buffer.concat([coded, Buffer.alloc(420_000)]);
    await expect(check(long)).rejects.toThrow(/damaged: found \d+ bytes for 420000 cells/);
  });

  it('refuses a changed checksum, and more cells than it may', async () => {
    const changed = Buffer.from(good);
    changed[changed.length - 1] ^= 1;
    await expect(check(changed)).rejects.toThrow(/damaged/);
    await expect(check(good, 419_999)).rejects.toThrow(/at most 419999/);
  });
});
