import type { Belief } from '#sim-core/spec/belief.ts';
import type { Parameter } from '#sim-core/spec/parameters.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';

type Range = Pick<Parameter, 'label' | 'min' | 'max' | 'unit'>;

/**
 * What makes a belief impossible for a rate, at fields of the belief; empty when nothing does. Bounds, values and the
 * middle of a law must lie within the rate's range, and bounds must ascend.
 */
export function beliefProblems(belief: Belief, rate: Range): FieldProblem[] {
  switch (belief.law) {
    case 'uniform':
      return ascending(['low', belief.low], ['high', belief.high]) ?? within(rate, belief, ['low', 'high']);
    case 'triangular': {
      const { low, mode, high } = belief;
      // Where the bounds themselves are turned round no likeliest value could lie between them.
      const turned = ascending(['low', low], ['high', high]);
      if (turned) return turned;
      if (mode < low || mode > high)
        return [
          { field: 'mode', message: `Found ${mode}; the likeliest value lies between ${low} and ${high}` },
        ];
      return within(rate, belief, ['low', 'mode', 'high']);
    }
    case 'normal':
      return within(rate, belief, ['mean']);
    case 'log-normal':
      return within(rate, belief, ['median']);
    case 'beta':
      return ascending(['low', belief.low], ['high', belief.high]) ?? within(rate, belief, ['low', 'high']);
    case 'values': {
      const { values } = belief;
      const wrong = values.findIndex((value) => value < rate.min || value > rate.max);
      if (wrong >= 0)
        return [{ field: `values.${wrong}`, message: `Value ${wrong + 1}: ${outside(rate, values[wrong])}` }];
      return values.length > 1 && values.every((value) => value === values[0])
        ? [
            {
              field: 'values',
              message: `All ${values.length} values are ${values[0]}; a rate that is known exactly needs no belief`,
            },
          ]
        : [];
    }
  }
}

function ascending(
  [lowName, low]: [string, number],
  [highName, high]: [string, number],
): FieldProblem[] | undefined {
  return high > low
    ? undefined
    : [{ field: highName, message: `Found ${high}; expected more than the ${lowName} value, ${low}` }];
}

const outside = ({ label, min, max, unit }: Range, found: number) =>
  `Found ${found}; ${label} must lie between ${min} and ${max}${unit === '–' ? '' : ` ${unit}`}`;

const within = <Law extends Belief>(
  rate: Range,
  belief: Law,
  fields: readonly (keyof Law & string)[],
): FieldProblem[] =>
  fields.flatMap((field) => {
    const found = belief[field] as number;
    return found < rate.min || found > rate.max ? [{ field, message: outside(rate, found) }] : [];
  });
