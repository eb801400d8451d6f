import { IsNull } from 'typeorm';
import type { Manager } from '#server/database/manager.ts';
import { LayerEntity, type LayerRow } from '#server/database/entities/layer.ts';

/** The layers that stand on a site now. */
export const currentLayers = (manager: Manager, siteId: string): Promise<LayerRow[]> =>
  manager.find(LayerEntity, { where: { siteId, replacedAt: IsNull() }, order: { uploadedAt: 'ASC' } });

export const findCurrentLayer = (manager: Manager, siteId: string, id: string): Promise<LayerRow | null> =>
  manager.findOneBy(LayerEntity, { id, siteId, replacedAt: IsNull() });

/** Any layer of the site that was made from this file, a replaced one included. */
export const findLayerByHash = (manager: Manager, siteId: string, hash: string): Promise<LayerRow | null> =>
  manager.findOne(LayerEntity, { where: { siteId, hash }, order: { uploadedAt: 'DESC' } });

export const findLayerOfPart = (manager: Manager, siteId: string, part: string): Promise<LayerRow | null> =>
  manager.findOneBy(LayerEntity, { siteId, part, replacedAt: IsNull() });

export async function insertLayer(manager: Manager, layer: LayerRow): Promise<void> {
  await manager.insert(LayerEntity, layer);
}

export async function updateLayer(manager: Manager, id: string, change: Partial<LayerRow>): Promise<void> {
  await manager.update(LayerEntity, { id }, change);
}
