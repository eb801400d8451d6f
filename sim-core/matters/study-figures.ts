import { morrisScreening, type FactorEffect } from '#sim-core/ensemble/morris.ts';
import { sobolIndices, type FactorIndices } from '#sim-core/ensemble/sobol.ts';
import { quantiles } from '#sim-core/ensemble/quantile.ts';
import { sumOf } from '#sim-core/numeric/sums.ts';
import { triedShares, type StudyDesign, type StudyFactor } from './study-design.ts';

/** What a measure comes to along one rate, all others at their medians, as a mean over the futures. */
export interface RateCurve {
  readonly factor: StudyFactor;
  /** by `triedShares`: value of the rate in its unit; of weather and chance, none */
  readonly values: readonly number[];
  /** by `triedShares` */
  readonly outputs: readonly number[];
}

export type StudyFigures = { readonly groups: number } & (
  | {
      readonly method: 'one-at-a-time';
      readonly middle: number;
      readonly curves: readonly RateCurve[];
      /** from the 5 % to the 95 % quantile of the futures, all rates at their medians; undefined of a single future */
      readonly luck: readonly [number, number] | undefined;
    }
  | {
      readonly method: 'screening';
      readonly effects: readonly (FactorEffect & { readonly factor: StudyFactor })[];
    }
  | {
      readonly method: 'indices';
      readonly mean: number;
      readonly variance: number;
      readonly indices: readonly (FactorIndices & { readonly factor: StudyFactor })[];
    }
);

/** Fewest groups that figures are made of. */
export const leastGroups = { 'one-at-a-time': 1, screening: 2, indices: 4 } as const;
const resamples = 500;

/**
 * What the complete groups of a study say.
 *
 * @param outputOf what a point came to, by its place in the design; undefined until it is run
 * @returns undefined where too few groups are complete
 */
export function studyFigures(
  design: StudyDesign,
  outputOf: (point: number) => number | undefined,
  seed: string,
): StudyFigures | undefined {
  const { method, factors, groupSize, points } = design;
  const complete: { group: number; outputs: number[] }[] = [];
  for (let group = 0; group * groupSize < points.length; group++) {
    const outputs = Array.from({ length: groupSize }, (_, i) => outputOf(group * groupSize + i));
    if (outputs.every((output) => output !== undefined)) complete.push({ group, outputs });
  }
  const groups = complete.length;
  if (groups < leastGroups[method]) return undefined;
  if (method === 'one-at-a-time')
    return {
      groups,
      method,
      ...curvesOf(
        design,
        complete.map((c) => c.outputs),
      ),
    };
  if (method === 'screening') {
    const screening = morrisScreening(factors.length);
    for (const { group, outputs } of complete) screening.add(design.walks[group], outputs);
    return {
      groups,
      method,
      effects: screening.effects().map((effect, i) => ({ factor: factors[i], ...effect })),
    };
  }
  const column = (i: number) => complete.map(({ outputs }) => outputs[i]);
  const found = sobolIndices(
    { a: column(0), b: column(1), mixed: factors.map((_, f) => column(f + 2)) },
    seed,
    { resamples },
  );
  return {
    groups,
    method,
    mean: found.mean,
    variance: found.variance,
    indices: found.factors.map((of, i) => ({ factor: factors[i], ...of })),
  };
}

function curvesOf({ factors, points }: StudyDesign, futures: readonly (readonly number[])[]) {
  const meanAt = (i: number) => sumOf(futures.map((outputs) => outputs[i])) / futures.length;
  const middle = meanAt(0);
  const curves = factors.map((factor, f): RateCurve => {
    // The median is the first point of each group, and is not tried again.
    const place = (level: number) => 1 + 4 * f + (level < 2 ? level : level - 1);
    const at = triedShares.map((_, level) => (level === 2 ? 0 : place(level)));
    return {
      factor,
      values: at.map((i) => (factor === 'luck' ? NaN : points[i].rates[factor]!)),
      outputs: at.map((i) => (i === 0 ? middle : meanAt(i))),
    };
  });
  const spread = futures.map(([first]) => first);
  const [low, high] = quantiles(spread, [triedShares[0], triedShares[4]]);
  return { middle, curves, luck: futures.length < 2 ? undefined : ([low, high] as const) };
}
