import { healthRoutes } from './features/health/health.routes.ts';
import type { Route } from './middleware/route.ts';
import type { Services } from './services.ts';

/** Every route of the product. */
export const allRoutes = (services: Services): Route[] => [...healthRoutes(services)];
