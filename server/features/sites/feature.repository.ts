import { FeatureImportEntity, type FeatureImportRow } from '#server/database/entities/feature-import.ts';
import { FeatureEntity, type FeatureRow } from '#server/database/entities/feature.ts';
import type { Manager } from '#server/database/manager.ts';

/** Oldest first. */
export const importRows = (manager: Manager, siteId: string): Promise<FeatureImportRow[]> =>
  manager.find(FeatureImportEntity, { where: { siteId }, order: { importedAt: 'ASC', id: 'ASC' } });

export const featureRows = (manager: Manager, siteId: string): Promise<FeatureRow[]> =>
  manager.find(FeatureEntity, { where: { siteId }, order: { row: 'ASC', id: 'ASC' } });
