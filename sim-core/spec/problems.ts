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
    if (issue.code === 'invalid_union') {
      const meant = meantAlternative(issue.errors);
      if (meant)
        return fieldProblems({
          issues: meant.map((inner) => ({ ...inner, path: [...issue.path, ...inner.path] })),
        });
    }
    if (issue.code === 'unrecognized_keys')
      return issue.keys.map((key) => ({
        field: field ? `${field}.${key}` : key,
        message: 'There is no such field',
      }));
    return [{ field, message: issue.message }];
  });
}

/** Of the ways to write a field, the one that was meant: it is wrong inside alone, or its kind of value was right. */
function meantAlternative(alternatives: readonly (readonly z.core.$ZodIssue[])[]) {
  return (
    alternatives.find((issues) => issues.every(({ path }) => path.length > 0)) ??
    alternatives.find((issues) => issues.length > 0 && issues.every((issue) => issue.code !== 'invalid_type'))
  );
}
