import * as contract from '#contract/comparisons.ts';
import { roles, type Role } from '#contract/people.ts';
import * as studies from '#contract/studies.ts';
import { route, type BytesReply, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { comparisonReply, listComparisons, mapsState } from './comparison-reply.ts';
import {
  copyComparison,
  decide,
  deleteComparison,
  endComparison,
  renameComparison,
  resumeComparison,
  startComparison,
} from './comparison.service.ts';
import {
  findStoredMap,
  getReplicates,
  putEnsembleMap,
  putMapsState,
  putReplicates,
  type EnsembleParams,
} from './ensemble.service.ts';
import { getStudyRuns, putStudyRuns } from './study-run.service.ts';

/** Whoever plans the works may see what comes of them. */
const runners: readonly Role[] = ['modeller', 'manager', 'admin'];
/** Whoever answers for the money decides. */
const deciders: readonly Role[] = ['manager', 'admin'];

/** 64 replicates of 500 years. */
const bodyLimit = 4 * 1024 * 1024;

/** Ensembles of several options with the same luck, and the decision taken on them. */
export function comparisonRoutes(services: Services): Route[] {
  const manager = services.dataSource.manager;
  const sendStored = async (params: EnsembleParams, map: string): Promise<BytesReply> => {
    const { hash, frozen } = await findStoredMap(manager, params, map);
    const { stream, bytes } = await services.blobs.open(hash);
    return { bytes: stream, length: bytes, type: 'application/octet-stream', etag: hash, immutable: frozen };
  };
  return [
    route(contract.listComparisons, { site: roles }, ({ params, query }) =>
      listComparisons(manager, params.siteId, query),
    ),
    route(
      contract.startComparison,
      { site: runners },
      ({ params, body, person }) => startComparison(services, params.siteId, body, person.name),
      { bodyLimit },
    ),
    route(contract.getComparison, { site: roles }, ({ params }) =>
      comparisonReply(manager, params.siteId, params.comparisonId),
    ),
    route(contract.renameComparison, { site: runners }, ({ params, body, person, membership }) =>
      renameComparison(services, params, body.name, {
        by: person.name,
        decides: deciders.includes(membership.role),
      }),
    ),
    route(contract.deleteComparison, { site: runners }, ({ params }) => deleteComparison(services, params)),
    route(contract.copyComparison, { site: runners }, ({ params, body, person }) =>
      copyComparison(services, params, body, person.name),
    ),
    route(
      contract.putReplicates,
      { site: runners },
      ({ params, body }) => putReplicates(services, params, body.replicates),
      { bodyLimit },
    ),
    route(contract.getReplicates, { site: roles }, ({ params, query }) =>
      getReplicates(manager, params, query),
    ),
    route(
      studies.putStudyRuns,
      { site: runners },
      ({ params, body }) => putStudyRuns(services, params, body.runs),
      { bodyLimit },
    ),
    route(studies.getStudyRuns, { site: roles }, ({ params, query }) => getStudyRuns(manager, params, query)),
    route(contract.putEnsembleMap, { site: runners }, ({ params, query, request }) =>
      putEnsembleMap(services, params, query.replicates, request),
    ),
    route(contract.getEnsembleMap, { site: roles }, ({ params }) => sendStored(params, params.map)),
    route(contract.putMapsState, { site: runners }, ({ params, query, request }) =>
      putMapsState(services, params, query.replicates, request),
    ),
    route(contract.getMapsState, { site: roles }, ({ params }) => sendStored(params, mapsState)),
    route(contract.endComparison, { site: runners }, ({ params, body, person }) =>
      endComparison(services, params, body.ending, person.name),
    ),
    route(contract.resumeComparison, { site: runners }, ({ params, body, person }) =>
      resumeComparison(services, params, body.replicates, person.name),
    ),
    route(contract.decide, { site: deciders }, ({ params, body, person }) =>
      decide(services, params, body, person.name),
    ),
  ];
}
