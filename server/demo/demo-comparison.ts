import { Readable } from 'node:stream';
import { commonSchema, replicateSpec, type Comparison } from '#contract/comparisons.ts';
import { layerSources } from '#contract/layer-sources.ts';
import type { Option } from '#contract/options.ts';
import type { Site } from '#contract/sites.ts';
import { encodeCellValues } from '#rasters/cells/cell-values.ts';
import { createEnsembleMaps, mapNames, type EnsembleMaps } from '#rasters/ensemble/ensemble-maps.ts';
import { recordReplicate } from '#sim-core/index.ts';
import type { RunnerProgress } from '#sim-core/ensemble/runner.ts';
import { costsOf } from '#sim-core/plan/costs.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { runSpecVersion } from '#sim-core/spec/run-spec.ts';
import { endComparison, startComparison } from '../features/comparisons/comparison.service.ts';
import {
  putEnsembleMap,
  putMapsState,
  putReplicates,
  type EnsembleParams,
} from '../features/comparisons/ensemble.service.ts';
import { createRunPool } from '../jobs/run-pool.ts';
import type { Services } from '../services.ts';
import { demoGround } from './demo-ground.ts';
import { demoComparison, demoCosts } from './demo-place.ts';

export interface DemoComparisonInput {
  /** of each option under each outlook */
  replicates: number;
  seed: string;
  by: string;
  onProgress?: (progress: RunnerProgress) => void;
}

/**
 * Compares options under the site's drawn weather and a drier one on all cores, and stores what comes of it as a browser
 * does: replicates, maps and the counts behind them. Nothing is decided on it. Returns its id.
 */
export async function compareDemoOptions(
  services: Services,
  site: Site,
  options: readonly Option[],
  { replicates, seed, by, onProgress }: DemoComparisonInput,
): Promise<string> {
  const comparison = await start(services, site, options, { replicates, seed, by });
  const { plan, grid, id: comparisonId } = comparison;
  const address = { siteId: site.id, comparisonId };
  // Ensemble by ensemble and in order, so that no more than one needs its maps in memory.
  const tasks = comparison.ensembles.flatMap(({ option, outlook }) =>
    Array.from({ length: replicates }, (_, replicate) => ({ option, outlook, replicate })),
  );
  const specs = tasks.map(({ option, outlook, replicate }) =>
    replicateSpec(plan, option, outlook, replicate),
  );
  const begin = () => ({
    maps: createEnsembleMaps({ width: grid.width, height: grid.height, years: plan.mapYears }),
    records: [] as ReplicateRecord[],
  });
  let present = begin();
  const pool = createRunPool({ grid, ground: await demoGround(services, site, plan.common.layers) });
  try {
    await pool.start(
      specs,
      {
        onResult: async ({ result, closing, frames }, index) => {
          const { option, outlook, replicate } = tasks[index];
          present.maps.add(replicate, closing!, frames);
          present.records.push(recordReplicate(result, specs[index], plan.droughtThreshold));
          if (present.records.length < replicates) return;
          await store(services, { ...address, option, outlook }, comparison, present);
          present = begin();
        },
        onFailure: (error) => {
          throw error;
        },
        onProgress,
      },
      { keep: { closing: true, frameYears: plan.mapYears }, inOrder: true },
    ).finished;
  } finally {
    await pool.close();
  }
  await endComparison(services, address, 'all replicates', by);
  return comparisonId;
}

function start(
  services: Services,
  site: Site,
  options: readonly Option[],
  { replicates, seed, by }: DemoComparisonInput,
): Promise<Comparison> {
  const { outlook, plant } = site;
  const { surveyYear, years, stepsPerYear, boundary, drawn } = outlook;
  const { rates, processes } = plant;
  const { name, target, drier, mapYears } = demoComparison;
  if (drawn?.kind !== 'renewal') throw new Error('The demo draws droughts that come back.');
  const costOf = ({ works }: Option) =>
    costsOf({
      works,
      unitCosts: demoCosts,
      surveyYear,
      years,
      clumpsPerSquareMetre: rates.clumpsPerSquareMetre,
    }).presentValue;
  return startComparison(
    services,
    site.id,
    {
      name,
      common: commonSchema.parse({
        version: runSpecVersion,
        seed,
        surveyYear,
        years,
        stepsPerYear,
        boundary,
        rates,
        target,
        ...(processes && { processes }),
        layers: layerSources(site),
      }),
      options: options.map((option) => ({ optionId: option.id, cost: costOf(option) })),
      outlooks: [
        { name: 'The outlook', droughtIndex: drawn },
        {
          name: 'Drier',
          droughtIndex: { ...drawn, depth: drawn.depth - drier, between: (drawn.between ?? 0) - drier },
        },
      ],
      replicates,
      stop: null,
      droughtThreshold: rates.tolerance,
      mapYears: [...mapYears],
      currency: demoCosts.currency,
      unitCosts: demoCosts,
    },
    by,
  );
}

/** What a browser stores of an ensemble when it stands still. */
async function store(
  services: Services,
  params: EnsembleParams,
  { grid: { width, height }, plan }: Comparison,
  { maps, records }: { maps: EnsembleMaps; records: ReplicateRecord[] },
): Promise<void> {
  const stream = (bytes: Uint8Array) => Readable.from([bytes]);
  const { length } = records;
  await putReplicates(services, params, records);
  await putMapsState(services, params, length, stream(maps.state()));
  for (const map of mapNames(plan.mapYears)) {
    const packed = encodeCellValues({ width, height, values: maps.map(map) });
    await putEnsembleMap(services, { ...params, map }, length, stream(packed));
  }
}
