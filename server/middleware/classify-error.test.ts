import multer from 'multer';
import { describe, expect, it } from 'vitest';
import { problemCodes } from '#contract/problem.ts';
import { classifyError } from './classify-error.ts';
import { fieldProblem, ProblemError, statusOf, titleOf } from './problem-error.ts';

describe('an error', () => {
  it('that is a problem already stays itself', () => {
    const problem = fieldProblem('works.3.x', 'lies outside the grid');
    expect(classifyError(problem)).toBe(problem);
  });

  it('of a raster keeps what was found, expected and how to mend it', () => {
    const raster = Object.assign(new Error('Five bands'), {
      code: 'raster-bands',
      found: '5 bands',
      expected: '1 band',
      remedy: 'gdal_translate -b 1',
    });
    const problem = classifyError(raster);
    expect(problem).toMatchObject({ code: 'raster-bands', message: 'Five bands' });
    expect(problem.extra).toEqual({ found: '5 bands', expected: '1 band', remedy: 'gdal_translate -b 1' });
  });

  it('of an upload has a status at last', () => {
    expect(classifyError(new multer.MulterError('LIMIT_FILE_SIZE', 'file')).code).toBe('too-large');
    const unexpected = classifyError(new multer.MulterError('LIMIT_UNEXPECTED_FILE', 'picture'));
    expect(unexpected).toMatchObject({ code: 'invalid-request', extra: { fields: [{ field: 'picture' }] } });
  });

  it.each([
    ['a code of the system', Object.assign(new Error('ENOENT: /srv/secret'), { code: 'ENOENT' })],
    ['a problem code without its parts', Object.assign(new Error('secret'), { code: 'raster-bands' })],
    ['something thrown that is no error', 'secret'],
    ['nothing', undefined],
  ])('that is %s says nothing', (_case, error) => {
    const problem = classifyError(error);
    expect(problem.code).toBe('internal');
    expect(problem.message).not.toContain('secret');
  });
});

it('every code has a status and a title', () => {
  for (const code of problemCodes) {
    expect(statusOf(code), code).toBeGreaterThanOrEqual(400);
    expect(titleOf(code), code).toMatch(/^[A-Z]/);
    expect(new ProblemError(code, 'x').code).toBe(code);
  }
});
