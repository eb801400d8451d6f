import { csv } from '#contract/csv.ts';
import { seriesColumns } from '#server/files/series-csv.ts';
import { createRunPool } from '#server/jobs/run-pool.ts';
import { ratesOfRun, uncertainNames } from '#sim-core/belief/rates-of-run.ts';
import { attemptsOfRun, WorkerDied } from '#sim-core/ensemble/runner.ts';
import { closingBandName, RunProblem, type RunResult } from '#sim-core/index.ts';
import { drawProblems } from '#sim-core/run/draw-problems.ts';
import { frameYears, type RunSpec } from '#sim-core/spec/run-spec.ts';
import { ensembleMaps } from './ensemble-maps.ts';
import type { GroundOnFile } from './read-ground.ts';
import { closingMap, coverMap, summaryText } from './result-files.ts';
import type { ResultFolder } from './result-folder.ts';
import { SimulateError } from './simulate-error.ts';
import type { SpecFileWork } from './spec-file-work.ts';

/**
 * Runs the replicates of a spec on this machine's cores.
 * @throws RunProblem where a replicate cannot be, SimulateError where the maps would not fit
 */
export async function runEnsemble(
  spec: RunSpec,
  replicates: number,
  onFile: GroundOnFile,
  { open, tell, workers }: SpecFileWork,
): Promise<void> {
  const { grid, ground } = onFile;
  const problems = drawProblems(spec, grid.cellSize, replicates);
  if (problems.length > 0) throw new RunProblem(problems);
  const years = frameYears(spec);
  const maps = ensembleMaps(grid.width * grid.height, years, replicates);
  const results: RunResult[] = [];
  let folder: ResultFolder | undefined;
  const pool = createRunPool({ grid, ground, workers });
  try {
    await pool.start(
      Array.from({ length: replicates }, (_, replicate) => ({ ...spec, replicate })),
      {
        onResult: async ({ result, closing, covers }) => {
          folder ??= await open();
          covers.forEach((cover, year) => {
            maps.addCover(year, cover);
          });
          if (closing) maps.addClosing(closing);
          results.push(result);
        },
        onFailure: (error, replicate) => {
          throw error instanceof WorkerDied ? diedTooOften(error, replicate) : error;
        },
        onProgress: ({ stepsDone, steps, runsDone }) => {
          // The last step may be done before the last replicate is handed over.
          if (stepsDone > 0 && (stepsDone < steps || runsDone === replicates))
            tell(stepsDone, steps, `${runsDone} of ${replicates} replicates`);
        },
      },
      // Sums of cover hang on the order in the last bit.
      { keep: { closing: true, coverYears: years }, inOrder: true },
    ).finished;
  } finally {
    await pool.close();
  }
  folder ??= await open();
  const closing = maps.medianClosing();
  for (const year of years)
    await folder.write(
      `cover-${year}.tif`,
      coverMap(onFile, `mean cover ${year}`, maps.meanCover(year), closing),
    );
  const closingName = `median ${closingBandName}`;
  await folder.write('closing.tif', closingMap(onFile, closingName, closing));
  await folder.write('series.csv', seriesOfAll(results));
  if (spec.uncertain) await folder.write('draws.csv', drawsOfAll(spec, results));
  const said = { ...spec, replicate: undefined, replicates };
  await folder.write('summary.json', summaryText(outcomeOf(results), results[0], onFile, said));
  await folder.finish();
}

const diedTooOften = (error: WorkerDied, replicate: number) =>
  new SimulateError(
    `Replicate ${replicate} was tried ${attemptsOfRun} times and could not be computed. ${error.message}. ` +
      'Where memory is short, fewer "--workers" leave more of it to each.',
  );

/** The series of all replicates under each other, the replicate in the first column. */
const seriesOfAll = (results: readonly RunResult[]): string =>
  csv(
    ['replicate', ...seriesColumns.map(([, header]) => header)],
    results.flatMap(({ series }, replicate) =>
      series.map((row) => [replicate, ...seriesColumns.map(([key]) => row[key])]),
    ),
  );

/** The rates that each replicate drew and when it recovered, a row a replicate. */
function drawsOfAll(spec: RunSpec, results: readonly RunResult[]): string {
  const names = uncertainNames(spec.uncertain!);
  return csv(
    ['replicate', ...names, 'recovered_year'],
    results.map(({ recoveredYear }, replicate) => {
      const { drawn } = ratesOfRun({ ...spec, replicate });
      return [replicate, ...names.map((name) => drawn[name]!), recoveredYear];
    }),
  );
}

const outcomeOf = (results: readonly RunResult[]) => ({
  replicates: results.map(({ digest, recoveredYear }, replicate) => ({ replicate, digest, recoveredYear })),
  /** replicates that reached the target by the horizon; the others are censored, not failed */
  recovered: {
    count: results.filter(({ recoveredYear }) => recoveredYear !== null).length,
    of: results.length,
  },
});
