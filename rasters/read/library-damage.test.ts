import { readdirSync, readFileSync } from 'node:fs';
import { Worker } from 'node:worker_threads';
import { afterAll, beforeAll, expect, it } from 'vitest';

/**
 * Blocks that geotiff.js decodes, with their bytes damaged in turn. As a decoder might loop for ever, which no
 * test could break off on its own thread, a worker reads them, and is destroyed when it says nothing any more.
 */
const folder = new URL('../fixtures/', import.meta.url);
const names = readdirSync(folder).filter((name) => /^good-(lerc|zstd)/.test(name));
const zstdMagic = Buffer.from([0x28, 0xb5, 0x2f, 0xfd]);
const silenceMs = 30_000;

const code = `
import { parentPort, workerData } from 'node:worker_threads';
const { register } = await import(workerData.tsx);
register();
const { readRaster } = await import(workerData.reader);
parentPort.on('message', async ({ bytes, from, step }) => {
    const outcome = { read: 0, refused: 0, codes: [], other: [] };
    for (let at = from; at < bytes.length; at += step) {
      parentPort.postMessage({ at });
      const copy = bytes.slice();
      copy[at] ^= 1 << (at % 8);
      try {
        await readRaster(copy);
        outcome.read++;
      } catch (error) {
        if (error.name !== 'RasterError') outcome.other.push(at + ': ' + error.stack);
        else { outcome.refused++; if (!outcome.codes.includes(error.code)) outcome.codes.push(error.code); }
      }
    }
    parentPort.postMessage({ outcome });
  });
parentPort.postMessage({ ready: true });
`;

interface Outcome {
  read: number;
  refused: number;
  codes: string[];
  other: string[];
}
type Message = { ready: true } | { at: number } | { outcome: Outcome };

let worker: Worker;
/** Waits for the worker's last word on what it was asked; rejects when it falls silent. */
const answer = () =>
  new Promise<Outcome | undefined>((resolve, reject) => {
    let at = -1;
    const silent = () => {
      void worker.terminate();
      reject(new Error(`the reader came to no end with byte ${at} damaged`));
    };
    let timer = setTimeout(silent, silenceMs);
    const listen = (message: Message) => {
      clearTimeout(timer);
      if ('at' in message) {
        at = message.at;
        timer = setTimeout(silent, silenceMs);
        return;
      }
      worker.off('message', listen);
      resolve('outcome' in message ? message.outcome : undefined);
    };
    worker.on('message', listen);
    worker.once('error', reject);
  });

beforeAll(async () => {
  worker = new Worker(new URL(`data:text/javascript,${encodeURIComponent(code)}`), {
    workerData: {
      reader: new URL('./read-raster.ts', import.meta.url).href,
      tsx: import.meta.resolve('tsx/esm/api'),
    },
  });
  await answer();
});
afterAll(() => worker.terminate());

/** Damages some 120 bytes from `from` on, one at a time. */
async function damageEach(bytes: Buffer, from: number): Promise<Outcome> {
  const heard = answer();
  worker.postMessage({ bytes: new Uint8Array(bytes), from, step: Math.ceil((bytes.length - from) / 120) });
  const outcome = await heard;
  if (!outcome) throw new Error('the worker has not begun');
  return outcome;
}

/** Where the first block begins, or the last one when it is not to be told: in these files the blocks come last. */
const blocksAt = (bytes: Buffer) => {
  const starts = [bytes.indexOf('Lerc2 '), bytes.indexOf(zstdMagic)].filter((at) => at >= 0);
  return starts.length > 0 ? Math.min(...starts) : bytes.length - 120;
};

it.each(names)('%s is refused or read with a byte of its blocks damaged', async (name) => {
  const bytes = readFileSync(new URL(name, folder));
  const { refused, codes, other } = await damageEach(bytes, blocksAt(bytes));
  expect(other).toEqual([]);
  expect(refused).toBeGreaterThan(5);
  expect(codes).toContain('raster-truncated');
});
