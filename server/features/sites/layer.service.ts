import { randomUUID } from 'node:crypto';
import type { HabitatClass, Site, ValueUnit } from '#contract/sites.ts';
import type { LayerRow } from '#server/database/entities/layer.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { forgetReplacedLayers } from '#server/database/replaced-layers.ts';
import { shownFileName } from '#server/files/file-name.ts';
import { releaseBlobs, storeWithRows } from '#server/files/stored-files.ts';
import { fitsUnit, layerFactsSchema } from '#server/jobs/layer-facts.ts';
import { fieldProblem, notFound } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { findCurrentLayer, findLayerOfPart, insertLayer, updateLayer } from './layer.repository.ts';
import { readRasterFile, type ArrivedRaster, type ReadRaster } from './read-raster-file.ts';
import { siteReply } from './site-reply.ts';

export const layerRowOf = (
  siteId: string,
  { part, file, fileName, by }: ArrivedRaster,
  { facts, unit, values }: ReadRaster,
  uploadedAt: string,
): LayerRow => ({
  id: randomUUID(),
  siteId,
  part,
  fileName: shownFileName(fileName),
  hash: file.hash,
  bytes: file.bytes,
  valuesHash: values.hash,
  valuesBytes: values.bytes,
  facts: JSON.stringify(facts),
  unit,
  classes: null,
  uploadedAt,
  uploadedBy: by,
  replacedAt: null,
});

/**
 * Puts a raster on a site. A layer of the same part is replaced; it stays readable for the runs that stand on it. A
 * refused raster leaves nothing behind.
 * @throws ProblemError what is wrong with the raster, `grid-mismatch` when it lies on other cells than the site's
 */
export async function addLayer(services: Services, siteId: string, raster: ArrivedRaster): Promise<Site> {
  const { grid } = await siteReply(services.dataSource.manager, siteId);
  const read = await readRasterFile(services, raster.file, raster.part, grid);
  const now = services.clock().toISOString();
  const { site, freed } = await storeWithRows(services, [raster.file, read.values], async (manager) => {
    const present = await findLayerOfPart(manager, siteId, raster.part);
    if (present) await updateLayer(manager, present.id, { replacedAt: now });
    await insertLayer(manager, layerRowOf(siteId, raster, read, now));
    return { freed: await forgetReplacedLayers(manager, siteId), site: await siteReply(manager, siteId) };
  });
  await releaseBlobs(services, freed);
  return site;
}

/** Takes a layer off a site; it stays readable for the runs that stand on it. @throws ProblemError `not-found` */
export async function deleteLayer(services: Services, siteId: string, layerId: string): Promise<Site> {
  const { site, freed } = await services.write(async (manager) => {
    await requireLayer(manager, siteId, layerId);
    await updateLayer(manager, layerId, { replacedAt: services.clock().toISOString() });
    return { freed: await forgetReplacedLayers(manager, siteId), site: await siteReply(manager, siteId) };
  });
  await releaseBlobs(services, freed);
  return site;
}

/**
 * Says what the values of a layer mean.
 * @throws ProblemError at `unit` when the values cannot be read so
 */
export function changeLayerUnit(
  services: Services,
  siteId: string,
  layerId: string,
  unit: ValueUnit,
): Promise<Site> {
  return services.write(async (manager) => {
    const layer = await requireLayer(manager, siteId, layerId);
    if (layer.part === 'habitat') throw fieldProblem('unit', 'Habitat holds classes; they have no unit');
    const facts = readJson(layerFactsSchema, layer.facts);
    if (!fitsUnit(facts, unit))
      throw fieldProblem(
        'unit',
        `Found ${facts.dataType} values from ${facts.minimum} to ${facts.maximum}; they cannot be read as ${unit}`,
      );
    await updateLayer(manager, layerId, { unit });
    return siteReply(manager, siteId);
  });
}

/**
 * Sets the class table of `habitat`. Every class of the raster must have its row.
 * @throws ProblemError at `classes` when one is missing or the layer holds no classes
 */
export function setLayerClasses(
  services: Services,
  siteId: string,
  layerId: string,
  classes: HabitatClass[],
): Promise<Site> {
  return services.write(async (manager) => {
    const layer = await requireLayer(manager, siteId, layerId);
    if (layer.part !== 'habitat')
      throw fieldProblem('classes', `A class table belongs to habitat; this layer is ${layer.part}`);
    const listed = new Set(classes.map((row) => row.value));
    const missing = (readJson(layerFactsSchema, layer.facts).classCounts ?? []).filter(
      ({ value }) => !listed.has(value),
    );
    if (missing.length > 0)
      throw fieldProblem(
        'classes',
        `Without a row: ${missing.map(({ value, cells }) => `class ${value} (${cells} cells)`).join(', ')}`,
      );
    await updateLayer(manager, layerId, { classes: JSON.stringify(classes) });
    return siteReply(manager, siteId);
  });
}

async function requireLayer(manager: Manager, siteId: string, layerId: string): Promise<LayerRow> {
  const layer = await findCurrentLayer(manager, siteId, layerId);
  if (!layer) throw notFound();
  return layer;
}
