import { parseNumber } from '#app/lib/parse-number.ts';
import { beliefWithin, type Belief, type BeliefLaw } from '#sim-core/spec/belief.ts';
import type { Parameter } from '#sim-core/spec/parameters.ts';

/** A belief while it is edited: the fields of its law as typed. */
export interface BeliefDraft {
  readonly law: BeliefLaw;
  readonly typed: Readonly<Record<string, string>>;
}

/** What each law is called and asks for, in the order in which they are offered. */
export const beliefForms: Readonly<
  Record<BeliefLaw, { label: string; fields: readonly { name: string; label: string }[] }>
> = {
  uniform: {
    label: 'anywhere between two values',
    fields: [
      { name: 'low', label: 'lowest' },
      { name: 'high', label: 'highest' },
    ],
  },
  triangular: {
    label: 'triangular',
    fields: [
      { name: 'low', label: 'lowest' },
      { name: 'mode', label: 'most likely' },
      { name: 'high', label: 'highest' },
    ],
  },
  normal: {
    label: 'normal',
    fields: [
      { name: 'mean', label: 'mean' },
      { name: 'standardDeviation', label: 'standard deviation' },
    ],
  },
  'log-normal': {
    label: 'log-normal',
    fields: [
      { name: 'median', label: 'median' },
      { name: 'factor', label: 'times or divided by' },
    ],
  },
  beta: {
    label: 'beta',
    fields: [
      { name: 'low', label: 'lowest' },
      { name: 'high', label: 'highest' },
      { name: 'alpha', label: 'alpha' },
      { name: 'beta', label: 'beta' },
    ],
  },
  values: { label: 'values from data', fields: [{ name: 'values', label: 'values, one a line' }] },
};

export const startBelief = ({ law, ...fields }: Belief): BeliefDraft => ({
  law,
  typed: Object.fromEntries(
    Object.entries(fields).map(([name, value]) => [
      name,
      Array.isArray(value) ? value.join('\n') : String(value),
    ]),
  ),
});

/** Values as people paste them: a line, a tab, a semicolon, or a comma and a space between each. */
const splitValues = (text: string) => text.split(/[\s;]+|,(?=\s)/).filter((word) => word !== '');

/** A belief as it would be saved, or what is wrong, by field of the law. */
export function readBelief(
  { law, typed }: BeliefDraft,
  rate: Parameter,
): { belief: Belief; errors?: undefined } | { belief?: undefined; errors: Record<string, string> } {
  const errors: Record<string, string> = {};
  const fields: Record<string, number | number[]> = {};
  for (const { name, label } of beliefForms[law].fields) {
    const text = typed[name] ?? '';
    if (name === 'values') {
      const words = splitValues(text);
      const values = words.map(parseNumber);
      const wrong = values.indexOf(undefined);
      if (wrong >= 0)
        errors.values = `Found “${words[wrong]}” as value ${wrong + 1}; a number is expected, each on a line of its own.`;
      else if (values.length < 2) errors.values = `Found ${values.length} values; two or more are expected.`;
      else fields.values = values as number[];
    } else {
      const value = parseNumber(text);
      if (value === undefined) errors[name] = `Found “${text.trim()}” as ${label}; a number is expected.`;
      else fields[name] = value;
    }
  }
  if (Object.keys(errors).length > 0) return { errors };
  const read = beliefWithin(rate).safeParse({ law, ...fields });
  if (read.success) return { belief: read.data };
  for (const issue of read.error.issues) errors[String(issue.path[0] ?? 'low')] ??= `${issue.message}.`;
  return { errors };
}

const rounded = (value: number) => Number(value.toPrecision(3));

/** A first proposal of a law around a value, half of it to either side where the range leaves room. */
export function proposeBelief(law: BeliefLaw, value: number, { min, max }: Parameter): BeliefDraft {
  const width = value === 0 ? (max - min) / 20 : Math.abs(value) / 2;
  const low = rounded(Math.max(min, value - width));
  const high = rounded(Math.min(max, value + width));
  switch (law) {
    case 'uniform':
      return startBelief({ law, low, high });
    case 'triangular':
      return startBelief({ law, low, mode: value, high });
    case 'normal':
      return startBelief({ law, mean: value, standardDeviation: rounded(width / 2) });
    case 'log-normal':
      return startBelief({
        law,
        median: value > 0 ? value : rounded(Math.max(high, max / 10) / 2),
        factor: 1.5,
      });
    case 'beta':
      return startBelief({ law, alpha: 2, beta: 2, low, high });
    case 'values':
      return { law, typed: { values: '' } };
  }
}
