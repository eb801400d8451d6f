import { releaseProxy, wrap } from 'comlink';
import { useLatestAnswer } from '#app/lib/use-latest-answer.ts';
import type { ImpliedDraws, ImpliedQuestion } from './implied-draws.ts';
import type { ImpliedFace } from './implied-worker.ts';

/**
 * What the rates imply over many draws of what is believed, worked out off the page's thread: of the latest question as
 * soon as it is there, until then of the one before. Undefined before the first.
 */
export const useImpliedDraws = (question: ImpliedQuestion): ImpliedDraws | undefined =>
  useLatestAnswer(openImplied, question)?.answer;

function openImplied() {
  const worker = new Worker(new URL('./implied-worker.ts', import.meta.url), {
    type: 'module',
    name: 'implied',
  });
  const remote = wrap<ImpliedFace>(worker);
  return {
    ask: (question: ImpliedQuestion) => remote.impliedDraws(question),
    close: () => {
      remote[releaseProxy]();
      worker.terminate();
    },
  };
}
