import { In } from 'typeorm';
import { gridSchema } from '#contract/grid.ts';
import { gridDifferences } from '#sim-core/grid/grid.ts';
import { readJson } from '#server/database/json-column.ts';
import { SiteEntity } from '#server/database/entities/site.ts';
import { LayerEntity } from '#server/database/entities/layer.ts';
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
