import type { Readable } from 'node:stream';
import type { Request, RequestHandler, Response } from 'express';
import type { z } from 'zod';
import type { Endpoint } from '#contract/endpoint.ts';
import type { Role } from '#contract/people.ts';
import type { TokenLimits } from './access-token.ts';
import type { CountedAttempts } from './attempts.ts';

/**
 * Who may use a route. `team`, `site` and `run` name the roles that may, in the team that owns what `:teamId`, `:siteId`
 * or `:runId` of the path points at; to everybody outside that team it does not exist.
 */
export type Access =
  | 'anyone'
  | 'signed-in'
  | { readonly team: readonly Role[] }
  | { readonly site: readonly Role[] }
  | { readonly run: readonly Role[] };

export interface SignedIn {
  id: string;
  name: string;
  email: string;
}
export interface CallMembership {
  teamId: string;
  role: Role;
}

/** A checked request: signed in and admitted as the access rule says, parsed as the endpoint says. */
export interface Call<E extends Endpoint = Endpoint, A extends Access = Access> {
  params: z.output<E['params']>;
  query: z.output<E['query']>;
  body: z.output<E['body']>;
  /** the body of a `bytes` endpoint whose route has a `bodyLimit`; else it is left unread in `request` */
  bytes: Buffer | undefined;
  person: A extends 'anyone' ? SignedIn | undefined : SignedIn;
  /** the caller's membership in the team that owns what the route is about */
  membership: A extends string ? undefined : CallMembership;
  /** what the access token allows that the caller came with; undefined of whoever came with a session */
  token: TokenLimits | undefined;
  request: Request;
  response: Response;
}

/** A reply that is not JSON. */
export interface BytesReply {
  bytes: Uint8Array | Readable;
  type: string;
  /** makes it a download of that name */
  fileName?: string;
  /** without quotes; answers `If-None-Match` */
  etag?: string;
  /** the bytes at this address never change, so browsers may keep them; needs an `etag` */
  immutable?: boolean;
  length?: number;
}

/** What a handler returns: the endpoint's JSON, bytes, or nothing. */
export type Reply<E extends Endpoint> =
  unknown extends z.input<E['reply']> ? BytesReply | void : z.input<E['reply']>;

export interface RouteOptions {
  /** bytes; 2 MB for JSON unless said; for a `bytes` endpoint it asks for the body in `call.bytes` */
  bodyLimit?: number;
  /** reads a `form` body: puts the text fields in `request.body` and the file where the handler finds it */
  form?: RequestHandler;
  /** counts attempts by address and by account or link */
  limitAttempts?: CountedAttempts;
  /** whether access tokens may be used here; where a rule names roles they are unless said, else they are not */
  tokens?: 'taken' | 'refused';
}

/** Closed to access tokens, though its rule names roles: people and their letters. */
export const sessionsOnly: RouteOptions = { tokens: 'refused' };

/** An endpoint with its rule and its handler. */
export interface Route {
  readonly endpoint: Endpoint;
  readonly access: Access;
  readonly options: RouteOptions;
  readonly handle: (call: Call) => unknown;
}

/** Whether a route answers to access tokens; accounts, sessions and whatever makes members are closed to them. */
export const takesTokens = ({ access, options }: Pick<Route, 'access' | 'options'>): boolean =>
  (options.tokens ?? (typeof access === 'string' ? 'refused' : 'taken')) === 'taken';

/** The parameter of the path that an access rule looks at. */
export const scopeParameter = (access: Exclude<Access, string>): 'teamId' | 'siteId' | 'runId' =>
  'team' in access ? 'teamId' : 'site' in access ? 'siteId' : 'runId';

/**
 * Joins an endpoint, the rule of who may use it, and what it does. There is no route without a rule.
 * @throws Error when the path has no parameter for the rule to look at, or a form has no reader
 */
export function route<E extends Endpoint, const A extends Access>(
  endpoint: E,
  access: A,
  handler: (call: Call<E, A>) => NoInfer<Reply<E>> | Promise<NoInfer<Reply<E>>>,
  options: RouteOptions = {},
): Route {
  const name = `${endpoint.method} ${endpoint.path}`;
  if (typeof access !== 'string' && !endpoint.path.includes(`:${scopeParameter(access)}`))
    throw new Error(`${name} has no :${scopeParameter(access)} for its access rule`);
  if ((endpoint.bodyKind === 'form') !== (options.form !== undefined))
    throw new Error(`${name} needs the option \`form\` exactly when its body is a form`);
  // mountRoutes parses with this very endpoint and admits by this very rule before it calls.
  return { endpoint, access, options, handle: handler };
}
