import { roles, type Role } from '#contract/people.ts';
import * as contract from '#contract/runs.ts';
import { notFound } from '#server/middleware/problem-error.ts';
import { route, type BytesReply, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { exportClosing, exportFrame, exportSeries } from './run-exports.service.ts';
import { exportPackage, exportSpec } from './run-package.service.ts';
import { putClosing, putFrame } from './run-maps.service.ts';
import { listRuns, requireRun, runReply } from './run-reply.ts';
import { findFrame } from './run.repository.ts';
import { checkRun, deleteRun, finishRun, renameRun, startRun, stopRun } from './run.service.ts';

/** Whoever plans the works may see what comes of them. */
const runners: readonly Role[] = ['modeller', 'manager', 'admin'];

/** A spec with 20,000 works; a series of 500 years by month. */
const bodyLimit = 16 * 1024 * 1024;

/** Simulated futures: kept as they are computed, replayed, checked and exported. */
export function runRoutes(services: Services): Route[] {
  const manager = services.dataSource.manager;

  /** A map of a run that is over never changes; while it runs, a frame may be sent again. */
  const sendMap = async (hash: string, over: boolean): Promise<BytesReply> => {
    const { stream, bytes } = await services.blobs.open(hash);
    return { bytes: stream, length: bytes, type: 'application/octet-stream', etag: hash, immutable: over };
  };

  return [
    route(contract.listRuns, { site: roles }, ({ params, query }) => listRuns(manager, params.siteId, query)),
    route(
      contract.startRun,
      { site: runners },
      ({ params, body, person }) => startRun(services, params.siteId, body, person.name),
      { bodyLimit },
    ),
    route(contract.getRun, { run: roles }, ({ params }) => runReply(manager, params.runId)),
    route(contract.renameRun, { run: runners }, ({ params, body }) =>
      renameRun(services, params.runId, body.name),
    ),
    route(contract.deleteRun, { run: runners }, ({ params }) => deleteRun(services, params.runId)),
    route(contract.putFrame, { run: runners }, ({ params, request }) =>
      putFrame(services, params.runId, params.year, request),
    ),
    route(contract.getFrame, { run: roles }, async ({ params }) => {
      const run = await requireRun(manager, params.runId);
      const frame = await findFrame(manager, params.runId, params.year);
      if (!frame) throw notFound();
      return sendMap(frame.hash, run.status === 'finished');
    }),
    route(contract.putClosing, { run: runners }, ({ params, request }) =>
      putClosing(services, params.runId, request),
    ),
    route(contract.getClosing, { run: roles }, async ({ params }) => {
      const run = await requireRun(manager, params.runId);
      if (run.closingHash === null) throw notFound();
      return sendMap(run.closingHash, run.status === 'finished');
    }),
    route(
      contract.finishRun,
      { run: runners },
      ({ params, body }) => finishRun(services, params.runId, body),
      { bodyLimit },
    ),
    route(contract.stopRun, { run: runners }, ({ params }) => stopRun(services, params.runId)),
    route(contract.checkRun, { run: roles }, ({ params, body, person }) =>
      checkRun(services, params.runId, body, person.name),
    ),
    route(contract.exportSeries, { run: roles }, ({ params }) => exportSeries(services, params.runId)),
    route(contract.exportSpec, { run: roles }, ({ params }) => exportSpec(services, params.runId)),
    route(contract.exportPackage, { run: roles }, ({ params }) => exportPackage(services, params.runId)),
    route(contract.exportFrame, { run: roles }, ({ params }) =>
      exportFrame(services, params.runId, params.year),
    ),
    route(contract.exportClosing, { run: roles }, ({ params }) => exportClosing(services, params.runId)),
  ];
}
