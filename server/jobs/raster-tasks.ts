import type { BriefFacts } from '#contract/brief-content.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { ProblemCode } from '#contract/problem.ts';
import type {
  Alignment,
  LayerFacts,
  LayerPart,
  ResamplingMethod,
  StoredSource,
  ValueUnit,
} from '#contract/layers.ts';
import type { RasterDescription } from '#rasters/describe/raster-description.ts';
import type { BriefSource } from '#server/printing/brief-facts.ts';
import type { BriefPage } from '#server/printing/pdf/brief-page.ts';
import type { PdfPages } from '#server/printing/pdf/write-pdf.ts';

/** What the raster worker is asked to do. Files are named by paths that the server made; nothing large is copied. */
export type RasterTask =
  ReadLayerTask | SurveyTask | PlaceTask | WriteMapTask | DigestTask | BriefFactsTask | WriteBriefTask;

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

/** Look at every cell of a band of an uploaded file, before anything is decided about it. */
export interface SurveyTask {
  kind: 'survey';
  path: string;
  /** from 1; null for the first with data */
  band: number | null;
  /** where the small picture goes, as a cell-values binary */
  thumbnailPath: string;
}

/** Bring a band of an uploaded file onto a grid and write it as GeoTIFF and as cell values. */
export interface PlaceTask {
  kind: 'place';
  path: string;
  part: LayerPart;
  band: number;
  grid: Grid;
  /** null for the one that fits */
  method: ResamplingMethod | null;
  /** how its values are read; null for the likeliest way */
  unit: ValueUnit | null;
  rasterPath: string;
  valuesPath: string;
}

/** What became of a placed raster. */
export interface Placed {
  facts: LayerFacts;
  unit: ValueUnit;
  source: StoredSource;
  alignment: Alignment;
  /** null where the file itself has the grid's cells, untouched: then nothing was written at `rasterPath` */
  raster: WrittenFile | null;
  values: WrittenFile;
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

/** Work out the figures of a brief, which takes long where there are many futures, and draw its maps. */
export interface BriefFactsTask {
  kind: 'brief-facts';
  source: BriefSource;
  /** the stored closing maps, by option, and where their pictures go; null where there is none */
  maps: ({ path: string; outPath: string } | null)[];
}

/** Write a version of a brief as PDF. */
export interface WriteBriefTask {
  kind: 'write-brief';
  brief: BriefPage;
  outPath: string;
}

export interface WrittenFile {
  hash: string;
  bytes: number;
}

export interface TaskResults {
  'read-layer': { grid: Grid; facts: LayerFacts; unit: ValueUnit; values: WrittenFile };
  survey: { description: RasterDescription; band: number; facts: LayerFacts; thumbnail: WrittenFile };
  place: Placed;
  'write-map': WrittenFile;
  digest: string;
  'brief-facts': { facts: BriefFacts; maps: (WrittenFile | null)[] };
  'write-brief': WrittenFile & PdfPages;
}

/** A refusal as it crosses from the worker, where an error would lose its fields. */
export interface Refusal {
  code: ProblemCode;
  message: string;
  found: string;
  expected: string;
  remedy: string;
}
