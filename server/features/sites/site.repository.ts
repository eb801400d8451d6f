import { In, IsNull } from 'typeorm';
import type { Manager } from '#server/database/manager.ts';
import { EnsembleMapEntity } from '#server/database/entities/comparison-parts.ts';
import { LayerEntity } from '#server/database/entities/layer.ts';
import { OptionEntity, type OptionRow } from '#server/database/entities/option.ts';
import { RunFrameEntity } from '#server/database/entities/run-frame.ts';
import { RunEntity } from '#server/database/entities/run.ts';
import { FeatureImportEntity } from '#server/database/entities/feature-import.ts';
import { UploadEntity } from '#server/database/entities/upload.ts';
import { SiteEntity, type SiteRow } from '#server/database/entities/site.ts';

export const findSite = (manager: Manager, id: string): Promise<SiteRow | null> =>
  manager.findOneBy(SiteEntity, { id });

/** Oldest first, so that a list keeps its order. */
export const sitesOfTeam = (manager: Manager, teamId: string): Promise<SiteRow[]> =>
  manager.find(SiteEntity, { where: { teamId }, order: { createdAt: 'ASC', id: 'ASC' } });

/** A site with the option that does nothing. */
export async function insertSite(manager: Manager, rows: { site: SiteRow; wait: OptionRow }): Promise<void> {
  await manager.insert(SiteEntity, rows.site);
  await manager.insert(OptionEntity, rows.wait);
}

export async function updateSite(manager: Manager, id: string, change: Partial<SiteRow>): Promise<void> {
  await manager.update(SiteEntity, { id }, change);
}

/** Deletes a site with all rows that belong to it. Returns the hashes of the blobs that they referred to. */
export async function deleteSiteRows(manager: Manager, id: string): Promise<string[]> {
  const layers = await manager.find(LayerEntity, { where: { siteId: id } });
  const runs = await manager.find(RunEntity, {
    where: { siteId: id },
    select: { id: true, closingHash: true },
  });
  const hashes = layers.flatMap((layer) => [layer.hash, layer.valuesHash, layer.sourceHash]);
  for (const { hash, thumbnailHash } of await manager.findBy(UploadEntity, { siteId: id }))
    hashes.push(hash, ...(thumbnailHash ? [thumbnailHash] : []));
  for (const { hash } of await manager.findBy(FeatureImportEntity, { siteId: id })) hashes.push(hash);
  for (const run of runs) {
    const frames = await manager.findBy(RunFrameEntity, { runId: run.id });
    hashes.push(...frames.map((frame) => frame.hash), ...(run.closingHash ? [run.closingHash] : []));
  }
  const maps = await manager
    .createQueryBuilder(EnsembleMapEntity, 'map')
    .where(`"map"."comparisonId" IN (SELECT "id" FROM "comparison" WHERE "siteId" = :id)`, { id })
    .getMany();
  hashes.push(...maps.map((map) => map.hash));
  await manager.delete(SiteEntity, { id });
  return hashes;
}

export interface SiteCounts {
  parts: string[];
  /** without those in the archive */
  options: number;
  runs: number;
}

/** What stands on each of the sites. */
export async function countsOfSites(
  manager: Manager,
  siteIds: readonly string[],
): Promise<Map<string, SiteCounts>> {
  const counts = new Map(siteIds.map((id): [string, SiteCounts] => [id, { parts: [], options: 0, runs: 0 }]));
  const siteId = In([...siteIds]);
  const layers = await manager.find(LayerEntity, {
    where: { siteId, replacedAt: IsNull() },
    select: { siteId: true, part: true },
  });
  for (const layer of layers) counts.get(layer.siteId)?.parts.push(layer.part);
  for (const [entity, key] of [
    [OptionEntity, 'options'],
    [RunEntity, 'runs'],
  ] as const)
    for (const row of await countBySite(manager, entity, siteIds)) {
      const site = counts.get(row.siteId);
      if (site) site[key] = Number(row.count);
    }
  return counts;
}

const countBySite = (
  manager: Manager,
  entity: typeof OptionEntity | typeof RunEntity,
  siteIds: readonly string[],
) =>
  manager
    .createQueryBuilder(entity.options.name, 'row')
    .select('row.siteId', 'siteId')
    .addSelect('COUNT(*)', 'count')
    .where(`row.siteId IN (:...siteIds)${entity === OptionEntity ? ' AND row.archived = 0' : ''}`, {
      siteIds: siteIds.length ? siteIds : [''],
    })
    .groupBy('row.siteId')
    .getRawMany<{ siteId: string; count: number }>();
