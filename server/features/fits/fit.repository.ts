import type { Plant, PlantOrigin } from '#contract/plants.ts';
import { FitEntity, FitLayerEntity, type FitRow } from '#server/database/entities/fit.ts';
import { SiteEntity, type SiteRow } from '#server/database/entities/site.ts';
import type { Manager } from '#server/database/manager.ts';

export const findSite = (manager: Manager, id: string): Promise<SiteRow | null> =>
  manager.findOneBy(SiteEntity, { id });

/** A fit of this very site. */
export const findFit = (manager: Manager, siteId: string, id: string): Promise<FitRow | null> =>
  manager.findOneBy(FitEntity, { id, siteId });

/** Newest first, without what fills pages. */
export const fitsOfSite = (manager: Manager, siteId: string): Promise<Omit<FitRow, 'state'>[]> =>
  manager.find(FitEntity, {
    where: { siteId },
    select: {
      id: true,
      siteId: true,
      name: true,
      status: true,
      plan: true,
      runs: true,
      generations: true,
      grid: true,
      accepted: true,
      startedAt: true,
      startedBy: true,
    },
    order: { startedAt: 'DESC', id: 'DESC' },
  });

export async function insertFit(manager: Manager, row: FitRow, layers: Iterable<string>): Promise<void> {
  await manager.insert(FitEntity, row);
  for (const hash of new Set(layers)) await manager.insert(FitLayerEntity, { fitId: row.id, hash });
}

export async function updateFit(manager: Manager, id: string, change: Partial<FitRow>): Promise<void> {
  await manager.update(FitEntity, { id }, change);
}

export async function deleteFitRow(manager: Manager, id: string): Promise<void> {
  await manager.delete(FitEntity, { id });
}

/** Hashes of the rasters that a fit stands on. */
export const layerHashesOf = async (manager: Manager, fitId: string): Promise<string[]> =>
  (await manager.findBy(FitLayerEntity, { fitId })).map(({ hash }) => hash);

/** Sets the plant of a site, and the version of a profile that it is now, where it is one. */
export async function updatePlantOfSite(
  manager: Manager,
  id: string,
  plant: Plant,
  origin: PlantOrigin | null,
): Promise<void> {
  await manager.update(
    SiteEntity,
    { id },
    { plant: JSON.stringify(plant), plantSet: true, ...(origin && { plantOrigin: JSON.stringify(origin) }) },
  );
}
