import { z } from 'zod';
import type { Endpoint } from '#contract/endpoint.ts';
import { productVersion } from '#server/project.ts';
import { cookieName } from '#server/middleware/session.ts';
import { takesTokens, type Access, type Route } from '#server/middleware/route.ts';
import { capital, endpointNames, namedSchemas } from './contract-names.ts';

type Json = Record<string, unknown>;

/** An OpenAPI 3.1 document, as far as we fill it in. */
export interface ApiDescription {
  readonly openapi: '3.1.0';
  readonly info: Json;
  readonly tags: { readonly name: string }[];
  readonly paths: Record<string, Record<string, Operation>>;
  readonly components: { readonly schemas: Record<string, Json>; readonly securitySchemes: Json };
  readonly [more: string]: unknown;
}
export interface Operation {
  readonly operationId: string;
  readonly summary: string;
  readonly description: string;
  readonly tags: readonly string[];
  readonly parameters: readonly Json[];
  readonly requestBody?: { readonly required: true; readonly content: Content };
  readonly responses: Record<string, { readonly description: string; readonly content?: Content }>;
  readonly security: readonly Json[];
}
type Content = Record<string, { readonly schema?: Json }>;

const refTo = (name: string) => `#/components/schemas/${name}`;

/**
 * Describes every route by its endpoint's schemas and its access rule (OpenAPI 3.1.0, whose schemas are JSON Schema
 * 2020-12).
 *
 * @throws Error where a route's endpoint stands in no module that `contract-names.ts` lists
 */
export function describeApi(routes: readonly Route[]): ApiDescription {
  const schemas = describeSchemas(routes);
  const paths: Record<string, Record<string, Operation>> = {};
  for (const route of routes) {
    const path = route.endpoint.path.replace(/:(\w+)/g, '{$1}');
    (paths[path] ??= {})[route.endpoint.method.toLowerCase()] = describeRoute(route, schemas);
  }
  const headings = new Set(routes.map(({ endpoint }) => nameOf(endpoint).heading));
  return {
    openapi: '3.1.0',
    info: {
      title: 'Foothold API',
      version: productVersion,
      summary: 'What pages ask of the server, for scripts',
      license: { name: 'MIT', identifier: 'MIT' },
    },
    jsonSchemaDialect: 'https://json-schema.org/draft/2020-12/schema',
    servers: [{ url: '/' }],
    tags: [...endpointNames.values()]
      .map(({ heading }) => heading)
      .filter((heading, i, all) => headings.has(heading) && all.indexOf(heading) === i)
      .map((name) => ({ name })),
    paths,
    components: {
      schemas: schemas.components,
      securitySchemes: {
        session: {
          type: 'apiKey',
          in: 'cookie',
          name: cookieName,
          description: 'Signed in as in a browser: POST /api/session sets the cookie.',
        },
        token: {
          type: 'http',
          scheme: 'bearer',
          description:
            'An access token of the account page, for scripts: it may do what its person’s role allows, as far as its ' +
            'scope and its team go. Where it is sent, the cookie is not looked at.',
        },
      },
    },
  };
}

function nameOf(endpoint: Endpoint) {
  const found = endpointNames.get(endpoint);
  if (!found)
    throw new Error(`${endpoint.method} ${endpoint.path} stands in no module that contract-names.ts lists`);
  return found;
}

const isSaid = (schema: z.ZodType) => !(schema instanceof z.ZodUnknown);

/** Schemas of one description: those that the contract names, and those of endpoints. */
interface Schemas {
  readonly components: Record<string, Json>;
  /** a reference to the schema of a body or a reply */
  refTo(schema: z.ZodType): Json;
}

/** What travels is what is parsed at its end, so every schema is described as input. */
const asInput = { target: 'draft-2020-12', io: 'input', unrepresentable: 'any' } as const;

const without = (schema: Json, ...names: string[]): Json =>
  Object.fromEntries(Object.entries(schema).filter(([name]) => !names.includes(name)));

/** A schema by itself, without references. */
function inPlace(schema: z.ZodType): Json {
  return without(z.toJSONSchema(schema, { ...asInput, metadata: z.registry() }), '$schema');
}

function describeSchemas(routes: readonly Route[]): Schemas {
  const registry = z.registry<{ id: string }>();
  const names = namedSchemas();
  for (const { endpoint } of routes)
    for (const what of ['body', 'reply'] as const) {
      const schema = endpoint[what];
      if (isSaid(schema) && !names.has(schema))
        names.set(schema, `${capital(nameOf(endpoint).name)}${capital(what)}`);
    }
  for (const [schema, id] of names) registry.add(schema, { id });
  const { schemas } = z.toJSONSchema(registry, {
    ...asInput,
    uri: refTo,
    override: ({ zodSchema, jsonSchema }) => {
      const { def } = zodSchema._zod;
      // What is drawn anew each time, such as an id, is no default to write down.
      if (def.type === 'default' && String(def.defaultValue) !== String(def.defaultValue))
        delete jsonSchema.default;
    },
  });
  const components = Object.entries(schemas).map(
    ([id, schema]) => [id, without(schema as Json, '$schema', '$id')] as const,
  );
  return {
    components: Object.fromEntries(components.toSorted(([a], [b]) => (a < b ? -1 : 1))),
    refTo: (schema) => ({ $ref: refTo(names.get(schema)!) }),
  };
}

function describeRoute(route: Route, schemas: Schemas): Operation {
  const { endpoint, access, options } = route;
  const { name, heading } = nameOf(endpoint);
  const takesBody = endpoint.method !== 'GET' && endpoint.method !== 'DELETE';
  return {
    operationId: name,
    summary: endpoint.summary,
    description: `${whoMay(access)}${whichTokens(route)}`,
    tags: [heading],
    parameters: [...parametersOf(endpoint, 'params', 'path'), ...parametersOf(endpoint, 'query', 'query')],
    ...(takesBody && bodyOf(endpoint, schemas)),
    responses: {
      ...successOf(endpoint, schemas),
      ...Object.fromEntries(
        refusals(endpoint, access, options.limitAttempts !== undefined).map(([status, description]) => [
          status,
          { description, content: problemContent },
        ]),
      ),
    },
    security: access === 'anyone' ? [] : [{ session: [] }, ...(takesTokens(route) ? [{ token: [] }] : [])],
  };
}

function whoMay(access: Access): string {
  if (access === 'anyone') return 'Needs no account.';
  if (access === 'signed-in') return 'For whoever is signed in.';
  const roles = 'team' in access ? access.team : 'site' in access ? access.site : access.run;
  return `For members of the team whose role is ${roles.join(', ')}; to everybody outside the team it does not exist.`;
}

function whichTokens(route: Route): string {
  if (route.access === 'anyone') return '';
  if (!takesTokens(route)) return ' Not by access token.';
  return route.endpoint.method === 'GET'
    ? ' By any access token.'
    : ' By access tokens that may read and write.';
}

function parametersOf(endpoint: Endpoint, what: 'params' | 'query', place: 'path' | 'query'): Json[] {
  const names = [...endpoint.path.matchAll(/:(\w+)/g)].map(([, name]) => name);
  const { properties = {}, required = [] } = inPlace(endpoint[what]) as {
    properties?: Record<string, Json>;
    required?: string[];
  };
  const listed = what === 'params' ? names : Object.keys(properties);
  return listed.map((name) => ({
    name,
    in: place,
    required: what === 'params' || required.includes(name),
    schema: properties[name] ?? { type: 'string' },
  }));
}

function bodyOf(endpoint: Endpoint, schemas: Schemas): Pick<Operation, 'requestBody'> {
  if (endpoint.bodyKind === 'bytes')
    return { requestBody: { required: true, content: { 'application/octet-stream': {} } } };
  if (!isSaid(endpoint.body) && endpoint.bodyKind === 'json') return {};
  if (endpoint.bodyKind === 'json')
    return {
      requestBody: {
        required: true,
        content: { 'application/json': { schema: schemas.refTo(endpoint.body) } },
      },
    };
  const file = {
    type: 'object',
    properties: { file: { type: 'string', contentMediaType: 'application/octet-stream' } },
    required: ['file'],
  };
  // A form has a file beside its fields, which the schema of the fields alone would refuse.
  const fields = without(inPlace(endpoint.body), 'additionalProperties');
  return {
    requestBody: {
      required: true,
      content: { 'multipart/form-data': { schema: { allOf: [fields, file] } } },
    },
  };
}

function successOf(endpoint: Endpoint, schemas: Schemas): Operation['responses'] {
  if (endpoint.replyKind === 'none') return { '204': { description: 'Done' } };
  if (endpoint.replyKind === 'bytes')
    return {
      '200': { description: 'The file or the bytes', content: { [endpoint.replyType]: {} } },
      '304': { description: 'Unchanged since the copy that the request names' },
    };
  return {
    '200': {
      description: 'Done',
      content: { 'application/json': { schema: schemas.refTo(endpoint.reply) } },
    },
  };
}

const problemContent: Content = { 'application/problem+json': { schema: { $ref: refTo('Problem') } } };

/** Why a request may be refused, by status, as RFC 9457 problems. */
function refusals(endpoint: Endpoint, access: Access, counted: boolean): [string, string][] {
  const takesInput = isSaid(endpoint.body) || isSaid(endpoint.query) || endpoint.bodyKind !== 'json';
  const scoped = typeof access !== 'string';
  return [
    ...(takesInput ? [['400', 'A field is wrong; `fields` says which'] as [string, string]] : []),
    ...(access === 'anyone'
      ? []
      : [['401', 'Not signed in, or the access token does not work'] as [string, string]]),
    ...(scoped ? [['403', 'The role or the access token does not allow it'] as [string, string]] : []),
    ...(scoped || endpoint.path.includes(':')
      ? [['404', 'There is no such thing in any team of the caller'] as [string, string]]
      : []),
    ...(counted ? [['429', 'Tried too often'] as [string, string]] : []),
    ['default', 'Refused for another reason: `code` says which, `detail` what to do'],
  ];
}
