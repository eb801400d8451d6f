import { replicateSpec, type Comparison } from '#contract/comparisons.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import { runReplicate } from '#sim-core/ensemble/replicate.ts';

/**
 * Seconds of the processor that the engine alone takes for some replicates of every option, in this thread, with nothing
 * kept of them but what a run comes to.
 */
export function engineAlone(
  { plan, grid }: Comparison,
  ground: Ground,
  replicates: readonly number[],
): { seconds: number; runs: number } {
  const before = process.cpuUsage();
  for (const replicate of replicates)
    plan.options.forEach((_, option) => {
      const spec = replicateSpec(plan, option, 0, replicate);
      runReplicate({ spec, grid, ground }, { closing: true });
    });
  const { user, system } = process.cpuUsage(before);
  return { seconds: (user + system) / 1e6, runs: replicates.length * plan.options.length };
}
