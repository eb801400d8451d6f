import type { FieldProblem } from '#sim-core/spec/problems.ts';

/** A run that cannot be: what is wrong, at the fields where it is wrong. */
export class RunProblem extends Error {
  override name = 'RunProblem';
  readonly problems: readonly FieldProblem[];

  constructor(problems: readonly FieldProblem[]) {
    super(problems.map((p) => `${p.field}: ${p.message}`).join('\n'));
    this.problems = problems;
  }
}
