import type { Manager } from '#server/database/manager.ts';
import { GridChangeEntity, type GridChangeRow } from '#server/database/entities/grid-change.ts';

export const findGridChange = (manager: Manager, siteId: string): Promise<GridChangeRow | null> =>
  manager.findOneBy(GridChangeEntity, { siteId });

/** Those whose work is to be begun or taken up again, oldest first. */
export const unfinishedGridChanges = (manager: Manager): Promise<GridChangeRow[]> =>
  manager.find(GridChangeEntity, { where: { state: 'aligning' }, order: { askedAt: 'ASC' } });

/** In the place of one that failed. */
export async function putGridChange(manager: Manager, row: GridChangeRow): Promise<void> {
  await manager.delete(GridChangeEntity, { siteId: row.siteId });
  await manager.insert(GridChangeEntity, row);
}

/** Changes a row unless another has taken its place. */
export async function updateGridChange(
  manager: Manager,
  { siteId, id }: Pick<GridChangeRow, 'siteId' | 'id'>,
  change: Partial<GridChangeRow>,
): Promise<void> {
  await manager.update(GridChangeEntity, { siteId, id }, change);
}

export async function deleteGridChange(manager: Manager, siteId: string): Promise<void> {
  await manager.delete(GridChangeEntity, { siteId });
}
