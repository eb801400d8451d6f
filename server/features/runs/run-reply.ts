import { z } from 'zod';
import {
  runOriginsSchema,
  runStatuses,
  runSummarySchema,
  type Run,
  type RunSummary,
} from '#contract/runs.ts';
import { gridSchema } from '#contract/grid.ts';
import { layerFactsSchema, layerPartSchema } from '#contract/layers.ts';
import { cautionSchema } from '#sim-core/spec/caution.ts';
import { runResultSchema } from '#sim-core/spec/run-result.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import type { RunRow } from '#server/database/entities/run.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { notFound } from '#server/middleware/problem-error.ts';
import { findRun, framesOfRun, layersOfRun, runsOfSite, type RunListRow } from './run.repository.ts';

const statusSchema = z.enum(runStatuses);

function summaryOf(run: RunListRow): RunSummary {
  const { id, siteId, name, optionId, optionName, startedAt, startedBy, seed, mode, surveyYear, years } = run;
  return {
    id,
    siteId,
    name,
    optionId,
    optionName,
    status: statusSchema.parse(run.status),
    startedAt,
    startedBy,
    seed,
    mode,
    surveyYear,
    years,
    frames: run.frames,
    recoveredYear: run.recoveredYear,
    lostYear: run.lostYear,
    digest: run.digest,
    check: run.check === null ? null : readJson(runSummarySchema.shape.check, run.check),
  };
}

/** The runs of a site, newest first. */
export async function listRuns(
  manager: Manager,
  siteId: string,
  page: { offset: number; limit: number },
): Promise<{ runs: RunSummary[]; total: number }> {
  const { runs, total } = await runsOfSite(manager, siteId, page);
  return { runs: runs.map(summaryOf), total };
}

/** @throws ProblemError `not-found` */
export async function requireRun(manager: Manager, runId: string): Promise<RunRow> {
  const run = await findRun(manager, runId);
  if (!run) throw notFound();
  return run;
}

/** A run as the contract shows it. @throws ProblemError `not-found` */
export async function runReply(manager: Manager, runId: string): Promise<Run> {
  const run = await requireRun(manager, runId);
  const frames = await framesOfRun(manager, runId);
  return {
    ...summaryOf({ ...run, frames: frames.length }),
    spec: readJson(runSpecSchema, run.spec),
    grid: readJson(gridSchema, run.grid),
    crsName: run.crsName,
    layers: (await layersOfRun(manager, run)).map(
      ({ hash, part, fileName, sourceHash, facts, replacedAt }) => ({
        hash,
        part: layerPartSchema.parse(part),
        fileName,
        sourceHash,
        noData: readJson(layerFactsSchema, facts).noData,
        current: replacedAt === null,
      }),
    ),
    storedYears: frames.map((frame) => frame.year),
    cautions: readJson(z.array(cautionSchema), run.cautions),
    origins: run.origins === null ? null : readJson(runOriginsSchema, run.origins),
    hasClosing: run.closingHash !== null,
    result: run.result === null ? null : readJson(runResultSchema, run.result),
  };
}
