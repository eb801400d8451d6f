import { openRaster } from '#rasters/describe/inspect-raster.ts';
import type { BandDescription, RasterDescription } from '#rasters/describe/raster-description.ts';
import { openBand, type BandBlocks } from '#rasters/read/band-blocks.ts';
import { checkValues } from '#rasters/read/check-values.ts';
import { RasterError } from '#rasters/read/raster-error.ts';
import { toSource, type RasterSource } from '#rasters/read/raster-source.ts';
import type { Raster } from '#rasters/read/raster.ts';
import { defaultRasterLimits, type RasterDataType, type RasterLimits } from '#rasters/read/tiff-layout.ts';
import type { AlignmentPlan } from './alignment-plan.ts';
import { cellMaps, onLattice } from './cell-map.ts';
import { copyCells } from './copy-cells.ts';
import { outputCells } from './output-cells.ts';
import type { Progress } from './progress.ts';
import { resampleTiles } from './resample-tiles.ts';
import { sourceWindow } from './source-window.ts';
import { wholeCells } from './plan-alignment.ts';

export interface AlignmentOptions extends Progress {
  readonly limits?: Partial<RasterLimits>;
  /** bytes of decoded strips or tiles that are kept */
  readonly keptBytes?: number;
}

/** Strips 32,768 cells wide for a row of tiles of 64-bit numbers, twice over. */
const defaultKeptBytes = 134_217_728;

/**
 * Brings a band onto a grid as its plan says. Values are those of the file, in its number type, where cells are copied or
 * chosen, and 32-bit floats where they are calculated, with scale and offset applied; missing cells hold the file's
 * no-data value or NaN. Cells that lie just as the grid's pass through untouched.
 *
 * Memory is the grid's values, `keptBytes` of decoded strips or tiles, one strip or tile while it is decoded (itself, its
 * packed bytes, and for several bands the picked one), and for another CRS 16 bytes for every 16 cells at most of the
 * grid: never the whole source.
 * @throws RasterError what is wrong with the file, `raster-empty` where no cell of the grid gets a value
 * @throws the signal's reason when it is aborted
 */
export async function alignRaster(
  input: Uint8Array | RasterSource,
  plan: AlignmentPlan,
  { limits = {}, keptBytes = defaultKeptBytes, ...progress }: AlignmentOptions = {},
): Promise<Raster> {
  const source = toSource(input);
  const { target } = plan;
  const most = limits.cells ?? defaultRasterLimits.cells;
  if (target.width * target.height > most) throw tooManyCells(target, most);
  const { description, layout } = await openRaster(source, {
    blockBytes: limits.blockBytes ?? defaultRasterLimits.blockBytes,
  });
  const band = description.bands[plan.band - 1];
  const blocks = openBand(source, layout, band);
  progress.signal?.throwIfAborted();
  const made = await (isPlainCopy(plan, blocks)
    ? copyPlain(blocks, description, plan, band, progress)
    : resample(blocks, description, plan, band, { ...progress, keptBytes }));
  checkValues(made.values, made.noData, target.width);
  return {
    grid: target,
    crsName: plan.reprojection?.to.name ?? description.crs.name,
    ...made,
  };
}

type Made = Pick<Raster, 'dataType' | 'noData' | 'values'>;

const isPlainCopy = ({ method, scaling }: AlignmentPlan, { layout }: BandBlocks): boolean =>
  method === 'copy' && scaling === null && layout.alphaBand === null;

function copyPlain(
  blocks: BandBlocks,
  description: RasterDescription,
  { target }: AlignmentPlan,
  { dataType, noData }: BandDescription,
  progress: Progress,
): Promise<Made> {
  const shift = wholeCells(description, target, cellMaps(description, target).toRaster);
  if (!shift) throw new RangeError('The plan is of another file: its cells lie beside those of the grid.');
  return copyCells(blocks, { target, shift, southUp: description.southUp, dataType, noData }, progress);
}

async function resample(
  blocks: BandBlocks,
  description: RasterDescription,
  plan: AlignmentPlan,
  { dataType, noData }: BandDescription,
  { keptBytes, ...progress }: Progress & { keptBytes: number },
): Promise<Made> {
  const { target, scaling, cellRatio } = plan;
  const { toRaster } = cellMaps(description, target);
  const chosen = plan.method === 'copy' || plan.method === 'nearest' || plan.method === 'majority';
  const asStored = chosen && scaling === null;
  const type: RasterDataType = asStored ? dataType : 'float32';
  const out = outputCells(target.width * target.height, type, asStored ? noData : null);
  const { scale, offset } = scaling ?? { scale: 1, offset: 0 };
  await resampleTiles(
    {
      method: plan.method === 'copy' ? 'nearest' : plan.method,
      target,
      raster: description,
      cellRatio,
      toRaster:
        description.crs.epsg === target.epsg ? toRaster : onLattice(toRaster, target.width, target.height),
      window: sourceWindow(blocks, { noData, southUp: description.southUp, most: keptBytes }),
    },
    (index, value) => (Number.isNaN(value) ? out.miss(index) : out.put(index, value * scale + offset)),
    progress,
  );
  return out.result;
}

const tooManyCells = ({ width, height }: AlignmentPlan['target'], most: number): RasterError =>
  new RasterError('raster-too-large', {
    found: `a grid of ${width} × ${height} cells`,
    expected: `at most ${most} cells`,
    remedy: 'Choose larger cells or a smaller site.',
  });
