import { releaseProxy, wrap } from 'comlink';
import type { Comparison } from '#contract/comparisons.ts';
import type { ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';
import type { KnownRecords } from '#sim-core/compare/known-records.ts';
import type { FiguresFace } from './figures-book.ts';
import type { Enough } from './may-stop.ts';

type Compared = Pick<Comparison, 'plan' | 'id'>;

/** Figures of a comparison from a worker, which is told each record once. */
export interface FiguresDesk {
  figures(comparison: Compared, known: KnownRecords): Promise<ComparisonFigures>;
  mayStop(comparison: Compared, known: KnownRecords): Promise<Enough | undefined>;
  close(): void;
}

const startWorker = () =>
  new Worker(new URL('./figures-worker.ts', import.meta.url), { type: 'module', name: 'figures' });

export function createFiguresDesk(createWorker: () => Worker = startWorker): FiguresDesk {
  const worker = createWorker();
  const remote = wrap<FiguresFace>(worker);
  let fail!: (why: Error) => void;
  const death = new Promise<never>((_, reject) => (fail = reject));
  death.catch(() => undefined);
  worker.addEventListener('error', (event) => {
    fail(new Error(`The worker that keeps the figures stopped: ${event.message}`));
  });
  /** the records that the worker holds, and how many of each */
  let held: { readonly known: KnownRecords; readonly counts: number[][] } | undefined;

  /** Sends what is new. Messages keep their order, so an answer asked for afterwards rests on it. */
  function tell(comparison: Compared, known: KnownRecords): void {
    if (held?.known !== known) {
      held = { known, counts: known.map((option) => option.map(() => 0)) };
      void remote.begin({ plan: comparison.plan, id: comparison.id });
    }
    const { counts } = held;
    known.forEach((option, o) =>
      option.forEach((records, l) => {
        // Records are only ever added, and a map hands them out in that order.
        const fresh = [...records.values()].slice(counts[o][l]);
        counts[o][l] = records.size;
        if (fresh.length > 0) void remote.take(o, l, fresh);
      }),
    );
  }
  const ask = <T>(comparison: Compared, known: KnownRecords, question: () => Promise<T>): Promise<T> => {
    tell(comparison, known);
    return Promise.race([question(), death]);
  };
  return {
    figures: (comparison, known) => ask(comparison, known, () => remote.figures()),
    mayStop: (comparison, known) => ask(comparison, known, () => remote.mayStop()),
    close: () => {
      remote[releaseProxy]();
      worker.terminate();
      fail(new Error('The figures were closed'));
    },
  };
}
