import { In, IsNull } from 'typeorm';
import type { Manager } from '#server/database/manager.ts';
import { UploadEntity, type UploadRow } from '#server/database/entities/upload.ts';

export const findUpload = (manager: Manager, id: string): Promise<UploadRow | null> =>
  manager.findOneBy(UploadEntity, { id });

/** An upload of a team; null for another team's. */
export const findTeamUpload = (manager: Manager, teamId: string, id: string): Promise<UploadRow | null> =>
  manager.findOneBy(UploadEntity, { id, teamId });

/** Oldest first. @param siteId null for those that have no site yet */
export const uploadsOf = (manager: Manager, teamId: string, siteId: string | null): Promise<UploadRow[]> =>
  manager.find(UploadEntity, {
    where: { teamId, siteId: siteId ?? IsNull() },
    order: { uploadedAt: 'ASC', id: 'ASC' },
  });

export const countUploads = (manager: Manager, teamId: string): Promise<number> =>
  manager.countBy(UploadEntity, { teamId });

/** Those whose work is to be begun or taken up again, oldest first. */
export const unfinishedUploads = (manager: Manager): Promise<UploadRow[]> =>
  manager.find(UploadEntity, {
    where: { state: In(['reading', 'aligning']) },
    order: { uploadedAt: 'ASC', id: 'ASC' },
  });

export async function insertUpload(manager: Manager, row: UploadRow): Promise<void> {
  await manager.insert(UploadEntity, row);
}

export async function updateUpload(manager: Manager, id: string, change: Partial<UploadRow>): Promise<void> {
  await manager.update(UploadEntity, { id }, change);
}

export async function deleteUploadRow(manager: Manager, id: string): Promise<void> {
  await manager.delete(UploadEntity, { id });
}
