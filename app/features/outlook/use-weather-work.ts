import { releaseProxy, wrap } from 'comlink';
import { useCallback } from 'react';
import { useLatestAnswer, type LatestAnswer } from '#app/lib/use-latest-answer.ts';
import type { WeatherFace } from './weather-worker.ts';

type Work = keyof WeatherFace;
type Asked<W extends Work> = Parameters<WeatherFace[W]>;
type Made<W extends Work> = ReturnType<WeatherFace[W]>;

/**
 * Work on weather off the page's thread: the answer to the latest that was asked, until it is there the one before. Its
 * `question` is what was asked, as JSON.
 *
 * @param asked arguments, plain data; undefined: nothing is asked
 */
export function useWeatherWork<W extends Work>(
  work: W,
  asked: Asked<W> | undefined,
): LatestAnswer<string, Made<W>> | undefined {
  const open = useCallback(() => openWeather(work), [work]);
  const question = asked && JSON.stringify(asked);
  const latest = useLatestAnswer<string, Made<W>>(open, question);
  return question === undefined ? undefined : latest;
}

function openWeather<W extends Work>(work: W) {
  const worker = new Worker(new URL('./weather-worker.ts', import.meta.url), {
    type: 'module',
    name: 'weather',
  });
  const remote = wrap<WeatherFace>(worker);
  return {
    ask: (question: string) => {
      const call = remote[work] as unknown as (...asks: unknown[]) => Promise<Made<W>>;
      return call(...(JSON.parse(question) as unknown[]));
    },
    close: () => {
      remote[releaseProxy]();
      worker.terminate();
    },
  };
}
