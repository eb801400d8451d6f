import type { z } from 'zod';
import { problemCodes, type ProblemCode } from '#contract/problem.ts';
import { fieldProblems } from '#sim-core/spec/problems.ts';
import { fieldProblem, notFound, ProblemError } from './problem-error.ts';

const tooLarge = (detail: string) => new ProblemError('too-large', detail);

/** The issues of a schema as fields; the detail repeats the first few for whoever reads the text alone. */
export function problemOfIssues(issues: readonly z.core.$ZodIssue[]): ProblemError {
  const fields = fieldProblems({ issues });
  const shown = fields.slice(0, 3).map(({ field, message }) => (field ? `${field}: ${message}` : message));
  const more = fields.length > 3 ? ` (and ${fields.length - 3} more)` : '';
  return new ProblemError('invalid-request', shown.join('. ') + more, { fields });
}

/** multer's errors carry no status. */
function problemOfUpload(code: string, field: string): ProblemError {
  if (code === 'LIMIT_FILE_SIZE')
    return tooLarge(
      'The file is larger than this server takes. Cut it to the site, or ask for a higher limit.',
    );
  if (code === 'LIMIT_UNEXPECTED_FILE')
    return fieldProblem(field || 'file', 'One file is expected, in `file`');
  return fieldProblem(field || 'form', `The form cannot be used (${code})`);
}

/** body-parser's errors, by their `type`. */
function problemOfBody(type: string): ProblemError | undefined {
  if (type === 'entity.too.large')
    return tooLarge('The request is larger than this address takes. Send less at once.');
  if (type === 'entity.parse.failed')
    return new ProblemError('invalid-request', 'The body is not JSON. Expected one JSON object.');
  if (type === 'request.aborted' || type === 'request.size.invalid')
    return new ProblemError(
      'invalid-request',
      'The request ended before its body was complete. Send it again.',
    );
  if (type.startsWith('encoding.') || type.startsWith('charset.'))
    return new ProblemError('invalid-request', 'The encoding of the body cannot be read. Expected UTF-8.');
  return undefined;
}

const isCode = (code: unknown): code is ProblemCode =>
  typeof code === 'string' && (problemCodes as readonly string[]).includes(code);

/**
 * Says once and for all what an error means to the client. Whatever is not known here is `internal`, which tells
 * outsiders nothing.
 */
export function classifyError(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  if (!(error instanceof Error)) return internal();
  const { code, field, type, status, found, expected, remedy } = error as Error & Record<string, unknown>;
  if (error.name === 'MulterError' && typeof code === 'string')
    return problemOfUpload(code, typeof field === 'string' ? field : '');
  // A refused raster: rasters/ is plain library code, so its errors are known by their parts.
  if (isCode(code) && typeof found === 'string' && typeof expected === 'string' && typeof remedy === 'string')
    return new ProblemError(code, error.message, { found, expected, remedy });
  if (typeof type === 'string') return problemOfBody(type) ?? internal();
  if (error instanceof URIError)
    return new ProblemError('invalid-request', 'The address is not well formed.');
  // A file of the client that is missing, as Express says it.
  return status === 404 ? notFound() : internal();
}

const internal = () =>
  new ProblemError(
    'internal',
    'The server could not finish this. Try again; if it happens again, tell whoever runs the server the request number.',
  );
