import { IsNull, Not } from 'typeorm';
import type { Manager } from '#server/database/manager.ts';
import { ComparisonLayerEntity } from '#server/database/entities/comparison-parts.ts';
import { ComparisonEntity } from '#server/database/entities/comparison.ts';
import { LayerEntity, type LayerRow } from '#server/database/entities/layer.ts';
import { FitEntity, FitLayerEntity } from '#server/database/entities/fit.ts';
import { RunLayerEntity } from '#server/database/entities/run-layer.ts';
import { RunEntity } from '#server/database/entities/run.ts';

/** The layers that stand on a site now. */
export const currentLayers = (manager: Manager, siteId: string): Promise<LayerRow[]> =>
  manager.find(LayerEntity, { where: { siteId, replacedAt: IsNull() }, order: { uploadedAt: 'ASC' } });

export const findCurrentLayer = (manager: Manager, siteId: string, id: string): Promise<LayerRow | null> =>
  manager.findOneBy(LayerEntity, { id, siteId, replacedAt: IsNull() });

/** Any layer of the site, one of the history included. */
export const findLayer = (manager: Manager, siteId: string, id: string): Promise<LayerRow | null> =>
  manager.findOneBy(LayerEntity, { id, siteId });

/** Any layer of the site that this raster is, one of the history included. */
export const findLayerByHash = (manager: Manager, siteId: string, hash: string): Promise<LayerRow | null> =>
  manager.findOne(LayerEntity, { where: { siteId, hash }, order: { uploadedAt: 'DESC' } });

/** Any layer of the site that was made from this file, one of the history included. */
export const findLayerBySource = (
  manager: Manager,
  siteId: string,
  sourceHash: string,
): Promise<LayerRow | null> =>
  manager.findOne(LayerEntity, { where: { siteId, sourceHash }, order: { uploadedAt: 'DESC' } });

/** Every layer that plays or has played a part: the one that stands first, then the latest to be replaced. */
export const layersOfPart = (manager: Manager, siteId: string, part: string): Promise<LayerRow[]> =>
  manager.find(LayerEntity, {
    where: { siteId, part },
    order: { replacedAt: { direction: 'DESC', nulls: 'FIRST' }, uploadedAt: 'DESC' },
  });

/** How many runs of a site stand on a raster, and the names of the latest. */
export async function runsOnRaster(
  manager: Manager,
  siteId: string,
  hash: string,
): Promise<{ runs: number; runNames: string[] }> {
  const query = manager
    .createQueryBuilder(RunEntity, 'run')
    .innerJoin(RunLayerEntity.options.name, 'used', 'used.runId = run.id')
    .where('run.siteId = :siteId AND used.hash = :hash', { siteId, hash })
    .orderBy('run.startedAt', 'DESC')
    .limit(5);
  const [rows, runs] = await query.getManyAndCount();
  return { runs, runNames: rows.map((run) => run.name) };
}

/** How many comparisons of a site stand on a raster. */
export const comparisonsOnRaster = (manager: Manager, siteId: string, hash: string): Promise<number> =>
  manager
    .createQueryBuilder(ComparisonEntity, 'comparison')
    .innerJoin(ComparisonLayerEntity.options.name, 'used', 'used.comparisonId = comparison.id')
    .where('comparison.siteId = :siteId AND used.hash = :hash', { siteId, hash })
    .getCount();

/** How many fits of a site stand on a raster. */
export const fitsOnRaster = (manager: Manager, siteId: string, hash: string): Promise<number> =>
  manager
    .createQueryBuilder(FitEntity, 'fit')
    .innerJoin(FitLayerEntity.options.name, 'used', 'used.fitId = fit.id')
    .where('fit.siteId = :siteId AND used.hash = :hash', { siteId, hash })
    .getCount();

/** The layer that plays a part now; of resurveys that of the year. */
export const findLayerOfPart = (
  manager: Manager,
  { siteId, part, year }: Pick<LayerRow, 'siteId' | 'part' | 'year'>,
): Promise<LayerRow | null> => manager.findOneBy(LayerEntity, { siteId, part, year, replacedAt: IsNull() });

export async function insertLayer(manager: Manager, layer: LayerRow): Promise<void> {
  await manager.insert(LayerEntity, layer);
}

export async function updateLayer(manager: Manager, id: string, change: Partial<LayerRow>): Promise<void> {
  await manager.update(LayerEntity, { id }, change);
}

/** Whether another layer of the site is the same raster. */
export const hasTwin = (manager: Manager, { id, siteId, hash }: LayerRow): Promise<boolean> =>
  manager.existsBy(LayerEntity, { id: Not(id), siteId, hash });

export async function deleteLayerRow(manager: Manager, id: string): Promise<void> {
  await manager.delete(LayerEntity, { id });
}
