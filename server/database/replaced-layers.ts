import { LayerEntity } from './entities/layer.ts';
import type { Manager } from './manager.ts';

const runsOnLayer = `
  SELECT 1 FROM "run_layer" INNER JOIN "run" ON "run"."id" = "run_layer"."runId"
  WHERE "run_layer"."hash" = "layer"."hash" AND "run"."siteId" = "layer"."siteId"`;

/**
 * Deletes the replaced layers of a site that no run stands on any more. Returns the hashes of the blobs that their rows
 * referred to.
 */
export async function forgetReplacedLayers(manager: Manager, siteId: string): Promise<string[]> {
  const layers = await manager
    .createQueryBuilder(LayerEntity, 'layer')
    .where('layer.siteId = :siteId AND layer.replacedAt IS NOT NULL', { siteId })
    .andWhere(`NOT EXISTS (${runsOnLayer})`)
    .getMany();
  for (const { id } of layers) await manager.delete(LayerEntity, { id });
  return layers.flatMap((layer) => [layer.hash, layer.valuesHash]);
}
