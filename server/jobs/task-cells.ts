import { readTiffDirectory } from '#rasters/read/tiff-directory.ts';
import { claimedCells, largestSource } from '#rasters/read/tiff-layout.ts';
import { withFileSource } from '../files/file-source.ts';
import { resamples } from '#sim-core/compare/paired-difference.ts';
import type { RasterTask } from './raster-tasks.ts';

/** Cells as the header claims them; what has none is refused by the worker at once. */
const cellsOfFile = (path: string): Promise<number> =>
  withFileSource(path, async (source) => claimedCells(await readTiffDirectory(source))).catch(() => 0);

/** How many cells a task goes through, at most: what the time it may take is measured by. */
export async function taskCells(task: RasterTask): Promise<number> {
  switch (task.kind) {
    case 'read-layer':
      return Math.min(await cellsOfFile(task.path), task.cells);
    case 'survey':
      return Math.min(await cellsOfFile(task.path), largestSource.cells);
    case 'place':
      // Cells that are calculated take a few times as long as those that are read, and are packed twice.
      return (
        Math.min(await cellsOfFile(task.path), largestSource.cells) + 4 * task.grid.width * task.grid.height
      );
    case 'write-map':
      return task.grid.width * task.grid.height;
    case 'digest':
      return task.paths.length * task.cells;
    case 'brief-facts': {
      // Bootstraps of pairs take most of it: their resamples are counted as if they were cells.
      const { plan, records, grid } = task.source;
      const pairs = (plan.options.length * (plan.options.length - 1) * plan.outlooks.length) / 2;
      const futures = Math.max(...records.flat().map((stored) => stored.length));
      return task.maps.length * grid.width * grid.height + pairs * resamples * futures;
    }
    case 'write-brief':
      return 0;
  }
}
