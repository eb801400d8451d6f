import { In } from 'typeorm';
import { ComparisonEntity, type ComparisonRow } from '#server/database/entities/comparison.ts';
import {
  ComparisonEventEntity,
  ComparisonLayerEntity,
  EnsembleMapEntity,
  ReplicateEntity,
  type ComparisonEventRow,
  type EnsembleAddress,
  type EnsembleMapRow,
  type ReplicateRow,
} from '#server/database/entities/comparison-parts.ts';
import { OptionEntity, type OptionRow } from '#server/database/entities/option.ts';
import { SiteEntity, type SiteRow } from '#server/database/entities/site.ts';
import type { Manager } from '#server/database/manager.ts';

export const findSite = (manager: Manager, id: string): Promise<SiteRow | null> =>
  manager.findOneBy(SiteEntity, { id });

export const optionsOf = (manager: Manager, siteId: string, ids: readonly string[]): Promise<OptionRow[]> =>
  manager.findBy(OptionEntity, { siteId, id: In([...ids]) });

export const findComparison = (manager: Manager, siteId: string, id: string): Promise<ComparisonRow | null> =>
  manager.findOneBy(ComparisonEntity, { id, siteId });

export async function insertComparison(
  manager: Manager,
  row: ComparisonRow,
  layers: Iterable<string>,
): Promise<void> {
  await manager.insert(ComparisonEntity, row);
  for (const hash of new Set(layers))
    await manager.insert(ComparisonLayerEntity, { comparisonId: row.id, hash });
}

export async function updateComparison(
  manager: Manager,
  id: string,
  change: Partial<ComparisonRow>,
): Promise<void> {
  await manager.update(ComparisonEntity, { id }, change);
}

/** Deletes a comparison with all that belongs to it. Returns the hashes of the blobs that it referred to. */
export async function deleteComparisonRows(manager: Manager, id: string): Promise<string[]> {
  const maps = await mapsOf(manager, id);
  await manager.delete(ComparisonEntity, { id });
  return maps.map((map) => map.hash);
}

/** Newest first. */
export const comparisonsOfSite = (
  manager: Manager,
  siteId: string,
  { offset, limit }: { offset: number; limit: number },
): Promise<[ComparisonRow[], number]> =>
  manager.findAndCount(ComparisonEntity, {
    where: { siteId },
    order: { startedAt: 'DESC', id: 'DESC' },
    skip: offset,
    take: limit,
  });

/** Hashes of the rasters that a comparison stands on. */
export const layerHashesOf = async (manager: Manager, comparisonId: string): Promise<string[]> =>
  (await manager.findBy(ComparisonLayerEntity, { comparisonId })).map(({ hash }) => hash);

/** Replicates that are stored, by ensemble that has any. */
export async function countReplicates(
  manager: Manager,
  comparisonIds: readonly string[],
): Promise<(EnsembleAddress & { done: number })[]> {
  const counts = await manager
    .createQueryBuilder(ReplicateEntity, 'r')
    .select([
      'r.comparisonId AS comparisonId',
      'r.option AS option',
      'r.outlook AS outlook',
      'COUNT(*) AS done',
    ])
    .where('r.comparisonId IN (:...ids)', { ids: comparisonIds.length > 0 ? comparisonIds : [''] })
    .groupBy('r.comparisonId, r.option, r.outlook')
    .getRawMany<EnsembleAddress & { done: number }>();
  return counts.map((count) => ({ ...count, done: Number(count.done) }));
}

/** Of these replicates of an ensemble, those that are stored. */
export const storedReplicates = (
  manager: Manager,
  address: EnsembleAddress,
  replicates: readonly number[],
): Promise<ReplicateRow[]> => manager.findBy(ReplicateEntity, { ...address, replicate: In([...replicates]) });

export async function insertReplicates(manager: Manager, rows: ReplicateRow[]): Promise<void> {
  if (rows.length > 0) await manager.insert(ReplicateEntity, rows);
}

/** Ascending. */
export const replicatesOf = (
  manager: Manager,
  address: EnsembleAddress,
  { offset, limit }: { offset: number; limit: number },
): Promise<[ReplicateRow[], number]> =>
  manager.findAndCount(ReplicateEntity, {
    where: { ...address },
    order: { replicate: 'ASC' },
    skip: offset,
    take: limit,
  });

export const mapsOf = (manager: Manager, comparisonId: string): Promise<EnsembleMapRow[]> =>
  manager.findBy(EnsembleMapEntity, { comparisonId });

export const findMap = (
  manager: Manager,
  address: EnsembleAddress,
  map: string,
): Promise<EnsembleMapRow | null> => manager.findOneBy(EnsembleMapEntity, { ...address, map });

export async function putMapRow(manager: Manager, row: EnsembleMapRow): Promise<void> {
  await manager.upsert(EnsembleMapEntity, row, ['comparisonId', 'option', 'outlook', 'map']);
}

/** What a copy takes over from its original. */
export async function copyParts(manager: Manager, from: string, to: string): Promise<void> {
  for (const [table, columns] of [
    ['replicate', '"option", "outlook", "replicate", "digest", "record"'],
    ['ensemble_map', '"option", "outlook", "map", "hash", "bytes", "replicates"'],
    ['study_run', '"option", "outlook", "key", "place", "digest", "run"'],
  ])
    await manager.query(
      `INSERT INTO "${table}" ("comparisonId", ${columns}) SELECT ?, ${columns} FROM "${table}" WHERE "comparisonId" = ?`,
      [to, from],
    );
}

/** Oldest first. */
export const eventsOf = (manager: Manager, comparisonId: string): Promise<ComparisonEventRow[]> =>
  manager.find(ComparisonEventEntity, { where: { comparisonId }, order: { place: 'ASC' } });

/** Writes down what happened; nothing ever changes or deletes it but the end of its comparison. */
export async function addEvent(
  manager: Manager,
  comparisonId: string,
  event: { at: string; by: string; what: string },
): Promise<void> {
  const place = await manager.countBy(ComparisonEventEntity, { comparisonId });
  await manager.insert(ComparisonEventEntity, { comparisonId, place, ...event });
}
