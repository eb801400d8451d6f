import { z } from 'zod';
import { droughtRecordSchema } from '#sim-core/spec/drought-record.ts';
import { storedRecordSchema } from './drought-records.ts';
import { endpoint, id, text } from './endpoint.ts';
import { outlookSchema } from './outlooks.ts';
import { siteSchema } from './sites.ts';

const siteParams = z.object({ siteId: id });
const outlookParams = z.object({ siteId: id, outlookId: id });

export const setOutlook = endpoint({
  method: 'PUT',
  path: '/api/sites/:siteId/outlook',
  summary: 'Set the main outlook; survey, horizon, steps and edge hold for every outlook of the site',
  params: siteParams,
  body: outlookSchema,
  reply: siteSchema,
});
export const addOutlook = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/outlooks',
  summary: 'Keep a further outlook, on the span of the main one',
  params: siteParams,
  body: outlookSchema,
  reply: siteSchema,
});
export const changeOutlook = endpoint({
  method: 'PUT',
  path: '/api/sites/:siteId/outlooks/:outlookId',
  summary: 'Change a further outlook; its survey, horizon, steps and edge then hold for all',
  params: outlookParams,
  body: outlookSchema,
  reply: siteSchema,
});
export const deleteOutlook = endpoint({
  method: 'DELETE',
  path: '/api/sites/:siteId/outlooks/:outlookId',
  summary: 'Forget a further outlook; runs and comparisons made under it stay as they are',
  params: outlookParams,
  reply: siteSchema,
});
export const makeMainOutlook = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/outlooks/:outlookId/main',
  summary: 'Make a further outlook the main one; the one that was takes its place',
  params: outlookParams,
  reply: siteSchema,
});

export const listDroughtRecords = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/drought-records',
  summary: 'The drought records of a site with their values, the one in use first, then the newest replaced',
  params: siteParams,
  reply: z.object({ records: z.array(storedRecordSchema) }),
});
export const addDroughtRecord = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/drought-records',
  summary: 'Store a drought record; it takes the place of the one in use, which is kept',
  params: siteParams,
  body: z.strictObject({ record: droughtRecordSchema, fileName: text(200) }),
  reply: siteSchema,
});
export const deleteDroughtRecord = endpoint({
  method: 'DELETE',
  path: '/api/sites/:siteId/drought-records/:recordId',
  summary: 'Forget a drought record',
  params: z.object({ siteId: id, recordId: id }),
  reply: siteSchema,
});
