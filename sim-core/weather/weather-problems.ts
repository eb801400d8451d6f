import type { FieldProblem } from '#sim-core/spec/problems.ts';
import { shortestWait, type WaitingLaw, type WeatherSource } from '#sim-core/spec/weather-source.ts';
import { seriesProblems, type WeatherSpan } from './series.ts';
import { meanWait } from './waiting-law.ts';

/**
 * What of a source cannot serve such a run though each field lies in its range, field by field; a field is a path below
 * the source, e.g. `returnInterval`, and '' is the source itself.
 */
export function weatherProblems(source: WeatherSource, span: WeatherSpan): FieldProblem[] {
  if (typeof source === 'number') return [];
  if (Array.isArray(source)) return listProblems(source, span);
  switch (source.kind) {
    case 'series':
      return seriesProblems(source, span);
    case 'palmer-type':
      return [];
    case 'renewal': {
      const { returnInterval, length, depth, between = 0 } = source;
      const milder = depth > between;
      return [
        ...tooShort('returnInterval', returnInterval),
        ...tooShort('length', length),
        ...(milder
          ? [
              {
                field: 'depth',
                message: `Found ${depth}; a drought is no milder than the ${between} between droughts`,
              },
            ]
          : []),
      ];
    }
  }
}

function listProblems(values: readonly number[], { years, stepsPerYear }: WeatherSpan): FieldProblem[] {
  const steps = years * stepsPerYear;
  if (values.length === years || values.length === steps) return [];
  const message =
    `Found ${values.length} values; expected one for each of ${years} years` +
    (steps === years ? '' : ` or one for each of ${steps} steps`);
  return [{ field: '', message }];
}

function tooShort(field: string, wait: WaitingLaw): FieldProblem[] {
  const mean = meanWait(wait);
  return mean >= shortestWait
    ? []
    : [{ field, message: `Comes to a mean of ${mean} years; expected ${shortestWait} or more` }];
}
