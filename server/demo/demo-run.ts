import { Readable } from 'node:stream';
import { layerSources } from '#contract/layer-sources.ts';
import type { Option } from '#contract/options.ts';
import { runActions } from '#contract/works.ts';
import type { Site } from '#contract/sites.ts';
import { encodeCellValues } from '#rasters/cells/cell-values.ts';
import type { CellValues } from '#sim-core/grid/ground.ts';
import { createRun } from '#sim-core/index.ts';
import { runSpecSchema, runSpecVersion, type RunSpec } from '#sim-core/spec/run-spec.ts';
import { putClosing, putFrame } from '../features/runs/run-maps.service.ts';
import { finishRun, startRun } from '../features/runs/run.service.ts';
import type { Services } from '../services.ts';
import { demoGround } from './demo-ground.ts';

function specOf(site: Site, option: Option, seed: string): RunSpec {
  const { surveyYear, years, stepsPerYear, boundary, droughtIndex } = site.outlook;
  return runSpecSchema.parse({
    version: runSpecVersion,
    seed,
    surveyYear,
    years,
    stepsPerYear,
    boundary,
    droughtIndex,
    rates: site.plant.rates,
    processes: site.plant.processes,
    actions: runActions(option.works),
    layers: layerSources(site),
  });
}

/** Computes a run of an option and stores it as a browser does: started, frame by frame, closing years, finished. */
export async function runDemoOption(
  services: Services,
  site: Site,
  option: Option,
  { name, seed, by }: { name: string; seed: string; by: string },
): Promise<void> {
  const spec = specOf(site, option, seed);
  const { grid } = site;
  const { width, height } = grid;
  const ground = await demoGround(services, site, spec.layers);
  const { id } = await startRun(services, site.id, { name, optionId: option.id, spec }, by);
  const packed = (values: CellValues) => Readable.from([encodeCellValues({ width, height, values })]);
  const run = createRun({ spec, grid, ground });
  for (let year = run.survey; ;) {
    if (year.frame) await putFrame(services, id, year.year, packed(year.frame));
    const next = run.nextYear();
    if (!next) break;
    year = next;
  }
  await putClosing(services, id, packed(run.closing()));
  await finishRun(services, id, run.result());
}
