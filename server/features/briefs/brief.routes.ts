import * as contract from '#contract/briefs.ts';
import { roles, type Role } from '#contract/people.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { listBriefMessages, sendBrief } from './brief-mail.service.ts';
import { briefReply, listBriefs } from './brief-reply.ts';
import { briefMap, briefPdf, copyBrief, deleteBrief, makeBrief, saveBrief } from './brief.service.ts';

/** Whoever compares options hands over what comes of it. */
const writers: readonly Role[] = ['modeller', 'manager', 'admin'];

/** What is handed over of a comparison: a page and an annex, in versions, as PDF and by e-mail. */
export function briefRoutes(services: Services): Route[] {
  const { manager } = services.dataSource;
  return [
    route(contract.listBriefs, { site: roles }, async ({ params }) => ({
      briefs: await listBriefs(manager, params.siteId),
    })),
    route(contract.makeBrief, { site: writers }, ({ params, body, person }) =>
      makeBrief(services, params.siteId, body.comparisonId, person.name),
    ),
    route(contract.getBrief, { site: roles }, ({ params }) =>
      briefReply(manager, params.siteId, params.briefId),
    ),
    route(contract.deleteBrief, { site: writers }, ({ params }) => deleteBrief(services, params)),
    route(contract.copyBrief, { site: writers }, ({ params, person }) =>
      copyBrief(services, params, person.name),
    ),
    route(contract.saveBrief, { site: writers }, ({ params, body, person }) =>
      saveBrief(services, params, body, person.name),
    ),
    route(contract.getBriefVersion, { site: roles }, ({ params }) =>
      briefReply(manager, params.siteId, params.briefId, params.version),
    ),
    route(contract.getBriefPdf, { site: roles }, ({ params }) => briefPdf(services, params, params.version)),
    route(contract.getBriefMap, { site: roles }, ({ params }) =>
      briefMap(services, params, params.version, params.option),
    ),
    route(contract.listBriefMessages, { site: writers }, ({ params }) => listBriefMessages(services, params)),
    route(contract.sendBrief, { site: writers }, ({ params, body, person }) =>
      sendBrief(services, params, body, person),
    ),
  ];
}
