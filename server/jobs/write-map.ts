import { readFile } from 'node:fs/promises';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { closingBandName } from '#sim-core/measure/closing.ts';
import type { WriteMapTask, WrittenFile } from './raster-tasks.ts';
import { writeHashed } from './read-layer.ts';

/** Closing year of a cell that cannot hold the plant. */
const cannotGrow = -32_768;
/** Cover of such a cell in a GeoTIFF; where the closing years are not stored nobody knows it, and it is 0. */
const noCover = -9999;

/**
 * Writes a map of a run as GeoTIFF to `outPath`. Cover is Float32, the stored k/255 as a share 0..1; closing years are
 * Int16, with 0 for cells that are open at the horizon. Where the plant cannot grow there is no data.
 */
export async function writeMap(task: WriteMapTask): Promise<WrittenFile> {
  const { grid, title, note } = task;
  const stored = await readCells(task.path, grid);
  const facts = { TITLE: title, SOFTWARE: 'Foothold', NOTE: note };
  if (task.map === 'closing')
    return writeHashed(
      task.outPath,
      encodeGeoTiff({
        grid,
        values: stored,
        noData: cannotGrow,
        bandName: closingBandName,
        unit: 'year',
        facts,
      }),
    );
  const closing = task.closingPath === null ? undefined : await readCells(task.closingPath, grid);
  const values = new Float32Array(stored.length);
  for (let i = 0; i < values.length; i++) values[i] = closing?.[i] === cannotGrow ? noCover : stored[i] / 255;
  return writeHashed(
    task.outPath,
    encodeGeoTiff({ grid, values, noData: noCover, bandName: 'cover', unit: 'share', facts }),
  );
}

const readCells = async (path: string, { width, height }: Grid) =>
  decodeCellValues(await readFile(path), { cells: width * height }).values;
