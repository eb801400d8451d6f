import { z } from 'zod';
import { fieldProblems, type FieldProblem } from '#sim-core/spec/problems.ts';
import { rasterSources, runSpecSchema, type RunSpec } from '#sim-core/spec/run-spec.ts';
import { SimulateError } from './simulate-error.ts';

/** A RunSpec whose layers are files, run once or as an ensemble. */
export interface HeadlessSpec {
  readonly spec: RunSpec;
  /** how many replicates to run, 0 … replicates − 1; undefined: the one that the spec names */
  readonly replicates: number | undefined;
}

const replicatesSchema = z.object({ replicates: z.number().int().min(1).max(10_000).optional() });

/**
 * A spec from its JSON text. Lines before the JSON that are blank or start with `>` are passed over, for that is what
 * `npm run … > spec.json` puts there.
 *
 * @throws SimulateError that names every wrong field
 */
export function parseHeadlessSpec(text: string): HeadlessSpec {
  let json: unknown;
  try {
    json = JSON.parse(text.replace(/^\uFEFF?(?:[^\S\n]*(?:>[^\n]*)?\r?\n)*/, ''));
  } catch (error) {
    throw new SimulateError(`The spec is no JSON: ${(error as Error).message}`);
  }
  if (typeof json !== 'object' || json === null || Array.isArray(json))
    throw new SimulateError('The spec must be a JSON object. "--example" prints one that runs.');
  const { replicates, ...rest } = json as Record<string, unknown>;
  const ensemble = replicatesSchema.safeParse({ replicates });
  const run = runSpecSchema.safeParse(rest);
  const problems: FieldProblem[] = [ensemble, run].flatMap((parsed) =>
    parsed.success ? [] : fieldProblems(parsed.error),
  );
  if (run.success) problems.push(...whatOnlyFilesCanBe(run.data));
  if (ensemble.data?.replicates !== undefined && run.data?.replicate)
    problems.push({
      field: 'replicate',
      message: `Found ${run.data.replicate} beside "replicates"; an ensemble runs replicates 0, 1, 2 and so on, so leave this out`,
    });
  if (!run.success || !ensemble.success || problems.length > 0) throw SimulateError.ofFields(problems);
  return { spec: run.data, replicates: ensemble.data.replicates };
}

function whatOnlyFilesCanBe({ layers }: RunSpec): FieldProblem[] {
  const problems: FieldProblem[] = [];
  const named = Object.entries(layers).flatMap(([name, source]) =>
    rasterSources(source).map(({ at, raster }) => ({ field: `layers.${name}${at}`, source: raster })),
  );
  for (const { field, source } of named) {
    if ('layer' in source)
      problems.push({
        field: `${field}.layer`,
        message: 'Names an uploaded raster; here, name a GeoTIFF with "file"',
      });
    if (source.band !== undefined && source.band !== 1)
      problems.push({
        field: `${field}.band`,
        message: `Found ${source.band}; files of one band are read. Take the band out with gdal_translate -b ${source.band} IN.tif OUT.tif`,
      });
  }
  if (named.length === 0)
    problems.push({
      field: 'layers',
      message: 'None is a raster; at least one must be a GeoTIFF, which gives the grid',
    });
  return problems;
}
