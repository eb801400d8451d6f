import { z } from 'zod';
import { studyRunSchema } from '#sim-core/spec/study-run.ts';
import { ensembleParams, ensemblePath } from './comparisons.ts';
import { endpoint, sha256 } from './endpoint.ts';

/** Most study runs that are kept of one option under one outlook. */
export const mostStudyRuns = 50_000;

/** Study runs stand under the option and outlook that they are of, each under the key of all that decides it. */
export const putStudyRuns = endpoint({
  method: 'PUT',
  path: `${ensemblePath}/study-runs`,
  summary: 'Store runs of a study of what matters; repeating it is harmless',
  params: ensembleParams,
  body: z.strictObject({ runs: z.array(studyRunSchema).min(1).max(64) }),
  reply: z.object({ done: z.number().int() }),
});
export const getStudyRuns = endpoint({
  method: 'GET',
  path: `${ensemblePath}/study-runs`,
  summary: 'The stored study runs of an option under an outlook, in the order in which they came',
  params: ensembleParams,
  query: z.object({
    offset: z.coerce.number().int().min(0).default(0),
    limit: z.coerce.number().int().min(1).max(500).default(500),
  }),
  reply: z.object({
    runs: z.array(z.object({ key: sha256, run: studyRunSchema })),
    total: z.number().int(),
  }),
});
