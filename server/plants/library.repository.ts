import { In } from 'typeorm';
import {
  LibraryPlantEntity,
  PlantVersionEntity,
  type LibraryPlantRow,
  type PlantVersionRow,
} from '#server/database/entities/library-plant.ts';
import type { Manager } from '#server/database/manager.ts';

export const plantsOfTeam = (manager: Manager, teamId: string): Promise<LibraryPlantRow[]> =>
  manager.find(LibraryPlantEntity, { where: { teamId }, order: { name: 'ASC', createdAt: 'ASC' } });

/** A profile of this very team. */
export const findPlant = (manager: Manager, teamId: string, id: string): Promise<LibraryPlantRow | null> =>
  manager.findOneBy(LibraryPlantEntity, { id, teamId });

export async function insertPlant(manager: Manager, row: LibraryPlantRow): Promise<void> {
  await manager.insert(LibraryPlantEntity, row);
}

export async function updatePlant(
  manager: Manager,
  id: string,
  change: Partial<LibraryPlantRow>,
): Promise<void> {
  if (Object.keys(change).length > 0) await manager.update(LibraryPlantEntity, { id }, change);
}

/** What is known of the versions of some profiles, newest first, without the plants themselves. */
export const versionFacts = (
  manager: Manager,
  plantIds: readonly string[],
): Promise<Omit<PlantVersionRow, 'plant'>[]> =>
  manager.find(PlantVersionEntity, {
    select: { plantId: true, version: true, note: true, savedAt: true, savedBy: true },
    where: { plantId: In([...plantIds]) },
    order: { version: 'DESC' },
  });

export const findVersion = (
  manager: Manager,
  plantId: string,
  version: number,
): Promise<PlantVersionRow | null> => manager.findOneBy(PlantVersionEntity, { plantId, version });

export async function insertVersion(manager: Manager, row: PlantVersionRow): Promise<void> {
  await manager.insert(PlantVersionEntity, row);
}
