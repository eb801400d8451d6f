import type { Grid } from '#sim-core/grid/grid.ts';
import { grazerTaps } from '#sim-core/process/grazers.ts';
import { prepareWorks } from '#sim-core/process/works.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import { fitKernel } from '#sim-core/theory/fit-kernel.ts';
import { RunProblem } from './run-problem.ts';

/** What makes a spec impossible on a grid, whatever its layers hold; empty when nothing does. */
export function gridProblems(
  { rates, processes, stepsPerYear, actions }: RunSpec,
  grid: Grid,
): FieldProblem[] {
  const { grazers } = processes;
  return [
    ...prepareWorks(actions, grid).problems,
    ...refusals(() => fitKernel(rates, grid.cellSize, stepsPerYear)),
    ...(grazers ? refusals(() => grazerTaps(grazers, grid.cellSize, stepsPerYear)) : []),
  ];
}

function refusals(attempt: () => unknown): readonly FieldProblem[] {
  try {
    attempt();
    return [];
  } catch (error) {
    if (!(error instanceof RunProblem)) throw error;
    return error.problems;
  }
}
