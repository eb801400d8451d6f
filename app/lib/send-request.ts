import { ProblemError } from './problem-error.ts';

/** Bytes sent so far, and in all where that is known. */
export interface Progress {
  sent: number;
  total: number | undefined;
}

export interface Request {
  method: string;
  url: string;
  body?: BodyInit;
  contentType?: string;
  onProgress?: (progress: Progress) => void;
  signal?: AbortSignal;
  /** what a good reply is read as; a refusal is text always */
  reads?: 'text' | 'blob';
}

/** `blob` for a good reply that was to be read as one; the browser then holds it outside of the page. */
export interface Answer {
  status: number;
  text: string;
  blob?: Blob;
}

/**
 * Sends one request to our own server. `fetch` cannot tell how much of a body has gone up, so requests that want
 * progress travel by XMLHttpRequest.
 *
 * @throws {ProblemError} `unreachable` when no answer came
 * @throws {DOMException} `AbortError` when aborted
 */
export function sendRequest(request: Request): Promise<Answer> {
  return request.onProgress === undefined ? sendByFetch(request) : sendByXhr(request, request.onProgress);
}

const accept = 'application/json, application/problem+json, */*';

async function sendByFetch(request: Request): Promise<Answer> {
  const { method, url, body, contentType, signal } = request;
  const headers: Record<string, string> = { accept };
  if (contentType !== undefined) headers['content-type'] = contentType;
  try {
    const reply = await fetch(url, { method, headers, body, signal, credentials: 'same-origin' });
    const { status } = reply;
    return request.reads === 'blob' && reply.ok
      ? { status, text: '', blob: await reply.blob() }
      : { status, text: await reply.text() };
  } catch (error) {
    if (signal?.aborted) throw abortError();
    if (error instanceof TypeError || error instanceof DOMException) throw ProblemError.unreachable();
    throw error;
  }
}

function sendByXhr(request: Request, onProgress: (progress: Progress) => void): Promise<Answer> {
  const { method, url, body, contentType, signal } = request;
  return new Promise((resolve, reject) => {
    if (signal?.aborted) return reject(abortError());
    const xhr = new XMLHttpRequest();
    const abort = () => xhr.abort();
    xhr.open(method, url);
    xhr.setRequestHeader('accept', accept);
    if (contentType !== undefined) xhr.setRequestHeader('content-type', contentType);
    xhr.upload.onprogress = ({ loaded, total, lengthComputable }) =>
      onProgress({ sent: loaded, total: lengthComputable ? total : undefined });
    xhr.onload = () => resolve({ status: xhr.status, text: xhr.responseText });
    xhr.onerror = () => reject(ProblemError.unreachable());
    xhr.onabort = () => reject(abortError());
    xhr.onloadend = () => signal?.removeEventListener('abort', abort);
    signal?.addEventListener('abort', abort);
    xhr.send(body as XMLHttpRequestBodyInit | undefined);
  });
}

const abortError = () => new DOMException('The request was cancelled.', 'AbortError');
