import { stream } from '#sim-core/random/streams.ts';
import { uniform } from '#sim-core/random/philox.ts';
import type { AbcPlan, AbcState, Proposal } from './abc.ts';
import { checkGeneration } from './fit-run.ts';
import type { FitTarget } from './fit-target.ts';
import { bare, standing, unknown } from './map-agreement.ts';
import { fitOfYear, standingCells, type YearFit } from './resurvey.ts';

/**
 * Runs of what a fit came to: members of the last generation by their weight, evenly through the shares (systematic
 * resampling: Kitagawa 1996, J. Comput. Graph. Stat. 5:1–25), each under luck of its own.
 */
export function checkProposals(plan: AbcPlan, { population }: AbcState, count: number): Proposal[] {
  if (population.length === 0) return [];
  const start = uniform(stream(plan.seed, 'fit/check').int32() >>> 0);
  const proposals: Proposal[] = [];
  let member = 0;
  let below = 0;
  for (let number = 0; number < count; number++) {
    const at = (number + start) / count;
    while (member < population.length - 1 && below + population[member].weight <= at)
      below += population[member++].weight;
    proposals.push({ generation: checkGeneration, number, point: population[member].point });
  }
  return proposals;
}

/** What a run of a check tells: how each map fits, and where plants stood in it. */
export interface CheckedYear extends YearFit {
  /** 1 where plants stand, row-major */
  readonly stands: Uint8Array;
}

export const checkOfRun = (
  target: FitTarget,
  coverOf: (year: number) => Float32Array,
  capacity: Uint8Array,
): CheckedYear[] =>
  target.maps.map((map) => {
    const cover = coverOf(map.year);
    return { ...fitOfYear(map, cover, capacity, target.cells), stands: standingCells(cover, capacity) };
  });

/** What a cell of a fit map is. */
export const bareInBoth = 0;
export const hit = 1;
export const missed = 2;
export const falseAlarm = 3;

/**
 * A survey against the runs of a check: a cell counts as simulated standing where at least half of them have it so.
 *
 * @param survey row-major, as surveys are compared; @param stood in how many of the runs the cell stands
 * @returns row-major: `bareInBoth`, `hit`, `missed`, `falseAlarm`, or `unknown`
 */
export const fitMap = (survey: Uint8Array, stood: ArrayLike<number>, runs: number): Uint8Array =>
  survey.map((value, i) => {
    if (value === unknown) return unknown;
    const simulated = 2 * stood[i] >= runs;
    if (value === standing) return simulated ? hit : missed;
    return simulated && value === bare ? falseAlarm : bareInBoth;
  });
