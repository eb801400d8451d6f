/** What can be wrong with a raster: the same words as the problem codes of the contract. */
export type RasterErrorCode =
  | 'not-a-geotiff'
  | 'raster-truncated'
  | 'raster-too-large'
  | 'raster-not-georeferenced'
  | 'raster-not-projected'
  | 'raster-not-metric'
  | 'raster-not-square'
  | 'raster-rotated'
  | 'raster-bands'
  | 'raster-type'
  | 'raster-empty'
  | 'raster-values'
  | 'raster-crs'
  | 'raster-elsewhere'
  | 'grid-mismatch';

export interface RasterComplaint {
  /** what the file holds, as the rest of a sentence that begins with "Found" */
  readonly found: string;
  /** what it should hold, as the rest of a sentence that begins with "Expected" */
  readonly expected: string;
  /** how to mend it, in whole sentences */
  readonly remedy: string;
}

/** A raster that is refused, with the reason in three parts. */
export class RasterError extends Error {
  override name = 'RasterError';
  readonly code: RasterErrorCode;
  readonly found: string;
  readonly expected: string;
  readonly remedy: string;

  constructor(code: RasterErrorCode, { found, expected, remedy }: RasterComplaint) {
    super(`Found ${found}; expected ${expected}. ${remedy}`);
    this.code = code;
    this.found = found;
    this.expected = expected;
    this.remedy = remedy;
  }
}

/** The refusal of a file that ends too early or whose bytes contradict themselves. */
export const damaged = (found: string): RasterError =>
  new RasterError('raster-truncated', {
    found,
    expected: 'a whole file',
    remedy: 'The file is cut short or damaged: copy or export it again.',
  });
