import type { Request, RequestHandler, Response } from 'express';

/** Runs one Express middleware as a step of a longer function; rejects with the error that it passes on. */
export const runMiddleware = (
  middleware: RequestHandler,
  request: Request,
  response: Response,
): Promise<void> =>
  new Promise((resolve, reject) => {
    void middleware(request, response, (error?: unknown) => {
      if (error === undefined || error === null) resolve();
      else reject(error instanceof Error ? error : new Error('A middleware failed', { cause: error }));
    });
  });
