import type { z } from 'zod';
import { fillPath, type Endpoint } from '#contract/endpoint.ts';
import { ProblemError } from './problem-error.ts';
import { sendRequest, type Answer, type Progress } from './send-request.ts';

export { ProblemError, errorText } from './problem-error.ts';
export type { Progress } from './send-request.ts';

/** `unknown` in the contract means: this endpoint takes none. */
type Part<Name extends string, Schema extends z.ZodType> =
  unknown extends z.input<Schema> ? { [K in Name]?: undefined } : { [K in Name]: z.input<Schema> };
type OptionalPart<Name extends string, Schema extends z.ZodType> = { [K in Name]?: z.input<Schema> };

/** The parts of an address. */
export type AddressInput<E extends Endpoint> = Part<'params', E['params']> &
  OptionalPart<'query', E['query']>;

/** What goes with a call; `file` for endpoints of kind `form`, `bytes` for those of kind `bytes`. */
export type CallInput<E extends Endpoint> = AddressInput<E> &
  Part<'body', E['body']> & {
    file?: File;
    bytes?: Blob;
    /** bytes sent so far, while a file goes up */
    onProgress?: (progress: Progress) => void;
    signal?: AbortSignal;
  };

/** The same, for the code below, which treats all endpoints alike. */
interface RawInput {
  params?: unknown;
  query?: unknown;
  body?: unknown;
  file?: File;
  bytes?: Blob;
  onProgress?: (progress: Progress) => void;
  signal?: AbortSignal;
}

const signedOutListeners = new Set<() => void>();
/** Calls `listener` whenever a call finds that nobody is signed in any more. Returns how to stop. */
export function onSignedOut(listener: () => void): () => void {
  signedOutListeners.add(listener);
  return () => signedOutListeners.delete(listener);
}

/**
 * Asks the server what the endpoint stands for and parses the reply with the endpoint's own schema.
 *
 * @throws {ProblemError} when refused (with the problem report), when no answer came, or when it cannot be read
 * @throws {DOMException} `AbortError` when `signal` was aborted
 */
export async function callEndpoint<E extends Endpoint>(
  endpoint: E,
  input: CallInput<E>,
): Promise<z.output<E['reply']>> {
  const answer = await ask(endpoint, input);
  if (endpoint.replyKind !== 'json') return undefined as z.output<E['reply']>;
  const reply = endpoint.reply.safeParse(parseJson(answer));
  if (!reply.success) throw ProblemError.unreadable(answer.status);
  return reply.data as z.output<E['reply']>;
}

/** As `callEndpoint`, for endpoints that answer with bytes: they pass the page by, on their way to a worker. */
export async function fetchBlob<E extends Endpoint>(endpoint: E, input: CallInput<E>): Promise<Blob> {
  return (await ask(endpoint, input, 'blob')).blob ?? new Blob();
}

/** The address of an endpoint, for links that the browser follows or downloads. */
export function endpointUrl<E extends Endpoint>(endpoint: E, input: AddressInput<E>): string {
  return address(endpoint, input);
}

function address(endpoint: Endpoint, input: RawInput): string {
  const path = fillPath(endpoint.path, input.params as Record<string, string | number> | undefined);
  const query = new URLSearchParams();
  for (const [name, value] of Object.entries(
    (input.query ?? {}) as Record<string, string | number | undefined>,
  )) {
    if (value !== undefined) query.set(name, String(value));
  }
  const search = query.toString();
  return search === '' ? path : `${path}?${search}`;
}

async function ask(endpoint: Endpoint, input: RawInput, reads?: 'blob'): Promise<Answer> {
  const answer = await sendRequest({
    method: endpoint.method,
    url: address(endpoint, input),
    ...requestBody(endpoint, input),
    onProgress: input.onProgress,
    signal: input.signal,
    reads,
  });
  if (answer.status >= 200 && answer.status < 300) return answer;
  const error = ProblemError.fromReply(answer.status, answer.text);
  if (error.code === 'not-signed-in') signedOutListeners.forEach((listener) => listener());
  throw error;
}

function requestBody(endpoint: Endpoint, input: RawInput): { body?: BodyInit; contentType?: string } {
  if (endpoint.bodyKind === 'bytes') {
    if (input.bytes === undefined) throw new Error(`${endpoint.path} needs bytes`);
    return { body: input.bytes, contentType: 'application/octet-stream' };
  }
  if (endpoint.bodyKind === 'form') {
    if (input.file === undefined) throw new Error(`${endpoint.path} needs a file`);
    const form = new FormData();
    // Fields first: the server then knows what the file is for before its first byte comes.
    const fields = (input.body ?? {}) as Record<string, string | number | undefined>;
    for (const [name, value] of Object.entries(fields)) {
      // What is left out is no field: a form would write the word `undefined` for it.
      if (value !== undefined) form.set(name, String(value));
    }
    form.set('file', input.file, input.file.name);
    return { body: form };
  }
  return input.body === undefined
    ? {}
    : { body: JSON.stringify(input.body), contentType: 'application/json' };
}

function parseJson(answer: Answer): unknown {
  try {
    return JSON.parse(answer.text) as unknown;
  } catch {
    return undefined;
  }
}
