import * as contract from '#contract/outlook-endpoints.ts';
import { roles } from '#contract/people.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { keepers } from '../keepers.ts';
import * as service from './outlook.service.ts';

/** The outlooks of a site, and the drought record that they are fitted to. */
export function outlookRoutes(services: Services): Route[] {
  const manager = services.dataSource.manager;
  return [
    route(contract.setOutlook, { site: keepers }, ({ params, body }) =>
      service.setOutlook(services, params.siteId, body),
    ),
    route(contract.addOutlook, { site: keepers }, ({ params, body }) =>
      service.addOutlook(services, params.siteId, body),
    ),
    route(contract.changeOutlook, { site: keepers }, ({ params, body }) =>
      service.changeOutlook(services, params, body),
    ),
    route(contract.deleteOutlook, { site: keepers }, ({ params }) => service.deleteOutlook(services, params)),
    route(contract.makeMainOutlook, { site: keepers }, ({ params }) =>
      service.makeMainOutlook(services, params),
    ),
    route(contract.listDroughtRecords, { site: roles }, async ({ params }) => ({
      records: await service.listDroughtRecords(manager, params.siteId),
    })),
    route(contract.addDroughtRecord, { site: keepers }, ({ params, body, person }) =>
      service.addDroughtRecord(services, params.siteId, body, person.name),
    ),
    route(contract.deleteDroughtRecord, { site: keepers }, ({ params }) =>
      service.deleteDroughtRecord(services, params.siteId, params.recordId),
    ),
  ];
}
