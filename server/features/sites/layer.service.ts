import { randomUUID } from 'node:crypto';
import { layerFactsSchema, type HabitatClass, type ValueUnit, type Vertical } from '#contract/layers.ts';
import type { Site } from '#contract/sites.ts';
import type { LayerRow } from '#server/database/entities/layer.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { shownFileName } from '#server/files/file-name.ts';
import { storeWithRows } from '#server/files/stored-files.ts';
import { fitsUnit } from '#server/jobs/layer-facts.ts';
import { fieldProblem, notFound } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { findCurrentLayer, findLayerOfPart, insertLayer, updateLayer } from './layer.repository.ts';
import { readRasterFile, type ArrivedRaster, type ReadRaster } from './read-raster-file.ts';
import { siteReply } from './site-reply.ts';

/** The row of a layer that was read from a file on the site's own cells. */
export const layerRowOf = (
  siteId: string,
  { part, year, file, fileName, by }: ArrivedRaster,
  { grid, facts, unit, values }: ReadRaster,
  uploadedAt: string,
): LayerRow => ({
  id: randomUUID(),
  siteId,
  part,
  year: year ?? 0,
  grid: JSON.stringify(grid),
  hash: file.hash,
  bytes: file.bytes,
  valuesHash: values.hash,
  valuesBytes: values.bytes,
  fileName: shownFileName(fileName),
  sourceHash: file.hash,
  sourceBytes: file.bytes,
  source: JSON.stringify({
    crsName: facts.crsName,
    epsg: grid.epsg,
    width: grid.width,
    height: grid.height,
    cellWidth: grid.cellSize,
    cellHeight: grid.cellSize,
    band: 1,
    bands: 1,
    scale: 1,
    offset: 0,
  }),
  alignment: JSON.stringify({ method: 'copy', reprojectedFrom: null, cropped: 0, padded: 0 }),
  note: '',
  facts: JSON.stringify(facts),
  unit,
  vertical: part === 'elevation' ? JSON.stringify({ datum: '', unit: 'metre' }) : null,
  classes: null,
  uploadedAt,
  uploadedBy: by,
  replacedAt: null,
});

/** Puts a layer's row in the place of the one that plays its part now, which stays as history. */
export async function installLayer(manager: Manager, row: LayerRow, now: string): Promise<void> {
  const present = await findLayerOfPart(manager, row);
  if (present) await updateLayer(manager, present.id, { replacedAt: now });
  await insertLayer(manager, row);
}

/**
 * Puts a raster on a site. A layer of the same part is replaced and stays as history. A refused raster leaves nothing
 * behind.
 * @throws ProblemError what is wrong with the raster, `grid-mismatch` when it lies on other cells than the site's
 */
export async function addLayer(services: Services, siteId: string, raster: ArrivedRaster): Promise<Site> {
  refuseYear(raster);
  const { grid } = await siteReply(services.dataSource.manager, siteId);
  const read = await readRasterFile(services, raster.file, raster.part, grid);
  const now = services.clock().toISOString();
  return storeWithRows(services, [raster.file, read.values], async (manager) => {
    await installLayer(manager, layerRowOf(siteId, raster, read, now), now);
    return siteReply(manager, siteId);
  });
}

/** Resurveys are told apart by their year; nothing else has one. @throws ProblemError at `year` */
function refuseYear({ part, year }: Pick<ArrivedRaster, 'part' | 'year'>): void {
  if (part === 'resurvey' && year === undefined)
    throw fieldProblem('year', 'Say in which year the resurvey was made');
  if (part !== 'resurvey' && year !== undefined)
    throw fieldProblem('year', `A year belongs to a resurvey; this layer is ${part}`);
}

/** What may be said about a layer. */
export interface LayerChange {
  unit?: ValueUnit;
  vertical?: Vertical;
  note?: string;
  year?: number;
}

/**
 * Says what the values of a layer mean and what people should know about it.
 * @throws ProblemError at `unit` when the values cannot be read so, at `vertical` when they are no heights, at `year` when
 * it is no resurvey or the site has another of that year
 */
export function changeLayer(
  services: Services,
  siteId: string,
  layerId: string,
  { unit, vertical, note, year }: LayerChange,
): Promise<Site> {
  return services.write(async (manager) => {
    const layer = await requireLayer(manager, siteId, layerId);
    const change: Partial<LayerRow> = {};
    if (unit !== undefined) {
      checkUnit(layer, unit);
      change.unit = unit;
    }
    if (vertical !== undefined) {
      if (layer.part !== 'elevation')
        throw fieldProblem('vertical', `Heights belong to elevation; this layer is ${layer.part}`);
      change.vertical = JSON.stringify(vertical);
    }
    if (year !== undefined && year !== layer.year) {
      if (layer.part !== 'resurvey')
        throw fieldProblem('year', `A year belongs to a resurvey; this layer is ${layer.part}`);
      if (await findLayerOfPart(manager, { ...layer, year }))
        throw fieldProblem('year', `There is a resurvey of ${year} already; take it off the site first`);
      change.year = year;
    }
    if (note !== undefined) change.note = note;
    if (Object.keys(change).length > 0) await updateLayer(manager, layerId, change);
    return siteReply(manager, siteId);
  });
}

function checkUnit(layer: LayerRow, unit: ValueUnit): void {
  if (layer.part === 'habitat') throw fieldProblem('unit', 'Habitat holds classes; they have no unit');
  if (layer.part === 'elevation')
    throw fieldProblem('unit', 'Elevation holds heights; their unit belongs in `vertical`');
  const facts = readJson(layerFactsSchema, layer.facts);
  if (!fitsUnit(facts, unit))
    throw fieldProblem(
      'unit',
      `Found ${facts.dataType} values from ${facts.minimum} to ${facts.maximum}; they cannot be read as ${unit}`,
    );
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
