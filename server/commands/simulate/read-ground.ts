import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { dirname, resolve } from 'node:path';
import { pipeline } from 'node:stream/promises';
import { validateOnGrid } from '#rasters/read/on-grid.ts';
import { RasterError } from '#rasters/read/raster-error.ts';
import { readRaster } from '#rasters/read/read-raster.ts';
import type { Raster } from '#rasters/read/raster.ts';
import { withFileSource } from '#server/files/file-source.ts';
import { buildGround, RunProblem } from '#sim-core/index.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { groundLayers, type Ground } from '#sim-core/grid/ground.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import { rasterSources, type LayerSources } from '#sim-core/spec/run-spec.ts';
import { SimulateError } from './simulate-error.ts';

export interface GroundOnFile {
  readonly grid: Grid;
  readonly crsName: string;
  readonly ground: Ground;
  /** the files that layers came from, by their place in `layers`: path as the spec names it, SHA-256 of the bytes */
  readonly files: Readonly<Record<string, { file: string; sha256: string }>>;
}

/**
 * Reads every GeoTIFF that the layers name, once each; the first gives the grid and the others must have its cells.
 *
 * @param specPath file that relative paths start from
 * @throws SimulateError naming each layer whose file cannot be used, or is not the one of the spec's `sha256`
 */
export async function readGround(layers: LayerSources, specPath: string): Promise<GroundOnFile> {
  const rasters = new Map<string, Raster>();
  const files: Record<string, { file: string; sha256: string }> = {};
  const hashes = new Map<string, string>();
  const problems: FieldProblem[] = [];
  let first: Raster | undefined;
  const named = groundLayers.flatMap((layer) =>
    rasterSources(layers[layer]).map(({ at, raster }) => ({ field: layer + at, source: raster })),
  );
  for (const { field, source } of named) {
    if (!('file' in source)) continue;
    const path = resolve(dirname(specPath), source.file);
    try {
      const sha256 = hashes.get(path) ?? (await sha256Of(path));
      hashes.set(path, sha256);
      if (source.sha256 !== undefined && source.sha256 !== sha256) {
        problems.push({ field: `layers.${field}.sha256`, message: otherFile(path, sha256, source.sha256) });
        continue;
      }
      const raster = rasters.get(path) ?? (await withFileSource(path, (bytes) => readRaster(bytes)));
      first ??= raster;
      validateOnGrid(raster, first.grid);
      rasters.set(path, raster);
      files[field] = { file: source.file, sha256 };
    } catch (error) {
      problems.push({ field: `layers.${field}`, message: `${path}: ${whyNot(error)}` });
    }
  }
  if (problems.length > 0 || !first) throw SimulateError.ofFields(problems);
  const { grid, crsName } = first;
  const ground = buildGround(layers, grid, (source) => {
    const raster = 'file' in source ? rasters.get(resolve(dirname(specPath), source.file)) : undefined;
    if (!raster) throw new RunProblem([{ field: 'layers', message: 'Only files can be read here' }]);
    return raster;
  });
  return { grid, crsName, ground, files };
}

const otherFile = (path: string, found: string, expected: string) =>
  `${path}: found a file with the SHA-256 ${found}; expected ${expected}, the raster that the spec was written for. ` +
  'A file as it was uploaded is not the raster that was made of it on the grid: take the rasters from "Spec with rasters" ' +
  'on the page of the run, or leave out `sha256` to run on this file, which may come to another digest';

/** The reason why a file cannot be used, in words; what is no fault of the file is thrown on. */
function whyNot(error: unknown): string {
  if (error instanceof RasterError) return error.message;
  const code = error instanceof Error && 'code' in error ? error.code : undefined;
  if (code === 'ENOENT') return 'there is no such file';
  if (code === 'EISDIR') return 'this is a folder; name a GeoTIFF in it';
  if (code === 'EACCES') return 'it may not be read; check its permissions';
  throw error;
}

async function sha256Of(path: string): Promise<string> {
  const hash = createHash('sha256');
  await pipeline(createReadStream(path), hash);
  return hash.digest('hex');
}
