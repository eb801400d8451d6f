import { randomUUID } from 'node:crypto';
import { plantSchema } from '#contract/plants.ts';
import type { Run } from '#contract/runs.ts';
import { findCautions } from '#sim-core/cautions/find-cautions.ts';
import { lostYear } from '#sim-core/measure/recovery.ts';
import type { RunResult } from '#sim-core/spec/run-result.ts';
import { maximumCells } from '#sim-core/spec/limits.ts';
import { frameYears, runSpecSchema, type RunSpec } from '#sim-core/spec/run-spec.ts';
import type { RunRow } from '#server/database/entities/run.ts';
import { readJson } from '#server/database/json-column.ts';
import { gridOf } from '#server/database/site-grid.ts';
import { publishedSpeed } from '#server/plants/published-speed.ts';
import { checkLayers, checkOnGrid, layerHashes } from '#server/specs/check-spec.ts';
import { recordYears } from '#server/specs/drought-record.ts';
import { releaseBlobs } from '#server/files/stored-files.ts';
import { fieldProblem, notFound, ProblemError, refuseFields } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { runOrigins } from './run-origins.ts';
import { requireRun, runReply } from './run-reply.ts';
import { deleteRunRows, findOption, findSite, framesOfRun, insertRun, updateRun } from './run.repository.ts';

/**
 * Registers a run on the grid that the site has now. Whoever computes it sends its frames as they come.
 * @throws ProblemError at each field of the spec that makes it impossible on this site
 */
export async function startRun(
  services: Services,
  siteId: string,
  { name, optionId, spec }: { name: string; optionId: string; spec: RunSpec },
  by: string,
): Promise<Run> {
  return services.write(async (manager) => {
    const site = await findSite(manager, siteId);
    if (!site) throw notFound();
    const option = await findOption(manager, siteId, optionId);
    if (!option) throw fieldProblem('optionId', 'This site has no such option; it may have been deleted');
    const problems = [...(await checkLayers(manager, siteId, spec)), ...checkOnGrid(spec, site)];
    if (problems.length > 0) throw refuseFields(problems);
    const run: RunRow = {
      id: randomUUID(),
      siteId,
      optionId,
      optionName: option.name,
      name,
      status: 'running',
      spec: JSON.stringify(spec),
      grid: JSON.stringify(gridOf(site)),
      crsName: site.crsName,
      seed: spec.seed,
      mode: spec.mode,
      surveyYear: spec.surveyYear,
      years: spec.years,
      result: null,
      recoveredYear: null,
      lostYear: null,
      digest: null,
      closingHash: null,
      closingBytes: null,
      startedAt: services.clock().toISOString(),
      startedBy: by,
      check: null,
      cautions: JSON.stringify(
        findCautions({
          spec,
          cellSize: site.cellSize,
          record: await recordYears(manager, siteId),
          published: publishedSpeed(readJson(plantSchema, site.plant)),
        }),
      ),
      origins: JSON.stringify(await runOrigins(manager, site, spec)),
    };
    await insertRun(
      manager,
      run,
      layerHashes(spec).map(({ hash }) => hash),
    );
    return runReply(manager, run.id);
  });
}

export function renameRun(services: Services, runId: string, name: string): Promise<Run> {
  return services.write(async (manager) => {
    await updateRun(manager, runId, { name });
    return runReply(manager, runId);
  });
}

/**
 * Closes a run: every frame must be stored and their digest must be the one claimed.
 * @throws ProblemError `conflict` when the run is not open, `digest-mismatch`, or at what is missing
 */
export async function finishRun(services: Services, runId: string, result: RunResult): Promise<Run> {
  const { manager } = services.dataSource;
  const run = await requireRun(manager, runId);
  requireRunning(run, 'finished');
  const spec = readJson(runSpecSchema, run.spec);
  const frames = await framesOfRun(manager, runId);
  const missing = frameYears(spec).filter((year) => !frames.some((frame) => frame.year === year));
  if (missing.length > 0)
    throw new ProblemError(
      'conflict',
      `The frames of ${missing.slice(0, 5).join(', ')}${missing.length > 5 ? ' and later years' : ''} are not stored yet. Send them, then finish.`,
    );
  const rows = spec.years * spec.stepsPerYear + 1;
  if (result.series.length !== rows)
    throw fieldProblem(
      'series',
      `Found ${result.series.length} rows; expected ${rows}, the survey and one a step`,
    );
  const digest = await services.rasters.run({
    kind: 'digest',
    paths: frames.map((frame) => services.blobs.locate(frame.hash)),
    cells: maximumCells,
  });
  if (digest !== result.digest)
    throw new ProblemError(
      'digest-mismatch',
      `Found the digest ${digest} of the stored frames; expected ${result.digest}, as claimed. Frames were lost or mixed up on their way: run it again.`,
    );
  return services.write(async (writer) => {
    const now = await requireRun(writer, runId);
    requireRunning(now, 'finished');
    const stored = await framesOfRun(writer, runId);
    if (stored.length !== frames.length || stored.some((frame, i) => frame.hash !== frames[i].hash))
      throw new ProblemError('conflict', 'A frame was replaced while the digest was computed. Finish again.');
    const { recoveredYear } = result;
    await updateRun(writer, runId, {
      status: 'finished',
      result: JSON.stringify(result),
      recoveredYear,
      lostYear: lostYear(result.series, readJson(runSpecSchema, now.spec).target),
      digest,
    });
    return runReply(writer, runId);
  });
}

/** Cancels a run; the frames stored so far stay. @throws ProblemError `conflict` when it is not running */
export function stopRun(services: Services, runId: string): Promise<Run> {
  return services.write(async (manager) => {
    requireRunning(await requireRun(manager, runId), 'stopped');
    await updateRun(manager, runId, { status: 'stopped' });
    return runReply(manager, runId);
  });
}

/**
 * Records what digest a repeat of a finished run came to.
 * @throws ProblemError `conflict` when there is no digest to compare with
 */
export function checkRun(
  services: Services,
  runId: string,
  { digest, engineVersion }: { digest: string; engineVersion: string },
  by: string,
): Promise<Run> {
  return services.write(async (manager) => {
    const run = await requireRun(manager, runId);
    if (run.digest === null)
      throw new ProblemError(
        'conflict',
        `The run is ${run.status}; only a finished run has a digest to check.`,
      );
    const check = { at: services.clock().toISOString(), by, agreed: digest === run.digest, engineVersion };
    await updateRun(manager, runId, { check: JSON.stringify(check) });
    return runReply(manager, runId);
  });
}

/** Deletes a run with its frames, and every file that nothing else refers to. */
export async function deleteRun(services: Services, runId: string): Promise<void> {
  const hashes = await services.write(async (manager) =>
    deleteRunRows(manager, await requireRun(manager, runId)),
  );
  await releaseBlobs(services, hashes);
}

function requireRunning(run: RunRow, done: string): void {
  if (run.status !== 'running')
    throw new ProblemError('conflict', `This run is already ${run.status}; it cannot be ${done}.`);
}
