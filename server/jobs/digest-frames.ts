import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import type { DigestTask } from './raster-tasks.ts';

/** SHA-256 (hexadecimal) over the cells of all frames in the given order, one frame in memory at a time. */
export async function digestFrames({ paths, cells }: DigestTask): Promise<string> {
  const hash = createHash('sha256');
  for (const path of paths) hash.update(decodeCellValues(await readFile(path), { cells }).values);
  return hash.digest('hex');
}
