import type { FieldProblem } from '#sim-core/spec/problems.ts';

/** What the user can mend; shown without a stack trace. */
export class SimulateError extends Error {
  override name = 'SimulateError';

  static ofFields(problems: readonly FieldProblem[]): SimulateError {
    const lines = problems.map(({ field, message }) => `  ${field ? `${field}: ` : ''}${message}`);
    return new SimulateError(['The spec cannot be run:', ...lines].join('\n'));
  }
}
