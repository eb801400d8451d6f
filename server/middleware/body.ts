import express, { type RequestHandler } from 'express';
import type { Route } from './route.ts';

const defaultJsonLimit = 2 * 1024 * 1024;

const nothing: RequestHandler = (_request, _response, next) => next();

/** The reader of a route's body. It runs after the access rule: whoever is refused makes the server read nothing. */
export function bodyReader({ endpoint, options }: Route): RequestHandler {
  if (endpoint.method === 'GET' || endpoint.method === 'DELETE') return nothing;
  if (options.form) return options.form;
  if (endpoint.bodyKind === 'json') return express.json({ limit: options.bodyLimit ?? defaultJsonLimit });
  return options.bodyLimit ? express.raw({ type: () => true, limit: options.bodyLimit }) : nothing;
}
