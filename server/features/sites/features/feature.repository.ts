import { FeatureImportEntity, type FeatureImportRow } from '#server/database/entities/feature-import.ts';
import { FeatureEntity, type FeatureRow } from '#server/database/entities/feature.ts';
import type { Manager } from '#server/database/manager.ts';

/** Oldest first. */
export const importRows = (manager: Manager, siteId: string): Promise<FeatureImportRow[]> =>
  manager.find(FeatureImportEntity, { where: { siteId }, order: { importedAt: 'ASC', id: 'ASC' } });

export const featureRows = (manager: Manager, siteId: string): Promise<FeatureRow[]> =>
  manager.find(FeatureEntity, { where: { siteId }, order: { row: 'ASC', id: 'ASC' } });

export const findFeature = (manager: Manager, siteId: string, id: string): Promise<FeatureRow | null> =>
  manager.findOneBy(FeatureEntity, { id, siteId });

export const findImport = (manager: Manager, siteId: string, id: string): Promise<FeatureImportRow | null> =>
  manager.findOneBy(FeatureImportEntity, { id, siteId });

/** A file with the features that came with it. */
export async function insertImport(
  manager: Manager,
  row: FeatureImportRow,
  features: FeatureRow[],
): Promise<void> {
  await manager.insert(FeatureImportEntity, row);
  // SQLite takes so many values in one statement; nine columns a row.
  for (let from = 0; from < features.length; from += 500)
    await manager.insert(FeatureEntity, features.slice(from, from + 500));
}

export async function updateFeature(
  manager: Manager,
  id: string,
  change: Partial<FeatureRow>,
): Promise<void> {
  await manager.update(FeatureEntity, { id }, change);
}

export async function deleteFeatureRow(manager: Manager, id: string): Promise<void> {
  await manager.delete(FeatureEntity, { id });
}

/** Its features go with it. */
export async function deleteImportRow(manager: Manager, id: string): Promise<void> {
  await manager.delete(FeatureImportEntity, { id });
}
