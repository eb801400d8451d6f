import type { z } from 'zod';

/** One thing that is wrong, at the field where it is wrong. */
export interface FieldProblem {
  /** e.g. `rates.lateralSpread` or `actions.3.year` */
  readonly field: string;
  readonly message: string;
}

/** What zod found, as field problems in plain order. */
export function fieldProblems(error: { readonly issues: readonly z.core.$ZodIssue[] }): FieldProblem[] {
  return error.issues.flatMap((issue) => {
    const field = issue.path.map(String).join('.');
    if (issue.code === 'unrecognized_keys')
      return issue.keys.map((key) => ({
        field: field ? `${field}.${key}` : key,
        message: 'There is no such field',
      }));
    return [{ field, message: issue.message }];
  });
}
