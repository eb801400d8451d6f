import { releaseProxy, wrap } from 'comlink';
import type { LaidPoints } from '#sim-core/plan/pattern.ts';
import type { YearLine } from '#sim-core/plan/year-lines.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';
import type { Look, PatternRequest, QuickLookStart } from './quick-look-desk.ts';
import type { QuickLookFace } from './quick-look-worker.ts';
import { worksChanges } from './works-changes.ts';

/** The worker died, or what it sent could not be read. */
export class QuickLookDied extends Error {
  override name = 'QuickLookDied';
}

export interface QuickLookListener {
  /** A look at the works that were set last but for those that came while it was being made. */
  onLook(look: Look, works: readonly Action[]): void;
  /** Lines of closing years of the look that came last, once nothing newer is asked for. */
  onLines(lines: readonly YearLine[]): void;
  /** Nothing comes any more. RunProblem, CellValuesError, QuickLookDied */
  onFailure(error: unknown): void;
}

export interface QuickLookHandle {
  /**
   * Looks at these works. While one look is being made only the latest works wait: what came between is dropped. Works
   * that did not change must be the same objects as before, so that only what changed is worked on.
   */
  setWorks(works: readonly Action[]): void;
  /** Lays a pattern on the same ground. @throws RangeError where it makes no sense */
  lay(request: PatternRequest): Promise<LaidPoints>;
  close(): void;
}

/** How long nothing newer is asked for, ms, before lines are drawn. */
const rest = 150;

const startWorker = () =>
  new Worker(new URL('./quick-look-worker.ts', import.meta.url), { type: 'module', name: 'quick look' });

/** Opens a ground in a worker of its own, and looks at it without works first. */
export function startQuickLook(
  start: QuickLookStart,
  listener: QuickLookListener,
  createWorker: () => Worker = startWorker,
): QuickLookHandle {
  const worker = createWorker();
  const remote = wrap<QuickLookFace>(worker);
  const changes = worksChanges();
  let over = false;
  let busy = true;
  let waiting: readonly Action[] | undefined;
  let resting: ReturnType<typeof setTimeout> | undefined;
  let fail!: (reason: unknown) => void;
  const failed = new Promise<never>((_, reject) => (fail = reject));
  const died = (event: Event) => {
    const { message } = event as Partial<ErrorEvent>;
    fail(
      new QuickLookDied(`The quick look’s worker stopped: ${message || 'it could not be loaded or read'}`),
    );
  };
  worker.addEventListener('error', died);
  worker.addEventListener('messageerror', died);

  function close(): void {
    if (over) return;
    over = true;
    clearTimeout(resting);
    remote[releaseProxy]();
    worker.terminate();
    // Whoever still waits for points must not wait for ever.
    fail(new QuickLookDied('The quick look was closed'));
  }
  failed.catch((reason: unknown) => {
    if (over) return;
    close();
    listener.onFailure(reason);
  });

  function take(asked: Promise<Look>, works: readonly Action[]): void {
    busy = true;
    asked.then((look) => {
      busy = false;
      if (over) return;
      const next = waiting;
      waiting = undefined;
      if (next) lookAt(next);
      listener.onLook(look, works);
      if (!next) resting = setTimeout(drawLines, rest);
    }, fail);
  }
  // The worker does one thing at a time: while a hand moves, the next look must not stand behind lines.
  function drawLines(): void {
    remote.lines().then((lines) => {
      if (!over && !busy) listener.onLines(lines);
    }, fail);
  }
  const lookAt = (works: readonly Action[]) => {
    take(remote.change(changes.to(works)), works);
  };

  const opened = remote.open(start);
  take(opened, []);
  return {
    setWorks(works) {
      if (over) return;
      clearTimeout(resting);
      if (busy) waiting = works;
      else lookAt(works);
    },
    lay: (request) => Promise.race([opened.then(() => remote.lay(request)), failed]),
    close,
  };
}
