import { z } from 'zod';

/** How the body of a request travels: JSON, one file with text fields, or bare bytes. */
export type BodyKind = 'json' | 'form' | 'bytes';

/**
 * One thing that a client may ask of the server. The server mounts it with an access rule, the app calls it by the same
 * object, and both parse what they receive with the same schemas.
 */
export interface Endpoint<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Reply extends z.ZodType = z.ZodType,
> {
  readonly method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  /** Express path, e.g. `/api/sites/:siteId` */
  readonly path: string;
  readonly params: Params;
  readonly query: Query;
  readonly body: Body;
  readonly bodyKind: BodyKind;
  /** JSON reply; absent when `replyKind` is `bytes` or `none` */
  readonly reply: Reply;
  readonly replyKind: 'json' | 'bytes' | 'none';
  /** media type of a `bytes` reply; bare bytes of our own unless said */
  readonly replyType: string;
  /** what it is for, in one line */
  readonly summary: string;
}

const nothing = z.unknown();
type Nothing = typeof nothing;

interface EndpointInput<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType, R extends z.ZodType> {
  method: Endpoint['method'];
  path: string;
  summary: string;
  params?: P;
  query?: Q;
  body?: B;
  bodyKind?: BodyKind;
  reply?: R;
  replyKind?: Endpoint['replyKind'];
  replyType?: string;
}

/** Fills in what an endpoint does not say: no parameters, no body, no reply. */
export function endpoint<
  P extends z.ZodType = Nothing,
  Q extends z.ZodType = Nothing,
  B extends z.ZodType = Nothing,
  R extends z.ZodType = Nothing,
>(input: EndpointInput<P, Q, B, R>): Endpoint<P, Q, B, R> {
  return {
    params: nothing as unknown as P,
    query: nothing as unknown as Q,
    body: nothing as unknown as B,
    reply: nothing as unknown as R,
    bodyKind: 'json',
    replyKind: input.reply ? 'json' : 'none',
    replyType: 'application/octet-stream',
    ...input,
  };
}

/** The path with its parameters filled in. */
export function fillPath(path: string, params: Record<string, string | number> = {}): string {
  return path.replace(/:(\w+)/g, (_, name: string) => {
    const value = params[name];
    if (value === undefined) throw new Error(`${path} needs the parameter ${name}`);
    return encodeURIComponent(String(value));
  });
}

export const id = z.uuid();
export const sha256 = z.string().regex(/^[0-9a-f]{64}$/, 'a SHA-256 in hexadecimal');
export const instant = z.iso.datetime();
/** Text that people type, without blanks at its ends, 1 to `longest` characters. */
export const text = (longest: number) =>
  z.string().trim().min(1, 'Fill this in').max(longest, `At most ${longest} characters`);
