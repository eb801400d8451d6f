import { expose, transfer, type ProxyMarked, type Remote } from 'comlink';
import { encodeCellValues } from '#rasters/cells/cell-values.ts';
import { createRun } from '#sim-core/index.ts';
import { groundOf } from './run-ground.ts';
import { createRunLoop, type RunInput, type RunProgress, type YearEvent } from './run-loop.ts';

const loop = createRunLoop({
  createRun: async (input) => createRun({ ...input, ground: await groundOf(input) }),
  // As a blob it goes to the server without passing through the page's memory.
  pack: (cells) => new Blob([encodeCellValues(cells) as Uint8Array<ArrayBuffer>]),
  now: () => performance.now(),
});

const buffersOf = (...arrays: (Uint8Array | Int16Array | undefined)[]) =>
  arrays.filter((a) => a !== undefined).map((a) => a.buffer as ArrayBuffer);

/** The caller's listener as it is seen from here: all calls cross to the page. */
export interface PageListener {
  onYear(event: YearEvent): Promise<void>;
  onProgress(progress: RunProgress): void;
  onStandstill(): void;
}

/** Holds a lock for as long as this worker lives: its coming free tells the page of a death that raises no event. */
const hold = (lock: string) =>
  new Promise<void>((held, refused) => {
    navigator.locks
      .request(lock, () => {
        held();
        return new Promise<never>(() => undefined);
      })
      .catch(refused);
  });

/** What the client calls; whatever has cells is handed to it, never copied. */
const face = {
  run: async (input: RunInput, listener: Remote<PageListener & ProxyMarked>, lock: string | undefined) => {
    if (lock !== undefined) await hold(lock);
    const outcome = await loop.run(input, {
      onYear: (event: YearEvent) => listener.onYear(transfer(event, buffersOf(event.frame))),
      onProgress: (progress) => void listener.onProgress(progress),
      onStandstill: () => void listener.onStandstill(),
    });
    return transfer(outcome, buffersOf(outcome.closing));
  },
  pause: () => {
    loop.pause();
  },
  resume: () => {
    loop.resume();
  },
  step: () => {
    loop.step();
  },
};
export type RunWorkerFace = typeof face;

expose(face);
