import type { z } from 'zod';

/** One thing that is wrong, at the field where it is wrong. */
export interface FieldProblem {
  /** e.g. `rates.lateralSpread` or `actions.3.year` */
  readonly field: string;
  readonly message: string;
}

/**
 * What zod found, as field problems in plain order. Of the kinds that a value may be, one that fits it but for something
 * inside is taken for what was meant, and the problem is named there.
 */
export function fieldProblems(error: { readonly issues: readonly z.core.$ZodIssue[] }): FieldProblem[] {
  return error.issues.flatMap((issue) => {
    if (issue.code === 'invalid_union') {
      const meant = issue.errors.filter((issues) => issues.every(({ path }) => path.length > 0));
      if (meant.length === 1)
        return fieldProblems({
          issues: meant[0].map((inner) => ({ ...inner, path: [...issue.path, ...inner.path] })),
        });
    }
    const field = issue.path.map(String).join('.');
    if (issue.code === 'unrecognized_keys')
      return issue.keys.map((key) => ({
        field: field ? `${field}.${key}` : key,
        message: 'There is no such field',
      }));
    return [{ field, message: issue.message }];
  });
}
