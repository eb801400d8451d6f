import type { Alignment, LayerFacts, LayerPart, StoredSource, ValueUnit } from '#contract/layers.ts';
import type { AlignmentPlan } from '#rasters/align/alignment-plan.ts';
import { alignRaster } from '#rasters/align/align-raster.ts';
import { planAlignment } from '#rasters/align/plan-alignment.ts';
import { encodeCellValues } from '#rasters/cells/cell-values.ts';
import { inspectRaster } from '#rasters/describe/inspect-raster.ts';
import type { RasterDescription } from '#rasters/describe/raster-description.ts';
import type { Raster } from '#rasters/read/raster.ts';
import { summarise } from '#rasters/read/summary.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import { maximumCells } from '#sim-core/spec/limits.ts';
import { withFileSource } from '../files/file-source.ts';
import { contentOf, valueComplaint } from './layer-facts.ts';
import type { Placed, PlaceTask } from './raster-tasks.ts';
import { LayerValuesError, writeHashed } from './read-layer.ts';

/** How far a placement is, about, when its raster is aligned, when its values are looked at and when it is written. */
const share = { aligned: 0.6, seen: 0.65, written: 0.85 };

/**
 * Brings a band onto a grid and writes its values, and the raster as GeoTIFF unless the file is just that already.
 * Memory is the grid's values and what `alignRaster` names, then the packed values twice.
 * @throws RasterError what is wrong with the file or its way onto the grid
 * @throws LayerValuesError what is wrong with its values
 */
export async function placeRaster(task: PlaceTask, onProgress: (share: number) => void): Promise<Placed> {
  const { part, band, grid, method } = task;
  const { description, plan, raster } = await withFileSource(task.path, async (source) => {
    const description = await inspectRaster(source);
    const wish = { band, content: contentOf(part), grid, method: method ?? undefined };
    const plan = planAlignment(description, wish);
    const raster = await alignRaster(source, plan, {
      limits: { cells: maximumCells },
      onProgress: (done) => onProgress(share.aligned * done),
    });
    return { description, plan, raster };
  });
  const { unit: likeliest, ...summary } = summarise(raster);
  const { dataType, crsName, noData, values } = raster;
  const facts = { dataType, crsName, noData, ...summary };
  const unit = unitOf(part, facts, task.unit ?? likeliest);
  const complaint = valueComplaint(part, facts, unit);
  if (complaint) throw new LayerValuesError(complaint);
  onProgress(share.seen);
  const isFile = isUntouched(description, plan);
  const written = isFile ? null : await writeHashed(task.rasterPath, geoTiffOf(raster));
  onProgress(share.written);
  const cells = encodeCellValues({ width: grid.width, height: grid.height, values });
  return {
    facts,
    unit,
    source: sourceOf(description, band),
    alignment: alignmentOf(plan),
    raster: written,
    values: await writeHashed(task.valuesPath, cells),
  };
}

/** What present and absent become when cells are put together: the share that is present. */
const unitOf = (part: LayerPart, { dataType }: LayerFacts, unit: ValueUnit): ValueUnit =>
  part !== 'habitat' && unit === 'presence' && dataType.startsWith('float') ? 'share' : unit;

/** Whether the file as it came is what a run may stand on: one band of the grid's own cells, north up, as it stands. */
const isUntouched = ({ bands, southUp }: RasterDescription, { sameCells, scaling }: AlignmentPlan): boolean =>
  sameCells && scaling === null && bands.length === 1 && !southUp;

const geoTiffOf = ({ grid, values, noData, dataType, crsName }: Raster): Uint8Array =>
  encodeGeoTiff({
    grid,
    values,
    crsName,
    noData: noData ?? (dataType.startsWith('float') ? NaN : undefined),
    facts: { SOFTWARE: 'Foothold' },
  });

function sourceOf(description: RasterDescription, band: number): StoredSource {
  const { crs, width, height, cellWidth, cellHeight, bands } = description;
  const { scale, offset } = bands[band - 1];
  const { name: crsName, epsg } = crs;
  return { crsName, epsg, width, height, cellWidth, cellHeight, band, bands: bands.length, scale, offset };
}

const alignmentOf = ({ method, reprojection, cropped, padded }: AlignmentPlan): Alignment => ({
  method,
  reprojectedFrom: reprojection?.from.name ?? null,
  cropped: cropped.cells,
  padded: padded.cells,
});
