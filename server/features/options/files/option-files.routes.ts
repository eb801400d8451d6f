import * as contract from '#contract/option-files.ts';
import { roles, type Role } from '#contract/people.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { exportCrew, exportGeoJson, exportPoints, previewWorks } from './option-files.service.ts';

/** Options are drawn, and so brought in, by whoever plans the works. */
const planners: readonly Role[] = ['modeller', 'manager', 'admin'];

/** Options as files: out for other programs and for crews, in from both. */
export const optionFileRoutes = (services: Services): Route[] => {
  const { manager } = services.dataSource;
  return [
    route(contract.exportGeoJson, { site: roles }, ({ params, query }) =>
      exportGeoJson(manager, params, query.crs),
    ),
    route(contract.exportPoints, { site: roles }, ({ params }) => exportPoints(manager, params)),
    route(contract.exportCrewGpx, { site: roles }, ({ params, query }) =>
      exportCrew(services, params, query, 'gpx'),
    ),
    route(contract.exportCrewCsv, { site: roles }, ({ params, query }) =>
      exportCrew(services, params, query, 'csv'),
    ),
    route(
      contract.readWorks,
      { site: planners },
      ({ params, body }) => previewWorks(manager, params.siteId, body),
      // JSON wraps the file in a string and escapes its quotes.
      { bodyLimit: 2 * contract.largestWorksFile },
    ),
  ];
};
