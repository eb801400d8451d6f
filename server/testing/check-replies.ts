import { Ajv2020, type ValidateFunction } from 'ajv/dist/2020.js';
import addFormats from 'ajv-formats';
import type { RequestHandler, Response } from 'express';
import { describeApi, type ApiDescription } from '#server/features/api/describe-api.ts';
import { allRoutes } from '#server/routes.ts';
import type { Services } from '#server/services.ts';

/** What is answered in place of a reply that the API's description does not allow: no test expects it. */
export const undescribed = 599;

/** Compiled once in each test process: all its servers have the same routes. */
let checks: ReturnType<typeof createChecks> | undefined;

function createChecks(description: ApiDescription) {
  const ajv = new Ajv2020({ strict: false, allErrors: false, validateFormats: true });
  addFormats.default(ajv);
  ajv.addSchema({ $id: 'api', ...description });
  const compiled = new Map<string, ValidateFunction>();
  return { description, schemaAt, contentOf };

  function schemaAt(pointer: string): ValidateFunction {
    const known = compiled.get(pointer) ?? ajv.compile({ $ref: `api#${pointer}` });
    compiled.set(pointer, known);
    return known;
  }

  function contentOf(path: string, method: string, status: number): Content {
    const responses = description.paths[path]?.[method]?.responses;
    const key = String(status) in (responses ?? {}) ? String(status) : status >= 400 ? 'default' : undefined;
    const response = key === undefined ? undefined : responses?.[key];
    if (!response || key === undefined) return null;
    const at = ['paths', path, method, 'responses', key, 'content'];
    return new Map(
      Object.entries(response.content ?? {}).map(([type, { schema }]) => [
        type,
        schema && [...at, type, 'schema'].map(escaped).join(''),
      ]),
    );
  }
}

/** A step of a JSON pointer within a URI (RFC 6901). */
const escaped = (step: string) => `/${encodeURIComponent(step.replace(/~/g, '~0').replace(/\//g, '~1'))}`;

/** Holds every reply of a test server to the API's description: status, media type and schema. */
export function checkReplies(services: Services): RequestHandler {
  return (request, response, next) => {
    const asked = () => {
      const { path } = (request as { route?: { path?: unknown } }).route ?? {};
      if (typeof path !== 'string' || !path.startsWith('/api/')) return undefined;
      checks ??= createChecks(describeApi(allRoutes(services)));
      // Express answers HEAD by the handler of GET.
      const method = request.method === 'HEAD' ? 'get' : request.method.toLowerCase();
      return checks.contentOf(path.replace(/:(\w+)/g, '{$1}'), method, response.statusCode);
    };
    let wrong: string | undefined;
    const sendJson = response.json.bind(response);
    response.json = (body: unknown) => {
      wrong = whatIsWrongWith(body, response, asked());
      return sendJson(body);
    };
    const writeHead = response.writeHead.bind(response) as (...given: unknown[]) => Response;
    response.writeHead = ((status: number, ...given: unknown[]) => {
      wrong ??= whatIsWrongAbout(response, asked());
      if (wrong === undefined) return writeHead(status, ...given);
      response.setHeader('X-Undescribed', wrong);
      return writeHead(undescribed, ...given);
    }) as typeof response.writeHead;
    next();
  };
}

/** Media types of a reply with the pointers to their schemas; null of a status that is not described. */
type Content = ReadonlyMap<string, string | undefined> | null | undefined;

function whatIsWrongAbout(response: Response, content: Content): string | undefined {
  if (content === null) return `answered ${response.statusCode}, which is not described`;
  if (!content || content.size === 0) return undefined;
  const type = typeOf(response);
  if (content.has(type)) return undefined;
  return `answered ${response.statusCode} as ${type}; described is ${[...content.keys()].join(', ')}`;
}

const typeOf = (response: Response) => String(response.getHeader('Content-Type')).split(';')[0];

function whatIsWrongWith(body: unknown, response: Response, content: Content): string | undefined {
  const type = response.hasHeader('Content-Type') ? typeOf(response) : 'application/json';
  const pointer = content?.get(type);
  if (pointer === undefined) return undefined;
  const check = checks!.schemaAt(pointer);
  if (check(JSON.parse(JSON.stringify(body)))) return undefined;
  const [{ instancePath = '', message = '' } = {}] = check.errors ?? [];
  return `answered what its schema does not allow: ${instancePath} ${message}`;
}
