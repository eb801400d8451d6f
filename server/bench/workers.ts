import { loadavg } from 'node:os';
import { createRunPool } from '#server/jobs/run-pool.ts';
import { printLine } from '#sim-core/bench/line.ts';
import { demoCase } from './demo-case.ts';

const replicates = 64;
/** Enough for a replicate to take as long as many a site's; the whole horizon would show no more. */
const years = 8;

/** Replicates of the demo by two workers against one, by the clock, once all workers are up and warm. */
export async function benchWorkers(): Promise<void> {
  const { spec, grid, ground } = await demoCase('counts');
  const droughtIndex = (spec.droughtIndex as number[]).slice(0, years);
  const specs = Array.from({ length: replicates }, (_, replicate) => ({
    ...spec,
    years,
    droughtIndex,
    actions: [],
    replicate,
    reportYears: [spec.surveyYear + years],
  }));
  async function seconds(workers: number): Promise<number> {
    const pool = createRunPool({ grid, ground, workers });
    const run = async (count: number) => {
      const failed = (error: unknown) => {
        throw error;
      };
      const listener = { onResult: () => undefined, onFailure: failed };
      const keep = { closing: false, coverYears: [] };
      await pool.start(specs.slice(0, count), listener, { keep }).finished;
    };
    try {
      await run(4 * workers);
      const start = performance.now();
      await run(replicates);
      return (performance.now() - start) / 1000;
    } finally {
      await pool.close();
    }
  }
  const [one, two] = [await seconds(1), await seconds(2)];
  const work = replicates * years;
  printLine({
    name: 'ensemble',
    mode: 'counts',
    map: 'demo',
    size: `${grid.width}×${grid.height}`,
    against: 'one-worker',
    work,
    seconds: two,
    rate: work / two,
    ratio: one / two,
    load: loadavg()[0],
  });
}
