import type { Problem, ProblemCode } from '#contract/problem.ts';

export type ProblemExtra = Pick<Problem, 'fields' | 'found' | 'expected' | 'remedy'>;

/** A refusal that the client is told about: its code decides the status. */
export class ProblemError extends Error {
  override name = 'ProblemError';
  readonly code: ProblemCode;
  readonly extra: ProblemExtra;

  /** @param detail what was found, what was expected, how to mend it; shown to people */
  constructor(code: ProblemCode, detail: string, extra: ProblemExtra = {}) {
    super(detail);
    this.code = code;
    this.extra = extra;
  }
}

/** A refusal at fields of the body, named as in the schema: `works.3.x`. */
export const refuseFields = (fields: NonNullable<ProblemExtra['fields']>): ProblemError =>
  new ProblemError('invalid-request', fields.map(({ field, message }) => `${field}: ${message}`).join('. '), {
    fields,
  });

/** A refusal at one field of the body. */
export const fieldProblem = (field: string, message: string): ProblemError =>
  refuseFields([{ field, message }]);

/** What is missing and what another team owns look alike. */
export const notFound = (): ProblemError =>
  new ProblemError('not-found', 'There is nothing at this address, or it is not yours to see.');

const titles: Record<ProblemCode, readonly [status: number, title: string]> = {
  'invalid-request': [400, 'The request is not right'],
  'not-signed-in': [401, 'Not signed in'],
  'wrong-credentials': [401, 'Wrong e-mail address or password'],
  'token-refused': [401, 'The access token does not work'],
  forbidden: [403, 'Not allowed'],
  'not-found': [404, 'Not found'],
  conflict: [409, 'Changed meanwhile'],
  gone: [410, 'This link no longer works'],
  'too-large': [413, 'Too large'],
  'not-a-geotiff': [422, 'Not a GeoTIFF'],
  'raster-truncated': [422, 'The file is cut short'],
  'raster-too-large': [422, 'The raster is too large'],
  'raster-not-georeferenced': [422, 'The raster has no georeference'],
  'raster-not-projected': [422, 'The raster is not projected'],
  'raster-not-metric': [422, 'The raster is not in metres'],
  'raster-not-square': [422, 'The cells are not square'],
  'raster-rotated': [422, 'The raster is rotated'],
  'raster-bands': [422, 'The raster has more than one band'],
  'raster-type': [422, 'The data type cannot be used'],
  'raster-empty': [422, 'The raster has no data'],
  'raster-values': [422, 'The values cannot be used'],
  'raster-crs': [422, 'The raster’s coordinate system cannot be used'],
  'raster-elsewhere': [422, 'The raster lies elsewhere'],
  'grid-mismatch': [422, 'The raster does not fit the grid'],
  'digest-mismatch': [422, 'The digest does not agree'],
  'too-many-requests': [429, 'Too many attempts'],
  internal: [500, 'Something went wrong'],
};

export const statusOf = (code: ProblemCode): number => titles[code][0];
export const titleOf = (code: ProblemCode): string => titles[code][1];
