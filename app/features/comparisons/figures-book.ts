import type { Comparison } from '#contract/comparisons.ts';
import { comparisonFigures, type ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { mayStop, type Enough } from './may-stop.ts';

/** Keeps the records of one comparison as they come, and works out what they say. */
export interface FiguresFace {
  /** Empties the book for these records, `[option][outlook]`. */
  begin(comparison: Pick<Comparison, 'plan' | 'id'>): void;
  take(option: number, outlook: number, records: readonly ReplicateRecord[]): void;
  figures(): ComparisonFigures;
  mayStop(): Enough | undefined;
}

export function figuresBook(): FiguresFace {
  let of: Pick<Comparison, 'plan' | 'id'>;
  let known: Map<number, ReplicateRecord>[][];
  return {
    begin: (comparison) => {
      of = comparison;
      known = of.plan.options.map(() => of.plan.outlooks.map(() => new Map<number, ReplicateRecord>()));
    },
    take: (option, outlook, records) => {
      for (const record of records) known[option][outlook].set(record.replicate, record);
    },
    figures: () => comparisonFigures(of.plan, known, of.id),
    mayStop: () => mayStop(of, known),
  };
}
