import type { Grid } from '#sim-core/grid/grid.ts';
import type { ProblemCode } from '#contract/problem.ts';
import type { LayerFacts, LayerPart, ValueUnit } from '#contract/layers.ts';

/** What the raster worker is asked to do. Files are named by paths that the server made; nothing large is copied. */
export type RasterTask = ReadLayerTask | WriteMapTask | DigestTask;

/** Read and check an uploaded GeoTIFF and write its values as a cell-values binary. */
export interface ReadLayerTask {
  kind: 'read-layer';
  path: string;
  valuesPath: string;
  part: LayerPart;
  /** the site's grid, on which the raster must lie; null when it makes the site */
  grid: Grid | null;
  /** most cells that are decoded */
  cells: number;
}

/** Write a stored frame or the closing years as GeoTIFF. */
export interface WriteMapTask {
  kind: 'write-map';
  map: 'cover' | 'closing';
  /** cell-values binary of the frame or of the closing years */
  path: string;
  /** for `cover`: the closing years, which know where the plant cannot grow; null when the run has none */
  closingPath: string | null;
  grid: Grid;
  outPath: string;
  /** what the map shows and what it is worth, for the file's metadata */
  title: string;
  note: string;
}

/** SHA-256 over the frames of a run, in order of years. */
export interface DigestTask {
  kind: 'digest';
  paths: string[];
  cells: number;
}

export interface WrittenFile {
  hash: string;
  bytes: number;
}

export interface TaskResults {
  'read-layer': { grid: Grid; facts: LayerFacts; unit: ValueUnit; values: WrittenFile };
  'write-map': WrittenFile;
  digest: string;
}

/** A refusal as it crosses from the worker, where an error would lose its fields. */
export interface Refusal {
  code: ProblemCode;
  message: string;
  found: string;
  expected: string;
  remedy: string;
}
