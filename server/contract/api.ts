import { z } from 'zod';
import { endpoint } from './endpoint.ts';

export const getApiDescription = endpoint({
  method: 'GET',
  path: '/api/openapi.json',
  summary: 'This API in OpenAPI 3.1',
  reply: z.looseObject({ openapi: z.string() }),
});
export const getApiPage = endpoint({
  method: 'GET',
  path: '/api/docs',
  summary: 'This API as a page to read',
  replyKind: 'bytes',
  replyType: 'text/html',
});
