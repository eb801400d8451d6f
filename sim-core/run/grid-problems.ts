import { ratesOfRun } from '#sim-core/belief/rates-of-run.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { grazerTaps } from '#sim-core/process/grazers.ts';
import { datedLosses } from '#sim-core/process/expected-losses.ts';
import { prepareWorks } from '#sim-core/process/works.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import { spreadProblems } from '#sim-core/theory/fit-kernel.ts';
import { RunProblem } from './run-problem.ts';

/** What makes a spec impossible on a grid, whatever its layers hold; empty when nothing does. */
export const gridProblems = (spec: RunSpec, grid: Grid): FieldProblem[] => [
  ...prepareWorks(spec.actions, grid, undefined, datedLosses(spec)).problems,
  ...rateProblems({ ...spec, ...ratesOfRun(spec) }, grid.cellSize),
];

/** What makes rates impossible on cells of a size, m. */
export const rateProblems = (
  { rates, processes: { grazers }, stepsPerYear }: Pick<RunSpec, 'rates' | 'processes' | 'stepsPerYear'>,
  cellSize: number,
): FieldProblem[] => [
  ...spreadProblems(rates, cellSize, stepsPerYear),
  ...(grazers ? refusals(() => grazerTaps(grazers, cellSize, stepsPerYear)) : []),
];

function refusals(attempt: () => unknown): readonly FieldProblem[] {
  try {
    attempt();
    return [];
  } catch (error) {
    if (!(error instanceof RunProblem)) throw error;
    return error.problems;
  }
}
