import { inspectRaster } from '#rasters/describe/inspect-raster.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { maximumCells } from '#sim-core/spec/limits.ts';
import type { LayerFacts, LayerPart, ValueUnit } from '#contract/layers.ts';
import type { ReceivedFile } from '#server/files/blob-store.ts';
import { withFileSource } from '#server/files/file-source.ts';
import { fieldProblem } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { heightsOf } from './uploads/plan-upload.ts';

/** A raster as it came in: the file, its name for show, and who sent it. */
export interface ArrivedRaster {
  part: LayerPart;
  /** of a resurvey */
  year?: number | undefined;
  file: ReceivedFile;
  fileName: string;
  /** the name of whoever sent it */
  by: string;
}

export interface ReadRaster {
  grid: Grid;
  facts: LayerFacts;
  /** what the values most likely are; meaningless for `habitat` */
  unit: ValueUnit;
  /** the decoded values, an arrival that waits to be kept */
  values: ReceivedFile;
}

/**
 * Has an uploaded file read and checked by the worker. When it is refused, the file and what was made of it are removed.
 * @param grid the site's, when there is a site already: the raster must lie on it
 * @throws ProblemError what is wrong with the raster
 */
export async function readRasterFile(
  services: Services,
  file: ReceivedFile,
  part: LayerPart,
  grid?: Grid,
): Promise<ReadRaster> {
  const valuesPath = services.blobs.reserve();
  try {
    const { values, ...read } = await services.rasters.run({
      kind: 'read-layer',
      path: file.path,
      valuesPath,
      part,
      grid: grid ?? null,
      cells: maximumCells,
    });
    if (part === 'elevation') await refuseFeet(file);
    return { ...read, values: { path: valuesPath, ...values } };
  } catch (error) {
    await services.blobs.discard(file);
    await services.blobs.discard({ path: valuesPath });
    throw error;
  }
}

/** One call has no place to say what heights are in. @throws ProblemError at `file` where it suggests feet */
async function refuseFeet(file: ReceivedFile): Promise<void> {
  const description = await withFileSource(file.path, (source) => inspectRaster(source));
  const heights = heightsOf({ description, band: 1 });
  if (heights && heights.unit !== 'metre')
    throw fieldProblem(
      'file',
      `Its heights seem to be in feet (${heights.because}); expected metres. Send it as an upload, and say there what its heights are in`,
    );
}
