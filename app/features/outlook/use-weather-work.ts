import { releaseProxy, wrap } from 'comlink';
import { useEffect, useRef, useState } from 'react';
import type { WeatherFace } from './weather-worker.ts';

type Work = keyof WeatherFace;
type Asked<W extends Work> = Parameters<WeatherFace[W]>;
/** What work came to; `of` is what was asked, so that an answer to older blanks can be told. */
export interface WorkDone<W extends Work> {
  readonly of: string;
  readonly made: ReturnType<WeatherFace[W]>;
}

/**
 * Work on weather off the page's thread: the answer to the latest that was asked, until it is there the one before. Blanks
 * change faster than answers come, so one is worked on at a time and only the last of those that wait.
 *
 * @param asked arguments, plain data; undefined: nothing is asked
 */
export function useWeatherWork<W extends Work>(
  work: W,
  asked: Asked<W> | undefined,
): WorkDone<W> | undefined {
  const [done, setDone] = useState<WorkDone<W>>();
  const desk = useRef<{ ask: (key: string) => Promise<unknown>; busy: boolean; next: string | undefined }>(
    undefined,
  );
  useEffect(() => {
    const worker = new Worker(new URL('./weather-worker.ts', import.meta.url), {
      type: 'module',
      name: 'weather',
    });
    const remote = wrap<WeatherFace>(worker);
    desk.current = {
      ask: (key) => {
        const call = remote[work] as unknown as (...asks: unknown[]) => Promise<unknown>;
        return call(...(JSON.parse(key) as unknown[]));
      },
      busy: false,
      next: undefined,
    };
    return () => {
      desk.current = undefined;
      remote[releaseProxy]();
      worker.terminate();
    };
  }, [work]);
  const key = asked && JSON.stringify(asked);
  useEffect(() => {
    if (key === undefined) return;
    const start = (of: string) => {
      const at = desk.current;
      if (!at) return;
      if (at.busy) {
        at.next = of;
        return;
      }
      at.busy = true;
      at.ask(of)
        .then((made) => {
          if (desk.current === at) setDone({ of, made: made as ReturnType<WeatherFace[W]> });
        })
        // As an error of the page, where the browser's own tools and the tests look for it.
        .catch((error: unknown) => reportError(error))
        .finally(() => {
          at.busy = false;
          const { next } = at;
          at.next = undefined;
          if (next !== undefined) start(next);
        });
    };
    start(key);
  }, [key, work]);
  return key === undefined ? undefined : done;
}
