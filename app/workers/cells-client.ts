import { proxy, releaseProxy, wrap, type Remote } from 'comlink';
import type { CellArray, CellLimits } from '#rasters/cells/cell-header.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { LayerSource, LayerSources } from '#sim-core/spec/run-spec.ts';
import type { CellsFace } from './cells-face.ts';
import type { EngineGround } from './engine-ground.ts';
import type { PackedLayers } from './run-loop.ts';

/** The worker died, or what it sent could not be read. */
export class CellsWorkerDied extends Error {
  override name = 'CellsWorkerDied';
}

/**
 * Work on whole rasters off the page's thread, from their cell-values binaries. Refusals
 * come with the name and the message that they have there: CellValuesError, ShareError, RunProblem.
 */
export interface CellsClient {
  unpack(packed: Blob, limits: CellLimits): Promise<CellArray>;
  /** round(255 × share) of every cell, from one source of the ground */
  sourceBytes(layers: PackedLayers, source: LayerSource, grid: Grid): Promise<Uint8Array>;
  /** the whole ground, as a run would start from it; it is left (GroundLeft) where the signal says so */
  engineGround(
    layers: PackedLayers,
    sources: LayerSources,
    grid: Grid,
    watch?: { readonly onProgress?: (share: number) => void; readonly signal?: AbortSignal },
  ): Promise<EngineGround>;
  /** the same from afar and soon: maps of the whole grid in which one cell stands for its neighbours */
  coarseGround(
    layers: PackedLayers,
    sources: LayerSources,
    grid: Grid,
    parts: readonly (keyof LayerSources)[],
  ): Promise<Partial<Record<keyof LayerSources, Uint8Array>>>;
}

const startWorker = () =>
  new Worker(new URL('./cells-worker.ts', import.meta.url), { type: 'module', name: 'cells' });

/** One worker, started when it is first needed and again after it died. */
export function createCellsClient(createWorker: () => Worker = startWorker): CellsClient {
  let current: { remote: Remote<CellsFace>; failed: Promise<never> } | undefined;

  function start() {
    const worker = createWorker();
    const remote = wrap<CellsFace>(worker);
    const failed = new Promise<never>((_, reject) => {
      const died = (event: Event) => {
        current = undefined;
        remote[releaseProxy]();
        worker.terminate();
        const { message } = event as Partial<ErrorEvent>;
        reject(
          new CellsWorkerDied(`The map’s worker stopped: ${message || 'it could not be loaded or read'}`),
        );
      };
      worker.addEventListener('error', died);
      worker.addEventListener('messageerror', died);
    });
    // It is raced below; this keeps a death that nobody waits on from counting as unhandled.
    failed.catch(() => undefined);
    return { remote, failed };
  }

  function ask<T>(call: (remote: Remote<CellsFace>) => Promise<T>): Promise<T> {
    const { remote, failed } = (current ??= start());
    return Promise.race([call(remote), failed]);
  }

  return {
    unpack: (...input) => ask((remote) => remote.unpack(...input)),
    sourceBytes: (...input) => ask((remote) => remote.sourceBytes(...input)),
    engineGround: (layers, sources, grid, { onProgress, signal } = {}) =>
      ask((remote) =>
        remote.engineGround(
          layers,
          sources,
          grid,
          proxy((share: number) => {
            const wanted = !signal?.aborted;
            if (wanted) onProgress?.(share);
            return wanted;
          }),
        ),
      ),
    coarseGround: (...input) => ask((remote) => remote.coarseGround(...input)),
  };
}

/** The one that the pages share. */
export const cells = createCellsClient();
