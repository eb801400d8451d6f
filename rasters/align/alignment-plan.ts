import type { Grid } from '#sim-core/grid/grid.ts';
import type { CrsDescription } from '#rasters/describe/raster-description.ts';
import type { DatumShift } from '#rasters/geo/crs-definition.ts';

/** What the values of a raster are: class numbers, which have no mean, or amounts, such as heights and shares. */
export type RasterContent = 'classes' | 'amounts';

/**
 * How a value of the working grid is taken from those of the file.
 * - `copy`: the file's own cells, one to one; whenever both lie on the same lattice
 * - `nearest`: the value of the cell that holds the centre
 * - `bilinear`: between the four centres around it
 * - `area-weighted`: the mean of all cells below it, each with the share of its area
 * - `majority`: the class with the largest area below it
 */
export type ResamplingMethod = 'copy' | 'nearest' | 'bilinear' | 'area-weighted' | 'majority';

/** Cells and their share of all cells of the raster or the grid, 0..1. Counted by area, so rounded where cells differ. */
export interface CellShare {
  readonly cells: number;
  readonly share: number;
}

/** Something that people should know before they accept a plan. */
export interface AlignmentCaution {
  readonly code: 'datum-shift' | 'outside-use' | 'method' | 'mostly-outside' | 'finer-than-source';
  /** one or two whole sentences */
  readonly text: string;
}

/**
 * What will happen to one band of a raster so that it lies on the cells of a grid. Plain data that JSON carries whole;
 * `alignRaster` does what it says.
 */
export interface AlignmentPlan {
  /** band, counted from 1 */
  readonly band: number;
  readonly content: RasterContent;
  readonly target: Grid;
  readonly method: ResamplingMethod;
  /** the method that fits this content and these cells; differs from `method` where somebody chose another */
  readonly usualMethod: ResamplingMethod;
  /** whether raster and grid have the very same cells: then the values pass through untouched */
  readonly sameCells: boolean;
  /** rows are turned so that the first lies in the north */
  readonly turned: boolean;
  /** null where the raster is in the grid's CRS */
  readonly reprojection: {
    readonly from: CrsDescription;
    readonly to: CrsDescription;
    /** null where both share a datum */
    readonly datumShift: DatumShift | null;
  } | null;
  /** side of a grid cell as a multiple of the side of a raster cell (geometric mean over both sides): above 1 coarsens */
  readonly cellRatio: number;
  /** cells of the raster that lie outside the grid and are left out */
  readonly cropped: CellShare;
  /** cells of the grid that the raster does not reach, which become no data */
  readonly padded: CellShare;
  /** value = stored × scale + offset is applied, or null where it changes nothing */
  readonly scaling: { readonly scale: number; readonly offset: number } | null;
  readonly cautions: readonly AlignmentCaution[];
}

/** A grid for a site's first raster, and why it is not simply the raster's own. */
export interface SuggestedGrid {
  readonly grid: Grid;
  readonly crs: CrsDescription;
  /** whether the raster's own cells are the grid's */
  readonly asInFile: boolean;
  /** whole sentences: degrees, feet, cells that are not square, a CRS without a code */
  readonly reasons: readonly string[];
}
