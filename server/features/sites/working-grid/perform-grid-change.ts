import { randomUUID } from 'node:crypto';
import { gridSchema } from '#contract/grid.ts';
import { layerPartSchema, storedSourceSchema, valueUnitSchema } from '#contract/layers.ts';
import { gridOf } from '#server/database/site-grid.ts';
import type { GridChangeRow } from '#server/database/entities/grid-change.ts';
import type { LayerRow } from '#server/database/entities/layer.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { releaseBlobs, storeWithRows } from '#server/files/stored-files.ts';
import { closing } from '#server/jobs/background.ts';
import type { TaskProgress } from '#server/jobs/raster-pool.ts';
import { classifyError } from '#server/middleware/classify-error.ts';
import type { Services } from '#server/services.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { alignToGrid, type AlignedRaster } from '../align-to-grid.ts';
import { blobsOfLayer } from '../layer-history.service.ts';
import {
  currentLayers,
  fitsOnRaster,
  deleteLayerRow,
  hasTwin,
  insertLayer,
  comparisonsOnRaster,
  runsOnRaster,
  updateLayer,
} from '../layer.repository.ts';
import { findSite, updateSite } from '../site.repository.ts';
import { deleteGridChange, findGridChange, updateGridChange } from './grid-change.repository.ts';

const mostAttempts = 3;

/** Somebody stopped the change while it was worked on. */
class Overtaken extends Error {
  override name = 'Overtaken';
}

/**
 * Aligns all layers of a site anew from the files that they were made from, and lets the site take grid and layers in one
 * go. When anything fails, the site is as it was and the change says why.
 */
export async function performGridChange(
  services: Services,
  siteId: string,
  id: string,
  progress: Required<TaskProgress>,
): Promise<void> {
  const change = await findGridChange(services.dataSource.manager, siteId);
  if (change?.id !== id || change.state !== 'aligning') return;
  if (change.attempts >= mostAttempts) {
    await fail(
      services,
      change,
      'The server ended each time before it was done. Ask again when nothing else runs.',
    );
    return;
  }
  await services.write((manager) => updateGridChange(manager, change, { attempts: change.attempts + 1 }));
  try {
    while (!(await alignAll(services, change, progress)));
  } catch (error) {
    if (error instanceof Overtaken) return;
    if (progress.signal.aborted) {
      if (progress.signal.reason === closing)
        await services.write((manager) => updateGridChange(manager, change, { attempts: 0 }));
      return;
    }
    const { code, message } = classifyError(error);
    if (code === 'internal')
      services.log.error({ err: error, site: siteId }, 'a change of the grid broke off');
    await fail(services, change, code === 'internal' ? 'The work broke off. Ask again.' : message);
  }
}

const fail = (services: Services, change: GridChangeRow, problem: string): Promise<void> =>
  services.write((manager) => updateGridChange(manager, change, { state: 'failed', problem }));

/** False when the site's layers changed meanwhile, so that it has to be done again. */
async function alignAll(
  services: Services,
  change: GridChangeRow,
  { onProgress, signal }: Required<TaskProgress>,
): Promise<boolean> {
  const { siteId } = change;
  const grid = readJson(gridSchema, change.grid);
  const layers = await currentLayers(services.dataSource.manager, siteId);
  const made: AlignedRaster[] = [];
  try {
    for (const [i, layer] of layers.entries()) {
      const share = (done: number) => onProgress((i + done) / layers.length);
      made.push(await alignLayer(services, layer, grid, { onProgress: share, signal }));
    }
  } catch (error) {
    for (const file of made.flatMap(({ files }) => files)) await services.blobs.discard(file);
    throw error;
  }
  const files = made.flatMap((raster) => raster.files);
  const { done, freed } = await storeWithRows(services, files, async (manager) => {
    if ((await findGridChange(manager, siteId))?.id !== change.id) throw new Overtaken();
    const now = await currentLayers(manager, siteId);
    if (now.map(({ id }) => id).join() !== layers.map(({ id }) => id).join())
      return { done: false, freed: files.map(({ hash }) => hash) };
    await takeGrid(manager, siteId, grid);
    await deleteGridChange(manager, siteId);
    return { done: true, freed: await replaceAll(manager, now, made, services.clock().toISOString()) };
  });
  await releaseBlobs(services, freed);
  return done;
}

const alignLayer = (
  services: Services,
  layer: LayerRow,
  grid: Grid,
  progress: Required<TaskProgress>,
): Promise<AlignedRaster> =>
  alignToGrid(
    services,
    {
      source: { hash: layer.sourceHash, bytes: layer.sourceBytes },
      part: layerPartSchema.parse(layer.part),
      band: readJson(storedSourceSchema, layer.source).band,
      grid,
      method: null,
      unit: valueUnitSchema.parse(layer.unit),
    },
    progress,
  );

/** Gives the site its new cells. @throws Overtaken */
async function takeGrid(manager: Manager, siteId: string, grid: Grid): Promise<void> {
  const site = await findSite(manager, siteId);
  if (!site) throw new Overtaken();
  const finestGrid = site.finestGrid ?? JSON.stringify(gridOf(site));
  await updateSite(manager, siteId, { ...grid, finestGrid });
}

/**
 * Lets the new rasters take the place of the layers that they are. What no run or comparison stands on is forgotten: it can be made
 * again from its file. Returns the hashes of the blobs that its rows referred to.
 */
async function replaceAll(
  manager: Manager,
  layers: readonly LayerRow[],
  made: readonly AlignedRaster[],
  now: string,
): Promise<string[]> {
  const freed: string[] = [];
  for (const [i, layer] of layers.entries()) {
    const { runs } = await runsOnRaster(manager, layer.siteId, layer.hash);
    const comparisons = await comparisonsOnRaster(manager, layer.siteId, layer.hash);
    const fits = await fitsOnRaster(manager, layer.siteId, layer.hash);
    if (runs + comparisons + fits > 0 && !(await hasTwin(manager, layer)))
      await updateLayer(manager, layer.id, { replacedAt: now });
    else {
      await deleteLayerRow(manager, layer.id);
      freed.push(...blobsOfLayer(layer));
    }
    await insertLayer(manager, { ...layer, ...made[i].stored, id: randomUUID() });
  }
  return freed;
}
