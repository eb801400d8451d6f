import { commonSchema, type Comparison } from '#contract/comparisons.ts';
import { createRunner, type Runner } from '#sim-core/ensemble/runner.ts';
import { runReplicate } from '#sim-core/ensemble/replicate.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import { createEnsembleMaps, type EnsembleMaps } from '#rasters/ensemble/ensemble-maps.ts';
import type { EnsembleMapsDesk } from '#app/workers/ensemble-maps-client.ts';
import type { ComparisonServer } from '../comparison-server.ts';

const [width, height] = [14, 10];
const cells = width * height;
const grid: Grid = { width, height, cellSize: 1, originX: 500_000, originY: 4_000_000, epsg: 32617 };
const ground: Ground = {
  capacity: new Uint8Array(cells).fill(255),
  vigour: new Uint8Array(cells).fill(255),
  exposure: new Uint8Array(cells),
  refuge: new Uint8Array(cells),
  fence: new Uint8Array(cells),
  cover: Float32Array.from({ length: cells }, (_, i) => (i % width < 4 ? 0.8 : 0)),
};

/** Wait and some clumps under droughts that come back, twelve years, of which every option has so many replicates. */
export function smallComparison(replicates: number, changes: Partial<Comparison['plan']> = {}): Comparison {
  const common = commonSchema.parse({
    version: 1,
    seed: 'small comparison',
    surveyYear: 2020,
    years: 12,
    rates: { lateralSpread: 1 },
    layers: { cover: 0.5 },
  });
  const clump = (x: number, y: number): [number, number] => [grid.originX + x, grid.originY - y];
  const options: Comparison['plan']['options'] = [
    { optionId: '1', name: 'Wait', wait: true, revision: 1, actions: [], cost: 0 },
    {
      optionId: '2',
      name: 'Clumps',
      wait: false,
      revision: 1,
      actions: [{ kind: 'clumps', year: 2021, points: [clump(9, 3), clump(11, 7)], each: 4 }],
      cost: 500,
    },
  ];
  const plan = {
    common,
    options,
    outlooks: [
      {
        name: 'As drawn',
        droughtIndex: {
          kind: 'renewal' as const,
          returnInterval: { law: 'exponential' as const, mean: 12 },
          sinceLatest: 1,
          depth: -4,
          length: { law: 'fixed' as const, years: 1 },
        },
      },
    ],
    replicates,
    stop: null,
    droughtThreshold: -3,
    mapYears: [2024, 2032],
    currency: 'EUR',
    ...changes,
  };
  return {
    id: 'comparison',
    siteId: 'site',
    name: 'Small',
    status: 'running',
    ending: null,
    startedAt: '2026-12-01T00:00:00.000Z',
    startedBy: 'Someone',
    cautions: [],
    replicates,
    done: 0,
    decision: null,
    plan,
    grid,
    crsName: 'invented',
    layers: [],
    ensembles: options.map((_, option) => ({ option, outlook: 0, done: 0, maps: {}, mapsState: null })),
    events: [],
  };
}

/** A runner in this thread that takes so many runs up at once, one after the other in disorder. */
export function smallPool(
  workers: number,
  onBegin: (replicate: number) => void = () => undefined,
): Runner & { close(): void } {
  let turn = 0;
  const place = {
    workers,
    now: () => 0,
    begin: (spec: Parameters<typeof runReplicate>[0]['spec'], keep: Parameters<typeof runReplicate>[1]) => {
      onBegin(spec.replicate);
      const late = (turn++ % workers) + 1;
      const outcome = new Promise<void>((done) => setTimeout(done, late)).then(() =>
        runReplicate({ spec, grid, ground }, keep),
      );
      return { outcome, cancel: () => undefined };
    },
  };
  return { ...createRunner(place), close: () => undefined };
}

/** Maps in this thread. */
export function smallDesk(): EnsembleMapsDesk {
  const all = new Map<string, EnsembleMaps>();
  const of = (key: string) => all.get(key)!;
  const blob = (bytes: ArrayBufferView) => new Blob([bytes as Uint8Array<ArrayBuffer>]);
  return {
    begin: async (key, input, state) => {
      const from = state && new Uint8Array(await state.arrayBuffer());
      all.set(key, createEnsembleMaps(input, from));
      return of(key).replicates();
    },
    add: (key, replicate, closing, frames) => Promise.resolve(of(key).add(replicate, closing, frames)),
    map: (key, name) => Promise.resolve(of(key).map(name)),
    packedMap: (key, name) => Promise.resolve(blob(of(key).map(name))),
    state: (key) =>
      Promise.resolve({ state: blob(of(key).state()), replicates: of(key).replicates().length }),
    close: () => undefined,
  };
}

/** A server that holds what it was sent. */
export function smallServer(comparison: Comparison) {
  const records = comparison.plan.options.map(() => new Map<number, ReplicateRecord>());
  const states = new Map<number, { state: Blob; replicates: number }>();
  const maps = new Map<string, { bytes: Blob; replicates: number }>();
  const pieces: number[] = [];
  let ended: string | undefined;
  const server: ComparisonServer = {
    comparison: () => Promise.resolve(stored()),
    replicates: ({ option }) => Promise.resolve([...records[option].values()]),
    putReplicates: ({ option }, sent) => {
      pieces.push(sent.length);
      for (const record of sent) records[option].set(record.replicate, record);
      return Promise.resolve();
    },
    mapsState: ({ option }) => Promise.resolve(states.get(option)!.state),
    putMapsState: ({ option }, state, replicates) => {
      states.set(option, { state, replicates });
      return Promise.resolve();
    },
    putMap: ({ option }, map, bytes, replicates) => {
      maps.set(`${option} ${map}`, { bytes, replicates });
      return Promise.resolve();
    },
    end: (_, __, ending) => {
      ended = ending;
      return Promise.resolve({ ...stored(), status: 'finished', ending });
    },
  };
  /** The comparison as it would be fetched now. */
  const stored = (): Comparison => ({
    ...comparison,
    ensembles: comparison.ensembles.map((ensemble) => ({
      ...ensemble,
      done: records[ensemble.option].size,
      mapsState: states.get(ensemble.option)?.replicates ?? null,
    })),
  });
  return { server, records, states, maps, pieces, stored, ended: () => ended };
}
