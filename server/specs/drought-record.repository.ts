import { IsNull } from 'typeorm';
import { DroughtRecordEntity, type DroughtRecordRow } from '#server/database/entities/drought-record.ts';
import type { Manager } from '#server/database/manager.ts';

/** The record that a site uses. */
export const recordInUse = (manager: Manager, siteId: string): Promise<DroughtRecordRow | null> =>
  manager.findOneBy(DroughtRecordEntity, { siteId, replacedAt: IsNull() });

/** The one in use first, then the newest. */
export const recordsOf = (manager: Manager, siteId: string): Promise<DroughtRecordRow[]> =>
  manager.find(DroughtRecordEntity, {
    where: { siteId },
    order: { replacedAt: { direction: 'DESC', nulls: 'FIRST' }, uploadedAt: 'DESC' },
  });

/** Stores a record in place of the one in use, which is kept as replaced. */
export async function insertRecord(manager: Manager, row: DroughtRecordRow): Promise<void> {
  const { siteId, uploadedAt } = row;
  await manager.update(DroughtRecordEntity, { siteId, replacedAt: IsNull() }, { replacedAt: uploadedAt });
  await manager.insert(DroughtRecordEntity, row);
}

/** @returns whether the site had it */
export async function deleteRecordRow(manager: Manager, siteId: string, id: string): Promise<boolean> {
  const found = await manager.findOneBy(DroughtRecordEntity, { id, siteId });
  if (found) await manager.delete(DroughtRecordEntity, { id });
  return found !== null;
}
