import { releaseProxy, wrap } from 'comlink';
import { useEffect, useRef, useState } from 'react';
import type { ComparisonPlan } from '#contract/comparisons.ts';
import type { ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';
import type { KnownRecords } from '#sim-core/compare/known-records.ts';
import type { FiguresFace } from './figures-worker.ts';

/**
 * The figures of a comparison, worked out off the page's thread: those of the latest records as soon as they are there,
 * until then the ones before. Undefined before the first.
 *
 * @param version rises when `known` was filled further in place
 */
export function useComparisonFigures(
  plan: ComparisonPlan,
  known: KnownRecords | undefined,
  seed: string,
  version: number,
): ComparisonFigures | undefined {
  const [figures, setFigures] = useState<ComparisonFigures>();
  const desk = useRef<{ ask: FiguresFace['figures']; busy: boolean; again: (() => void) | undefined }>(
    undefined,
  );
  useEffect(() => {
    const worker = new Worker(new URL('./figures-worker.ts', import.meta.url), {
      type: 'module',
      name: 'figures',
    });
    const remote = wrap<FiguresFace>(worker);
    desk.current = {
      ask: remote.figures as unknown as FiguresFace['figures'],
      busy: false,
      again: undefined,
    };
    return () => {
      desk.current = undefined;
      remote[releaseProxy]();
      worker.terminate();
    };
  }, []);
  useEffect(() => {
    if (!known) return;
    const work = () => {
      const at = desk.current;
      if (!at) return;
      // One at a time: what came meanwhile is asked once more when the answer is there.
      if (at.busy) {
        at.again = work;
        return;
      }
      at.busy = true;
      Promise.resolve(at.ask(plan, known, seed))
        .then((made) => {
          if (desk.current === at) setFigures(made);
        })
        .catch((error: unknown) => {
          // As an error of the page, where the browser's own tools and the tests look for it.
          reportError(error);
        })
        .finally(() => {
          at.busy = false;
          const next = at.again;
          at.again = undefined;
          next?.();
        });
    };
    work();
  }, [plan, known, seed, version]);
  return figures;
}
