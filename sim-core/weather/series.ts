import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { StepsPerYear } from '#sim-core/spec/run-spec.ts';
import type { DroughtSeries } from '#sim-core/spec/weather-source.ts';

/** What the weather must cover. */
export interface WeatherSpan {
  readonly surveyYear: number;
  readonly years: number;
  readonly stepsPerYear: StepsPerYear;
}

/** Years of the record, ascending, each with its values of one year (1) or of its months (12). */
function recordByYear({ values }: DroughtSeries): Map<number, number[]> {
  const monthly = values.some((v) => v.month !== undefined);
  const years = new Map<number, number[]>();
  for (const { year, month, value } of values) {
    const held = years.get(year) ?? new Array<number>(monthly ? 12 : 1).fill(NaN);
    held[monthly ? (month ?? 1) - 1 : 0] = value;
    years.set(year, held);
  }
  return new Map([...years].sort(([a], [b]) => a - b));
}

/** What keeps the record from covering the span. */
export function seriesProblems(series: DroughtSeries, span: WeatherSpan): FieldProblem[] {
  const say = (message: string, at = 'values'): FieldProblem[] => [{ field: at, message }];
  const { values, order } = series;
  // The schema says so already.
  if (values.length === 0) return [];
  const seen = new Set<string>();
  for (const [i, { year, month }] of values.entries()) {
    const at = `values.${i}`;
    if ((month === undefined) !== (values[0].month === undefined))
      return say('Some values have a month and some have none; give all by year or all by month', at);
    const date = dateText(year, month);
    if (seen.has(date)) return say(`${date} stands in the record twice; keep one of its values`, at);
    seen.add(date);
  }
  const record = recordByYear(series);
  const known = [...record.keys()];
  const [first, last] =
    order === 'dated'
      ? [span.surveyYear + 1, span.surveyYear + span.years]
      : [known[0], known[known.length - 1]];
  const gaps: string[] = [];
  for (let year = first; year <= last; year++) {
    const held = record.get(year);
    if (!held) gaps.push(String(year));
    else held.forEach((value, i) => Number.isNaN(value) && gaps.push(dateText(year, i + 1)));
  }
  if (gaps.length === 0) return [];
  const shown = gaps.slice(0, 5).join(', ') + (gaps.length > 5 ? ` and ${gaps.length - 5} more` : '');
  return say(
    order === 'dated'
      ? `The record, ${known[0]} to ${known[known.length - 1]}, has no value for ${shown}; the run needs ${first} to ` +
          `${last}. Add them, shorten the horizon, or read the record on from a drawn year`
      : `The record has gaps: no value for ${shown}. Add them, or cut the record to the part without gaps`,
  );
}

const dateText = (year: number, month: number | undefined) =>
  month === undefined ? String(year) : `${year}-${String(month).padStart(2, '0')}`;

/**
 * Index of each step: a year's value holds for all its steps; a step's is the mean of the months that it spans.
 *
 * @param series without problems (`seriesProblems`)
 * @param uniform draws strictly between 0 and 1
 * @returns Float64, one value a step
 */
export function drawSeries(series: DroughtSeries, span: WeatherSpan, uniform: () => number): Float64Array {
  const { surveyYear, years, stepsPerYear } = span;
  const record = recordByYear(series);
  const known = [...record.values()];
  const begins = Math.floor(uniform() * known.length);
  const indices = new Float64Array(years * stepsPerYear);
  for (let y = 0; y < years; y++) {
    const held =
      series.order === 'dated' ? record.get(surveyYear + 1 + y) : known[(begins + y) % known.length];
    if (!held) throw new Error(`The record has no value for ${surveyYear + 1 + y}`);
    const perStep = held.length / stepsPerYear;
    for (let s = 0; s < stepsPerYear; s++) {
      const part = held.length === 1 ? held : held.slice(s * perStep, (s + 1) * perStep);
      indices[y * stepsPerYear + s] = part.reduce((sum, v) => sum + v, 0) / part.length;
    }
  }
  return indices;
}
