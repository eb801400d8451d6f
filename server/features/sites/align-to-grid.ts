import type { LayerPart, ResamplingMethod, ValueUnit } from '#contract/layers.ts';
import type { LayerRow } from '#server/database/entities/layer.ts';
import type { ReceivedFile } from '#server/files/blob-store.ts';
import type { TaskProgress } from '#server/jobs/raster-pool.ts';
import type { Services } from '#server/services.ts';
import type { Grid } from '#sim-core/grid/grid.ts';

/** A raster on a grid, its files waiting to be kept. */
export interface AlignedRaster {
  /** what a layer's row says of it */
  stored: Pick<
    LayerRow,
    'grid' | 'hash' | 'bytes' | 'valuesHash' | 'valuesBytes' | 'source' | 'alignment' | 'facts' | 'unit'
  >;
  files: ReceivedFile[];
}

/**
 * Has a stored file brought onto a grid by the worker in the background. When it is refused or stopped, nothing of it is
 * left.
 * @throws ProblemError what is wrong with the file, its way onto the grid or its values
 */
export async function alignToGrid(
  { blobs, backgroundRasters }: Pick<Services, 'blobs' | 'backgroundRasters'>,
  wish: {
    source: { hash: string; bytes: number };
    part: LayerPart;
    band: number;
    grid: Grid;
    method: ResamplingMethod | null;
    unit: ValueUnit | null;
  },
  progress: TaskProgress,
): Promise<AlignedRaster> {
  const { source: file, ...task } = wish;
  const [rasterPath, valuesPath] = [blobs.reserve(), blobs.reserve()];
  try {
    const path = blobs.locate(file.hash);
    const placed = await backgroundRasters.run(
      { kind: 'place', path, rasterPath, valuesPath, ...task },
      progress,
    );
    const { facts, unit, source, alignment, raster, values } = placed;
    // The file as it came stands in the store already.
    const own = raster ?? file;
    return {
      stored: {
        grid: JSON.stringify(task.grid),
        hash: own.hash,
        bytes: own.bytes,
        valuesHash: values.hash,
        valuesBytes: values.bytes,
        source: JSON.stringify(source),
        alignment: JSON.stringify(alignment),
        facts: JSON.stringify(facts),
        unit,
      },
      files: [...(raster ? [{ path: rasterPath, ...raster }] : []), { path: valuesPath, ...values }],
    };
  } catch (error) {
    await Promise.all([rasterPath, valuesPath].map((path) => blobs.discard({ path })));
    throw error;
  }
}
