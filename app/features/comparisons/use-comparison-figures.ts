import { useMemo } from 'react';
import type { Comparison } from '#contract/comparisons.ts';
import type { ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';
import type { KnownRecords } from '#sim-core/compare/known-records.ts';
import { useLatestAnswer } from '#app/lib/use-latest-answer.ts';
import { createFiguresDesk } from './figures-desk.ts';

/** How many times as long as they took the figures rest before they are worked out again, so that futures get the cores. */
const rest = 20;

interface Question {
  readonly compared: Pick<Comparison, 'plan' | 'id'>;
  readonly known: KnownRecords;
  readonly version: number;
}

/**
 * The figures of a comparison, worked out off the page's thread: those of the latest records as soon as they are there,
 * until then the ones before. Undefined before the first.
 *
 * @param version rises when `known` was filled further in place
 */
export function useComparisonFigures(
  { plan, id }: Pick<Comparison, 'plan' | 'id'>,
  known: KnownRecords | undefined,
  version: number,
): ComparisonFigures | undefined {
  const question = useMemo<Question | undefined>(
    () => known && { compared: { plan, id }, known, version },
    [plan, id, known, version],
  );
  return useLatestAnswer(openFigures, question, rest)?.answer;
}

function openFigures() {
  const desk = createFiguresDesk();
  return {
    ask: ({ compared, known }: Question) => desk.figures(compared, known),
    close: () => desk.close(),
  };
}
