import type { LayerHistoryEntry, LayerPart } from '#contract/layers.ts';
import type { LayerDependents } from '#contract/ground.ts';
import type { Site } from '#contract/sites.ts';
import type { LayerRow } from '#server/database/entities/layer.ts';
import type { Manager } from '#server/database/manager.ts';
import { releaseBlobs } from '#server/files/stored-files.ts';
import { notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { layerReply } from './layer-reply.ts';
import {
  deleteLayerRow,
  findLayer,
  hasTwin,
  layersOfPart,
  comparisonsOnRaster,
  fitsOnRaster,
  runsOnRaster,
  updateLayer,
} from './layer.repository.ts';
import { siteReply } from './site-reply.ts';

/** The blobs that a layer's row refers to. */
export const blobsOfLayer = (layer: LayerRow): string[] => [layer.hash, layer.valuesHash, layer.sourceHash];

/** The layers that play or have played a part, the one that stands first. */
export async function layerHistory(
  manager: Manager,
  siteId: string,
  part: LayerPart,
): Promise<LayerHistoryEntry[]> {
  const entries: LayerHistoryEntry[] = [];
  for (const row of await layersOfPart(manager, siteId, part)) {
    const { runs } = await runsOnRaster(manager, siteId, row.hash);
    entries.push({ layer: layerReply(row), replacedAt: row.replacedAt, runs });
  }
  return entries;
}

const without: Record<LayerPart, string> = {
  habitat: 'Without habitat nothing says where the plant can grow: no run can start.',
  cover: 'Without cover nothing says what stands now: no run can start.',
  resurvey: 'Fits that were made to it keep what they came to; it can no longer be chosen for a new one.',
  elevation: 'Curves of elevation have nothing to act on without it; they stay as they are.',
  exposure: 'Without exposure the ground counts as sheltered, or as the curve of elevation says.',
  refuge: 'Without refuge only the surveyed points and areas and the works of an option shelter survivors.',
  allowed: 'Without it, works may go wherever the surveyed areas allow, or anywhere.',
};

/** What would be felt if a layer went. @throws ProblemError `not-found` */
export async function layerDependents(
  manager: Manager,
  siteId: string,
  layerId: string,
): Promise<LayerDependents> {
  const row = await findLayer(manager, siteId, layerId);
  if (!row) throw notFound();
  const { runs, runNames } = await runsOnRaster(manager, siteId, row.hash);
  const comparisons = await comparisonsOnRaster(manager, siteId, row.hash);
  const consequences: string[] = [];
  if (row.replacedAt === null) {
    const { part, classes } = layerReply(row);
    consequences.push(without[part]);
    if (classes) consequences.push(`Its class table of ${classes.length} classes goes with it.`);
    consequences.push('It stays in the history of its part and can be put back.');
  } else consequences.push('It goes for good, and so does its file unless another layer was made from it.');
  return { runs, runNames, comparisons, consequences };
}

/**
 * Takes a layer off a site, which leaves it in its part's history; or, one of the history, out of that.
 * @throws ProblemError `not-found`; `conflict` while runs or comparisons stand on one of the history
 */
export async function deleteLayer(services: Services, siteId: string, layerId: string): Promise<Site> {
  const { site, freed } = await services.write(async (manager) => {
    const row = await findLayer(manager, siteId, layerId);
    if (!row) throw notFound();
    if (row.replacedAt === null)
      await updateLayer(manager, layerId, { replacedAt: services.clock().toISOString() });
    else await forgetLayer(manager, row);
    return {
      site: await siteReply(manager, siteId),
      freed: row.replacedAt === null ? [] : blobsOfLayer(row),
    };
  });
  await releaseBlobs(services, freed);
  return site;
}

async function forgetLayer(manager: Manager, row: LayerRow): Promise<void> {
  // The same raster may be there twice; then nothing is lost.
  if (await hasTwin(manager, row)) return deleteLayerRow(manager, row.id);
  const comparisons = await comparisonsOnRaster(manager, row.siteId, row.hash);
  if (comparisons > 0)
    throw new ProblemError(
      'conflict',
      `Found ${comparisons} ${comparisons === 1 ? 'comparison that stands' : 'comparisons that stand'} on this layer; ` +
        'they could not be resumed or run again without it. Keep the layer, or delete the comparisons on which nothing was decided first.',
    );
  const fits = await fitsOnRaster(manager, row.siteId, row.hash);
  if (fits > 0)
    throw new ProblemError(
      'conflict',
      `Found ${fits} ${fits === 1 ? 'fit that stands' : 'fits that stand'} on this layer; what they came to could not be looked at without it. Keep the layer, or delete the fits first.`,
    );
  const { runs, runNames } = await runsOnRaster(manager, row.siteId, row.hash);
  if (runs > 0)
    throw new ProblemError(
      'conflict',
      `Found ${runs} ${runs === 1 ? 'run that stands' : 'runs that stand'} on this layer (“${runNames[0]}”${runs > 1 ? ' and others' : ''}); ` +
        'they could not be replayed without it. Delete the runs first, or keep the layer.',
    );
  await deleteLayerRow(manager, row.id);
}
