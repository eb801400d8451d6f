import { existsSync } from 'node:fs';
import { join } from 'node:path';
import express, { Router } from 'express';
import { projectRoot } from './project.ts';

/**
 * Serves the built client. Assets carry their hash in the name and are kept for good; one that is missing is a 404, not a
 * page. Every other address is the client's to resolve, and its page is asked for anew each time.
 * @param folder of the build; without one, only the API answers (Vite serves the client while developing)
 */
export function clientPages(folder = join(projectRoot, '.build/app')): Router {
  const router = Router();
  if (!existsSync(join(folder, 'index.html'))) return router;
  router.use(
    '/assets',
    express.static(join(folder, 'assets'), {
      immutable: true,
      maxAge: '1y',
      fallthrough: false,
      index: false,
    }),
  );
  router.use(express.static(folder, { index: false, maxAge: '1h' }));
  router.get('/{*splat}', (_request, response) => {
    response.set('Cache-Control', 'no-cache');
    // By root and name: a whole path with a dot folder in it, as the build's, would be refused.
    response.sendFile('index.html', { root: folder, cacheControl: false });
  });
  return router;
}
