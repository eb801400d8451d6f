import { useEffect, useRef, useState } from 'react';
import type { Comparison } from '#contract/comparisons.ts';
import type { ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';
import type { KnownRecords } from '#sim-core/compare/known-records.ts';
import { createFiguresDesk, type FiguresDesk } from './figures-desk.ts';

/** How many times as long as they took the figures rest before they are worked out again, so that futures get the cores. */
const rest = 20;

/**
 * The figures of a comparison, worked out off the page's thread: those of the latest records as soon as they are there,
 * until then the ones before. Undefined before the first.
 *
 * @param version rises when `known` was filled further in place
 */
export function useComparisonFigures(
  comparison: Pick<Comparison, 'plan' | 'id'>,
  known: KnownRecords | undefined,
  version: number,
): ComparisonFigures | undefined {
  const [figures, setFigures] = useState<ComparisonFigures>();
  const desk = useRef<{ ask: FiguresDesk; busy: boolean; again: (() => void) | undefined }>(undefined);
  useEffect(() => {
    const ask = createFiguresDesk();
    desk.current = { ask, busy: false, again: undefined };
    return () => {
      desk.current = undefined;
      ask.close();
    };
  }, []);
  const { plan, id } = comparison;
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
      const begun = performance.now();
      const next = () => {
        at.busy = false;
        const { again } = at;
        at.again = undefined;
        again?.();
      };
      at.ask
        .figures({ plan, id }, known)
        .then((made) => {
          if (desk.current === at) setFigures(made);
        })
        .catch((error: unknown) => {
          // As an error of the page, where the browser's own tools and the tests look for it.
          if (desk.current === at) reportError(error);
        })
        .finally(() => setTimeout(next, rest * (performance.now() - begun)));
    };
    work();
  }, [plan, id, known, version]);
  return figures;
}
