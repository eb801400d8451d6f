import { In } from 'typeorm';
import { gridSchema } from '#contract/grid.ts';
import { gridDifferences } from '#sim-core/grid/grid.ts';
import { readJson } from '#server/database/json-column.ts';
import { SiteEntity } from '#server/database/entities/site.ts';
import { LayerEntity, type LayerRow } from '#server/database/entities/layer.ts';
import type { Manager } from '#server/database/manager.ts';

/** Those of `hashes` that are no layer of the site, present or replaced, on the cells that it has now. */
export async function foreignHashes(
  manager: Manager,
  siteId: string,
  hashes: readonly string[],
): Promise<Set<string>> {
  const site = await manager.findOneBy(SiteEntity, { id: siteId });
  const known = await manager.find(LayerEntity, {
    where: { siteId, hash: In([...hashes]) },
    select: { hash: true, grid: true },
  });
  const foreign = new Set(hashes);
  for (const { hash, grid } of known)
    if (site && gridDifferences(readJson(gridSchema, grid), site).length === 0) foreign.delete(hash);
  return foreign;
}

/** The layers of a site that are these rasters, present or replaced, in the order of their upload; of twins the later. */
export async function layersByHash(
  manager: Manager,
  siteId: string,
  hashes: readonly string[],
): Promise<LayerRow[]> {
  const layers = await manager.find(LayerEntity, {
    where: { siteId, hash: In([...hashes]) },
    order: { uploadedAt: 'ASC' },
  });
  return [...new Map(layers.map((layer) => [layer.hash, layer])).values()];
}
