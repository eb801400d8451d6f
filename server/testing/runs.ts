import type { Option } from '#contract/options.ts';
import type { Site } from '#contract/sites.ts';
import type supertest from 'supertest';
import type { Run } from '#contract/runs.ts';
import { encodeCellValues } from '#rasters/cells/cell-values.ts';
import { readRaster } from '#rasters/read/read-raster.ts';
import type { CellValues } from '#sim-core/grid/ground.ts';
import { buildGround, createRun, type RunResult } from '#sim-core/index.ts';
import { runSpecSchema, type RunSpec, type RunSpecInput } from '#sim-core/spec/run-spec.ts';
import type { Agent } from './people.ts';
import { cover, habitat } from './sites.ts';

/** A spec on the layers of `makeSite`, four years from 2024. */
export function specFor(site: Site, changes: Partial<RunSpecInput> = {}): RunSpec {
  const hashOf = (part: string) => site.layers.find((layer) => layer.part === part)!.hash;
  return runSpecSchema.parse({
    version: 1,
    seed: 'low tide',
    surveyYear: 2024,
    years: 4,
    rates: {},
    layers: {
      capacity: { layer: hashOf('habitat'), classes: { 1: 1, 2: 0.8 } },
      vigour: { layer: hashOf('habitat'), classes: { 1: 1, 2: 0.5 } },
      cover: { layer: hashOf('cover') },
    },
    ...changes,
  } satisfies RunSpecInput);
}

export interface ComputedRun {
  frames: Map<number, Uint8Array>;
  closing: Int16Array;
  result: RunResult;
}

/**
 * What the engine makes of a spec on the layers of `makeSite`.
 * @param files the rasters of the site's layers on its grid, in their order
 */
export async function computeRun(
  site: Site,
  spec: RunSpec,
  files: readonly Buffer[] = [habitat(), cover()],
): Promise<ComputedRun> {
  const rasters = new Map(
    await Promise.all(files.map(async (file, i) => [site.layers[i].hash, await readRaster(file)] as const)),
  );
  const ground = buildGround(spec.layers, site.grid, (source) =>
    rasters.get('layer' in source ? source.layer : '')!,
  );
  const run = createRun({ spec, grid: site.grid, ground });
  const frames = new Map<number, Uint8Array>();
  for (let year = run.survey; ;) {
    if (year.frame) frames.set(year.year, year.frame);
    const next = run.nextYear();
    if (!next) return { frames, closing: run.closing(), result: run.result() };
    year = next;
  }
}

/** Cell values of `smallGrid` as they are sent. */
export const packed = (values: CellValues, width = 6, height = 4): Buffer =>
  Buffer.from(encodeCellValues({ width, height, values }));

export const sendBytes = (agent: Agent, path: string, bytes: Buffer) =>
  agent.put(path).set('Content-Type', 'application/octet-stream').send(bytes);

/** Starts a run of Wait and leaves it open. */
export async function openRun(agent: Agent, site: Site, spec: RunSpec, name = 'A run'): Promise<Run> {
  const { body } = await agent.get(`/api/sites/${site.id}/options`).expect(200);
  const [wait] = (body as { options: Option[] }).options;
  const started = await agent
    .post(`/api/sites/${site.id}/runs`)
    .send({ name, optionId: wait.id, spec })
    .expect(200);
  return started.body as Run;
}

/** Sends everything that a computed run is made of; the reply to `finish` is left to the caller. */
export async function sendRun(
  agent: Agent,
  runId: string,
  { frames, closing, result }: ComputedRun,
): Promise<supertest.Response> {
  for (const [year, frame] of frames)
    await sendBytes(agent, `/api/runs/${runId}/frames/${year}`, packed(frame)).expect(204);
  await sendBytes(agent, `/api/runs/${runId}/closing`, packed(closing)).expect(204);
  return agent.post(`/api/runs/${runId}/finish`).send(result);
}
