import type { CellValues } from '#sim-core/grid/ground.ts';
import { pacer, type Progress } from '#rasters/align/progress.ts';
import { openBand } from '#rasters/read/band-blocks.ts';
import { infiniteValue } from '#rasters/read/check-values.ts';
import { RasterError } from '#rasters/read/raster-error.ts';
import { arrayTypes } from '#rasters/read/raster.ts';
import type { RasterSource } from '#rasters/read/raster-source.ts';
import { guessUnit, histogramBins, mostClasses, type RasterSummary } from '#rasters/read/summary.ts';
import type { RasterLimits } from '#rasters/read/tiff-layout.ts';
import { openRaster } from './inspect-raster.ts';
import type { BandDescription, RasterDescription } from './raster-description.ts';

/** A small picture of a band: every nth cell, north up, at most `largestSide` cells wide and high. */
export interface Thumbnail {
  readonly width: number;
  readonly height: number;
  /** as stored, without scale and offset; NaN or the band's no-data value where there is none */
  readonly values: CellValues;
}

export interface BandSurvey {
  readonly description: RasterDescription;
  readonly band: BandDescription;
  /**
   * What its values look like, scale and offset applied. All cells were looked at, but for the histogram, which counts
   * those of the thumbnail.
   */
  readonly summary: RasterSummary;
  readonly thumbnail: Thumbnail;
}

const largestSide = 256;

/**
 * Looks at every cell of a band as it stands in its file, before anything is decided about it. Memory is one strip or
 * tile and the thumbnail.
 * @param band counted from 1; the first with data unless given
 * @throws RasterError what is wrong with the file; `raster-empty`, `raster-values` what is wrong with its cells
 */
export async function surveyBand(
  source: RasterSource,
  { band: wanted, limits, ...progress }: Progress & { band?: number; limits?: Partial<RasterLimits> } = {},
): Promise<BandSurvey> {
  const { description, layout } = await openRaster(source, limits);
  const band = description.bands.find(({ index, role }) => role === 'data' && index === (wanted ?? index));
  if (!band) throw noSuchBand(description, wanted);
  const { width, height, blockWidth, blockHeight, blocksAcross } = layout;
  const blocks = openBand(source, layout, band);
  const step = Math.ceil(Math.max(width, height) / largestSide);
  // Where a band beside it hides cells, they come as NaN.
  const dataType = layout.alphaBand === null ? band.dataType : 'float64';
  const thumbnail = emptyThumbnail(description, { ...band, dataType }, step);
  const tally = newTally(band);
  const tell = pacer(progress);
  for (let top = 0; top < height; top += blockHeight) {
    for (let column = 0; column < blocksAcross; column++) {
      const left = column * blockWidth;
      const columns = Math.min(blockWidth, width - left);
      const rows = Math.min(blockHeight, height - top);
      const values = await blocks.read((top / blockHeight) * blocksAcross + column);
      if (!values) {
        tally.absent(columns * rows);
        continue;
      }
      for (let row = 0; row < rows; row++) {
        const line = values.subarray(row * blockWidth, row * blockWidth + columns);
        tally.line(line, left, top + row);
        const y = description.southUp ? height - 1 - top - row : top + row;
        if (y % step === 0)
          for (let x = Math.ceil(left / step); x * step < left + columns; x++)
            thumbnail.values[(y / step) * thumbnail.width + x] = line[x * step - left];
      }
    }
    await tell(Math.min(1, (top + blockHeight) / height));
  }
  return { description, band, summary: tally.summary(width * height, thumbnail), thumbnail };
}

/** Blocks that a sparse file leaves out hold no data, or zero where the file has no such value. */
function emptyThumbnail(
  { width, height }: RasterDescription,
  { dataType, noData }: BandDescription,
  step: number,
): Thumbnail {
  const size = { width: Math.ceil(width / step), height: Math.ceil(height / step) };
  const values = new arrayTypes[dataType](size.width * size.height).fill(noData ?? 0);
  return { ...size, values };
}

function newTally({ noData, scale, offset, dataType }: BandDescription) {
  let [minimum, maximum, missing] = [Infinity, -Infinity, 0];
  let classes: Map<number, number> | null = new Map();
  const count = (value: number, cells: number) => {
    if (value < minimum) minimum = value;
    if (value > maximum) maximum = value;
    if (!classes) return;
    classes.set(value, (classes.get(value) ?? 0) + cells);
    if (classes.size > mostClasses || !Number.isInteger(value)) classes = null;
  };
  return {
    absent(cells: number) {
      if (noData === null) count(offset, cells);
      else missing += cells;
    },
    line(values: CellValues, left: number, row: number) {
      for (let i = 0; i < values.length; i++) {
        const value = values[i];
        if (value === noData || Number.isNaN(value)) missing++;
        else if (!Number.isFinite(value)) throw infiniteValue(left + i, row);
        else count(value * scale + offset, 1);
      }
    },
    summary(cells: number, { values }: Thumbnail): RasterSummary {
      if (missing === cells)
        throw new RasterError('raster-empty', {
          found: 'no cell with a value: all are no data',
          expected: 'at least one valid cell',
          remedy: 'Check that the right file, band and no-data value were exported (gdalinfo -stats).',
        });
      const histogram = new Array<number>(histogramBins).fill(0);
      const perBin = maximum > minimum ? histogramBins / (maximum - minimum) : 0;
      for (const value of values)
        if (value !== noData && !Number.isNaN(value))
          histogram[Math.min(histogramBins - 1, Math.floor((value * scale + offset - minimum) * perBin))]++;
      const classCounts =
        classes &&
        [...classes].map(([value, count]) => ({ value, cells: count })).sort((a, b) => a.value - b.value);
      const unit = guessUnit(dataType.startsWith('float') || scale % 1 !== 0, minimum, maximum);
      return { noDataShare: missing / cells, minimum, maximum, histogram, classCounts, unit };
    },
  };
}

const noSuchBand = ({ bands }: RasterDescription, wanted: number | undefined): RasterError =>
  new RasterError('raster-bands', {
    found:
      wanted === undefined ? 'no band with values' : `no band ${wanted} with values among ${bands.length}`,
    expected: 'a band that holds the layer',
    remedy: 'Choose another band, or export the raster again.',
  });
