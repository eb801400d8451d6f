import type { Manager } from '#server/database/manager.ts';
import { OptionEntity, type OptionRow } from '#server/database/entities/option.ts';
import { SiteEntity, type SiteRow } from '#server/database/entities/site.ts';

/** In their order, Wait first. */
export const optionsOfSite = (manager: Manager, siteId: string): Promise<OptionRow[]> =>
  manager.find(OptionEntity, {
    where: { siteId },
    order: { wait: 'DESC', place: 'ASC', createdAt: 'ASC', id: 'ASC' },
  });

export const findOption = (manager: Manager, siteId: string, id: string): Promise<OptionRow | null> =>
  manager.findOneBy(OptionEntity, { id, siteId });

export const findSite = (manager: Manager, id: string): Promise<SiteRow | null> =>
  manager.findOneBy(SiteEntity, { id });

export async function insertOption(manager: Manager, option: OptionRow): Promise<void> {
  await manager.insert(OptionEntity, option);
}

export async function updateOption(manager: Manager, id: string, change: Partial<OptionRow>): Promise<void> {
  await manager.update(OptionEntity, { id }, change);
}

/** Puts the options of a site in this order; all of them are named. */
export async function placeOptions(manager: Manager, ids: readonly string[]): Promise<void> {
  for (const [place, id] of ids.entries()) await manager.update(OptionEntity, { id }, { place });
}

/** Its runs stay: they keep the option's name. */
export async function deleteOptionRow(manager: Manager, id: string): Promise<void> {
  await manager.delete(OptionEntity, { id });
}
