import { readFile } from 'node:fs/promises';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { coverPrecision, coverValues, noCover } from '#server/files/cover-map.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { cannotClose, closingBandName } from '#sim-core/measure/closing.ts';
import type { WriteMapTask, WrittenFile } from './raster-tasks.ts';
import { writeHashed } from './read-layer.ts';

/**
 * Writes a map of a run as GeoTIFF to `outPath`. Cover is Float32, the stored k/255 as a share 0..1; closing years are
 * Int16, with 0 for cells that are open at the horizon. Where the plant cannot grow there is no data; in cover,
 * where the closing years are not stored, nobody knows where that is, and it is 0.
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
        noData: cannotClose,
        bandName: closingBandName,
        unit: 'year',
        facts,
      }),
    );
  const closing = task.closingPath === null ? undefined : await readCells(task.closingPath, grid);
  return writeHashed(
    task.outPath,
    encodeGeoTiff({
      grid,
      values: coverValues(stored.length, (cell) => stored[cell] / 255, closing),
      noData: noCover,
      bandName: 'cover',
      unit: 'share',
      description: coverPrecision.stored,
      facts,
    }),
  );
}

const readCells = async (path: string, { width, height }: Grid) =>
  decodeCellValues(await readFile(path), { cells: width * height }).values;
