import { createHash } from 'node:crypto';
import { writeFile } from 'node:fs/promises';
import { encodeCellValues } from '#rasters/cells/cell-values.ts';
import { validateOnGrid } from '#rasters/read/on-grid.ts';
import { readRaster } from '#rasters/read/read-raster.ts';
import { summarise } from '#rasters/read/summary.ts';
import { withFileSource } from '../files/file-source.ts';
import { valueComplaint } from './layer-facts.ts';
import type { ReadLayerTask, Refusal, TaskResults, WrittenFile } from './raster-tasks.ts';

/** A raster whose values cannot play the part they were given. */
export class LayerValuesError extends Error implements Refusal {
  override name = 'LayerValuesError';
  readonly code = 'raster-values';
  readonly found: string;
  readonly expected: string;
  readonly remedy: string;
  constructor({ found, expected, remedy }: { found: string; expected: string; remedy: string }) {
    super(`Found ${found}; expected ${expected}. ${remedy}`);
    this.found = found;
    this.expected = expected;
    this.remedy = remedy;
  }
}

/**
 * Reads and checks an uploaded GeoTIFF for its part and writes its decoded values to `valuesPath`.
 * @throws RasterError what is wrong with the file or its grid
 * @throws LayerValuesError what is wrong with its values
 */
export async function readLayer(task: ReadLayerTask): Promise<TaskResults['read-layer']> {
  const raster = await withFileSource(task.path, (source) => readRaster(source, { cells: task.cells }));
  if (task.grid) validateOnGrid(raster, task.grid);
  const { unit, ...summary } = summarise(raster);
  const { grid, crsName, dataType, noData, values } = raster;
  const facts = { dataType, crsName, noData, ...summary };
  const complaint = valueComplaint(task.part, facts, unit);
  if (complaint) throw new LayerValuesError(complaint);
  const { width, height } = grid;
  const written = await writeHashed(task.valuesPath, encodeCellValues({ width, height, values }));
  return { grid, facts, unit, values: written };
}

/** Writes a fresh file and says what it is called in the blob store. */
export async function writeHashed(path: string, bytes: Uint8Array): Promise<WrittenFile> {
  await writeFile(path, bytes, { flag: 'wx' });
  return { hash: createHash('sha256').update(bytes).digest('hex'), bytes: bytes.length };
}
