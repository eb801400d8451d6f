import { readFile } from 'node:fs/promises';
import { setImmediate as nextTurn } from 'node:timers/promises';
import { seriesCsv } from '#server/files/series-csv.ts';
import { ratesOfRun } from '#sim-core/belief/rates-of-run.ts';
import { closingBandName, createRun, RunProblem } from '#sim-core/index.ts';
import { frameYears, type RunSpec } from '#sim-core/spec/run-spec.ts';
import { parseHeadlessSpec } from './headless-spec.ts';
import { readGround, type GroundOnFile } from './read-ground.ts';
import { closingMap, coverMap, summaryText } from './result-files.ts';
import { runEnsemble } from './run-ensemble.ts';
import { SimulateError } from './simulate-error.ts';
import type { SpecFileWork } from './spec-file-work.ts';

/**
 * Runs a spec on its files.
 * @throws SimulateError saying what the user can mend
 */
export async function runSpecFile(specPath: string, work: SpecFileWork): Promise<void> {
  const text = await readFile(specPath, 'utf8').catch((error: NodeJS.ErrnoException) => {
    throw new SimulateError(
      `${specPath} cannot be read: ${error.code === 'ENOENT' ? 'there is no such file' : error.message}.`,
    );
  });
  const { spec, replicates } = parseHeadlessSpec(text);
  try {
    const onFile = await readGround(spec.layers, specPath);
    if (replicates === undefined) await runOnce(spec, onFile, work);
    else await runEnsemble(spec, replicates, onFile, work);
  } catch (error) {
    if (error instanceof RunProblem) throw SimulateError.ofFields(error.problems);
    throw error;
  }
}

async function runOnce(spec: RunSpec, onFile: GroundOnFile, { open, tell }: SpecFileWork): Promise<void> {
  const { grid, ground } = onFile;
  const reported = new Set(frameYears(spec));
  // Everything that can be refused is refused here, before anything is written.
  const run = createRun({ spec, grid, ground });
  const folder = await open();
  for (let year = run.survey; ;) {
    if (reported.has(year.year))
      await folder.write(
        `cover-${year.year}.tif`,
        coverMap(onFile, `cover ${year.year}`, run.cover(), run.closing()),
      );
    // A year is computed in one go; between years the process must be able to hear that it is to stop.
    await nextTurn();
    const next = run.nextYear(tell);
    if (!next) break;
    year = next;
  }
  const result = run.result();
  await folder.write('closing.tif', closingMap(onFile, closingBandName, run.closing()));
  await folder.write('series.csv', seriesCsv(result.series));
  const { digest, recoveredYear } = result;
  const drawn = spec.uncertain && ratesOfRun(spec).drawn;
  await folder.write('summary.json', summaryText({ digest, recoveredYear, drawn }, result, onFile, spec));
  await folder.finish();
}
