import type { Site } from '#contract/sites.ts';
import type { LayerRow } from '#server/database/entities/layer.ts';
import type { Manager } from '#server/database/manager.ts';
import { notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { gridDifferences } from '#sim-core/grid/grid.ts';
import { layerReply } from './layer-reply.ts';
import { findLayer, findLayerOfPart, updateLayer } from './layer.repository.ts';
import { siteReply } from './site-reply.ts';
import { startUpload, uploadRowOf } from './uploads/upload.service.ts';
import { insertUpload } from './uploads/upload.repository.ts';

/**
 * Lets a layer of the history play its part again; the one that stands becomes history. One from an earlier grid is
 * aligned anew from its file, as an upload that is placed by itself.
 * @throws ProblemError `not-found`; `conflict` when it stands already
 */
export async function putLayerBack(services: Services, siteId: string, layerId: string): Promise<Site> {
  const now = services.clock().toISOString();
  const { site, upload } = await services.write(async (manager) => {
    const row = await findLayer(manager, siteId, layerId);
    if (!row) throw notFound();
    if (row.replacedAt === null)
      throw new ProblemError('conflict', `This layer plays ${row.part} now; there is nothing to put back.`);
    const { teamId, grid } = await siteReply(manager, siteId);
    if (gridDifferences(layerReply(row).grid, grid).length > 0)
      return { upload: await alignAnew(manager, teamId, row), site: await siteReply(manager, siteId) };
    const present = await findLayerOfPart(manager, row);
    if (present) await updateLayer(manager, present.id, { replacedAt: now });
    await updateLayer(manager, layerId, { replacedAt: null });
    return { upload: undefined, site: await siteReply(manager, siteId) };
  });
  if (upload) startUpload(services, upload);
  return site;
}

/** Asks for the layer's file to be placed as it was; returns the id of the upload. */
async function alignAnew(manager: Manager, teamId: string, row: LayerRow): Promise<string> {
  const { part, year, unit, vertical, note, source } = layerReply(row);
  const upload = uploadRowOf(
    {
      teamId,
      siteId: row.siteId,
      fileName: row.fileName,
      hash: row.sourceHash,
      bytes: row.sourceBytes,
      uploadedAt: row.uploadedAt,
      uploadedBy: row.uploadedBy,
      place: 'always',
    },
    { part, band: source.band, method: null, unit, vertical, year, grid: null, note },
    row.id,
  );
  await insertUpload(manager, upload);
  return upload.id;
}
