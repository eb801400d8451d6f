import express, { type Express } from 'express';
import helmet from 'helmet';
import { clientPages } from './client-pages.ts';
import { nothingHere, problemWriter } from './middleware/errors.ts';
import { mountRoutes } from './middleware/mount-routes.ts';
import { requestLog } from './middleware/request-log.ts';
import { sameOrigin } from './middleware/same-origin.ts';
import { allRoutes } from './routes.ts';
import type { Services } from './services.ts';

/** `blob:` workers are geotiff's, WASM is the kernel's, inline style is what dialogs set on the page. */
const securityHeaders = (publicUrl: string) => {
  const https = publicUrl.startsWith('https:');
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'", "'wasm-unsafe-eval'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        workerSrc: ["'self'", 'blob:'],
        objectSrc: ["'none'"],
        baseUri: ["'self'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        ...(https ? { upgradeInsecureRequests: [] } : {}),
      },
    },
    strictTransportSecurity: https,
    xFrameOptions: { action: 'deny' },
    // One-time links carry their token in the path.
    referrerPolicy: { policy: 'no-referrer' },
  });
};

/**
 * The whole product behind one address: the API, and the client where it is built.
 * @param clientFolder of the built client, where it is not the project's own
 */
export function createApp(services: Services, clientFolder?: string): Express {
  const { config, log } = services;
  const app = express();
  app.set('trust proxy', config.trustProxy);
  app.set('query parser', 'simple');
  app.use(requestLog(log), securityHeaders(config.publicUrl));
  app.use('/api', sameOrigin(config.publicUrl));
  mountRoutes(app, allRoutes(services), services);
  app.use('/api', nothingHere);
  app.use(clientPages(clientFolder));
  app.use(problemWriter);
  return app;
}
