import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { exampleSpec } from '#server/commands/simulate/example.ts';
import { readGround } from '#server/commands/simulate/read-ground.ts';
import { demoOutlook, demoPlant } from '#server/demo/demo-place.ts';
import type { RunInput } from '#sim-core/index.ts';
import { runSpecSchema, type Mode } from '#sim-core/spec/run-spec.ts';

/** The demo's ground, plant and outlook, with a frame for every year. */
export async function demoCase(mode: Mode): Promise<RunInput> {
  const folder = join(tmpdir(), 'foothold-bench-demo');
  const { years, droughtIndex } = demoOutlook;
  const { rates } = demoPlant;
  const example = await exampleSpec(folder);
  const spec = runSpecSchema.parse({ ...example, mode, years, droughtIndex, rates, reportYears: undefined });
  const { grid, ground } = await readGround(spec.layers, join(folder, 'spec.json'));
  return { spec, grid, ground };
}
