import { readTiffDirectory } from '#rasters/read/tiff-directory.ts';
import { claimedCells } from '#rasters/read/tiff-layout.ts';
import { withFileSource } from '../files/file-source.ts';
import type { RasterTask } from './raster-tasks.ts';

/** How many cells a task goes through, at most: what the time it may take is measured by. */
export async function taskCells(task: RasterTask): Promise<number> {
  switch (task.kind) {
    case 'read-layer': {
      const claimed = await withFileSource(task.path, async (source) =>
        claimedCells(await readTiffDirectory(source)),
      ).catch(() => 0); // What has no header is refused by the worker at once.
      return Math.min(claimed, task.cells);
    }
    case 'write-map':
      return task.grid.width * task.grid.height;
    case 'digest':
      return task.paths.length * task.cells;
  }
}
