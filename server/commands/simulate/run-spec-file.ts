import { readFile } from 'node:fs/promises';
import { setImmediate as nextTurn } from 'node:timers/promises';
import { encodeGeoTiff, type WritableValues } from '#rasters/write/geotiff.ts';
import { csv, seriesColumns, seriesCsv } from '#server/files/series-csv.ts';
import { cannotClose, createRun, engineVersion, RunProblem, type RunResult } from '#sim-core/index.ts';
import { frameYears } from '#sim-core/spec/run-spec.ts';
import { ensembleMaps } from './ensemble-maps.ts';
import { parseHeadlessSpec, type HeadlessSpec } from './headless-spec.ts';
import { readGround, type GroundOnFile } from './read-ground.ts';
import type { ResultFolder } from './result-folder.ts';
import { SimulateError } from './simulate-error.ts';

type Tell = (done: number, of: number, what?: string) => void;

/**
 * Runs a spec on its files.
 *
 * @param open makes the folder for the results, once the spec and its files turn out to be good
 * @throws SimulateError saying what the user can mend
 */
export async function runSpecFile(
  specPath: string,
  open: () => Promise<ResultFolder>,
  tell: Tell,
): Promise<void> {
  const text = await readFile(specPath, 'utf8').catch((error: NodeJS.ErrnoException) => {
    throw new SimulateError(
      `${specPath} cannot be read: ${error.code === 'ENOENT' ? 'there is no such file' : error.message}.`,
    );
  });
  const headless = parseHeadlessSpec(text);
  try {
    const onFile = await readGround(headless.spec.layers, specPath);
    await runAll(headless, onFile, open, tell);
  } catch (error) {
    if (error instanceof RunProblem) throw SimulateError.ofFields(error.problems);
    throw error;
  }
}

async function runAll(
  { spec, replicates }: HeadlessSpec,
  onFile: GroundOnFile,
  open: () => Promise<ResultFolder>,
  tell: Tell,
): Promise<void> {
  const { grid, ground } = onFile;
  const years = frameYears(spec);
  const maps =
    replicates === undefined ? undefined : ensembleMaps(grid.width * grid.height, years, replicates);
  const count = replicates ?? 1;
  const steps = spec.years * spec.stepsPerYear;
  const results: { replicate: number; result: RunResult }[] = [];
  const coverMap = (year: number, values: Float32Array) =>
    geoTiff(onFile, values, { bandName: `${maps ? 'mean cover' : 'cover'} ${year}`, unit: 'share' });

  // Everything that can be refused is refused by the first run, before anything is written.
  let run = createRun({ spec: maps ? { ...spec, replicate: 0 } : spec, grid, ground });
  const folder = await open();
  for (let r = 0; r < count; r++) {
    const replicate = maps ? r : spec.replicate;
    if (r > 0) run = createRun({ spec: { ...spec, replicate }, grid, ground });
    const onStep = (done: number) => {
      tell(r * steps + done, count * steps, maps && `replicate ${r + 1} of ${count}`);
    };
    for (let year = run.survey; ;) {
      if (years.includes(year.year)) {
        if (maps) maps.addCover(year.year, run.cover());
        else await folder.write(`cover-${year.year}.tif`, coverMap(year.year, run.cover()));
      }
      // A year is computed in one go; between years the process must be able to hear that it is to stop.
      await nextTurn();
      const next = run.nextYear(onStep);
      if (!next) break;
      year = next;
    }
    maps?.addClosing(run.closing());
    results.push({ replicate, result: run.result() });
  }

  if (maps)
    for (const year of years) await folder.write(`cover-${year}.tif`, coverMap(year, maps.meanCover(year)));
  await folder.write(
    'closing.tif',
    geoTiff(onFile, maps ? maps.medianClosing() : run.closing(), {
      bandName: maps
        ? 'year by which half of the replicates have closed, 0 still open'
        : 'closing year, 0 still open',
      unit: 'year',
      noData: cannotClose,
    }),
  );
  await folder.write('series.csv', maps ? ensembleCsv(results) : seriesCsv(results[0].result.series));
  await folder.write('summary.json', summary({ spec, replicates }, onFile, results));
  await folder.finish();
}

const geoTiff = (
  { grid, crsName }: GroundOnFile,
  values: WritableValues,
  band: { bandName: string; unit: string; noData?: number },
): Uint8Array => encodeGeoTiff({ grid, crsName, values, ...band });

/** The series of all replicates under each other, the replicate in the first column. */
const ensembleCsv = (results: readonly { replicate: number; result: RunResult }[]): string =>
  csv(
    ['replicate', ...seriesColumns.map(([, header]) => header)],
    results.flatMap(({ replicate, result }) =>
      result.series.map((row) => [replicate, ...seriesColumns.map(([key]) => row[key])]),
    ),
  );

function summary(
  { spec, replicates }: HeadlessSpec,
  { grid, crsName, files }: GroundOnFile,
  results: readonly { replicate: number; result: RunResult }[],
): string {
  const [{ result }] = results;
  const recovered = results.flatMap(({ result: { recoveredYear } }) => recoveredYear ?? []);
  const outcome =
    replicates === undefined
      ? { digest: result.digest, recoveredYear: result.recoveredYear }
      : {
          replicates: results.map(({ replicate, result: { digest, recoveredYear } }) => ({
            replicate,
            digest,
            recoveredYear,
          })),
          /** replicates that reached the target by the horizon; the others are censored, not failed */
          recovered: { count: recovered.length, of: results.length },
        };
  return `${JSON.stringify(
    {
      engineVersion,
      ...outcome,
      referenceArea: result.referenceArea,
      kernel: result.kernel,
      warnings: result.warnings,
      grid: { ...grid, crsName },
      layers: files,
      spec: replicates === undefined ? spec : { ...spec, replicate: undefined, replicates },
    },
    null,
    2,
  )}\n`;
}
