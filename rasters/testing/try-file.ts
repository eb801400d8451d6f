import { alignRaster } from '#rasters/align/align-raster.ts';
import { planAlignment } from '#rasters/align/plan-alignment.ts';
import { suggestGrid } from '#rasters/align/suggest-grid.ts';
import { inspectRaster } from '#rasters/describe/inspect-raster.ts';
import { RasterError, type RasterErrorCode } from '#rasters/read/raster-error.ts';
import { summarise } from '#rasters/read/summary.ts';
import type { Grid } from '#sim-core/grid/grid.ts';

/** A site that most fixtures lie on in part. */
const site: Grid = {
  width: 40,
  height: 30,
  cellSize: 0.7,
  originX: 412_195,
  originY: 5_301_755,
  epsg: 32631,
};
const limits = { cells: 250_000, blockBytes: 1_000_000 };

/**
 * Takes a file, whatever it is, the way an upload goes: described, planned for a new grid and for a site, brought there as
 * amounts and as classes, and summarised.
 * @returns `read` where a raster came out of it, else the code of the first refusal
 * @throws Error where anything happens that is neither a refusal with its three parts nor a raster that holds together
 */
export async function tryFile(bytes: Uint8Array, k: number): Promise<'read' | RasterErrorCode> {
  let outcome: 'read' | RasterErrorCode | undefined;
  try {
    const description = await inspectRaster(bytes);
    JSON.stringify(description);
    const band = 1 + (k % description.bands.length);
    const grids = [() => suggestGrid(description).grid, () => site];
    for (const [i, grid] of grids.entries())
      try {
        const content = (k + i) % 2 === 0 ? 'amounts' : 'classes';
        const plan = planAlignment(description, { band, content, grid: grid() });
        const raster = await alignRaster(bytes, plan, { limits });
        check(raster.values.length === plan.target.width * plan.target.height, 'another number of cells');
        check(raster.values.length <= limits.cells, 'more cells than the limit');
        check(plan.cropped.share >= 0 && plan.cropped.share <= 1, 'a share of cells outside 0..1');
        check(plan.padded.share >= 0 && plan.padded.share <= 1, 'a share of cells outside 0..1');
        const { minimum, maximum, noDataShare } = summarise(raster);
        check(Number.isFinite(minimum) && Number.isFinite(maximum), 'an infinite value');
        check(noDataShare < 1, 'nothing but missing cells');
        outcome = 'read';
      } catch (error) {
        outcome ??= refusal(error);
      }
  } catch (error) {
    outcome = refusal(error);
  }
  return outcome ?? 'read';
}

function check(holds: boolean, otherwise: string): void {
  if (!holds) throw new Error(`The raster has ${otherwise}.`);
}

/** @throws whatever is no refusal */
function refusal(error: unknown): RasterErrorCode {
  if (!(error instanceof RasterError)) throw error;
  check(error.found !== '' && error.expected !== '' && error.remedy !== '', 'a refusal without its parts');
  check(
    !/undefined|NaN/.test(error.message.replace(/the number NaN|NaN or|and NaN/g, '')),
    `a refusal that says: ${error.message}`,
  );
  return error.code;
}
