import type { Manager } from '#server/database/manager.ts';
import { SiteCostsEntity, type SiteCostsRow } from '#server/database/entities/site-costs.ts';

export const findCosts = (manager: Manager, siteId: string): Promise<SiteCostsRow | null> =>
  manager.findOneBy(SiteCostsEntity, { siteId });

export async function putCosts(manager: Manager, row: SiteCostsRow): Promise<void> {
  await manager.upsert(SiteCostsEntity, row, ['siteId']);
}
