import { In } from 'typeorm';
import type { Manager } from '#server/database/manager.ts';
import {
  OptionDrawingEntity,
  OptionRevisionEntity,
  type OptionDrawingRow,
  type OptionRevisionRow,
} from '#server/database/entities/option-revision.ts';

/** Newest first. */
export const revisionsOf = (manager: Manager, optionId: string): Promise<OptionRevisionRow[]> =>
  manager.find(OptionRevisionEntity, { where: { optionId }, order: { revision: 'DESC' } });

export const findRevision = (
  manager: Manager,
  optionId: string,
  revision: number,
): Promise<OptionRevisionRow | null> => manager.findOneBy(OptionRevisionEntity, { optionId, revision });

export const findDrawing = (
  manager: Manager,
  optionId: string,
  hash: string,
): Promise<OptionDrawingRow | null> => manager.findOneBy(OptionDrawingEntity, { optionId, hash });

/** The drawings of an option that are kept, with their sizes in bytes, without their bodies. */
export const drawingSizes = (
  manager: Manager,
  optionId: string,
): Promise<{ hash: string; bytes: number }[]> =>
  manager
    .createQueryBuilder(OptionDrawingEntity, 'drawing')
    .select('drawing.hash', 'hash')
    .addSelect('LENGTH(drawing.body)', 'bytes')
    .where('drawing.optionId = :optionId', { optionId })
    .getRawMany();

export async function insertRevision(manager: Manager, row: OptionRevisionRow): Promise<void> {
  await manager.insert(OptionRevisionEntity, row);
}

export async function insertDrawing(manager: Manager, row: OptionDrawingRow): Promise<void> {
  await manager.insert(OptionDrawingEntity, row);
}

export async function deleteDrawings(
  manager: Manager,
  optionId: string,
  hashes: readonly string[],
): Promise<void> {
  for (let i = 0; i < hashes.length; i += 500)
    await manager.delete(OptionDrawingEntity, { optionId, hash: In(hashes.slice(i, i + 500)) });
}
