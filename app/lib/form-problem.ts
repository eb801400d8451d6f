import type { FieldValues, Path, UseFormReturn } from 'react-hook-form';
import { errorText, ProblemError } from './api-client.ts';

/**
 * Puts what the server found wrong at the fields of a form and returns the sentence that belongs to none of them
 * (undefined when every complaint found its field).
 */
export function showProblem<Values extends FieldValues, Context, Output>(
  form: UseFormReturn<Values, Context, Output>,
  error: unknown,
): string | undefined {
  const known = form.getValues();
  const entries = error instanceof ProblemError ? Object.entries(error.fields) : [];
  const mine = entries.filter(([field]) => field in known);
  mine.forEach(([field, message], i) =>
    form.setError(field as Path<Values>, { type: 'server', message }, { shouldFocus: i === 0 }),
  );
  return mine.length > 0 && mine.length === entries.length ? undefined : errorText(error);
}
