import type { FitPlan } from '#contract/fits.ts';
import type { AbcState } from '#sim-core/fit/abc.ts';
import { beliefQuantile } from '#sim-core/belief/belief-quantile.ts';
import { effectiveSize, weightedQuantiles } from '#sim-core/fit/posterior.ts';
import { quantiles } from '#sim-core/ensemble/quantile.ts';
import { allParameters, type AnyRateName } from '#sim-core/spec/all-parameters.ts';
import type { Figure } from '#sim-core/spec/fit-figure.ts';

/** What was believed of a rate before and after, in its unit. */
export interface RateFigures {
  readonly name: AnyRateName;
  readonly label: string;
  readonly unit: string;
  /** ends of the bins, one more than there are shares */
  readonly bins: readonly number[];
  /** share of belief in each bin */
  readonly prior: readonly number[];
  readonly posterior: readonly number[];
  /** 5, 50 and 95 % */
  readonly before: readonly number[];
  readonly after: readonly number[];
  /** width of the middle nine tenths after, as a share of that before */
  readonly narrowed: number;
}

/** How runs of the last generation lie about what was surveyed. */
export interface FigureFit {
  readonly figure: Figure;
  readonly low: number;
  readonly middle: number;
  readonly high: number;
}

export interface PosteriorFigures {
  readonly rates: readonly RateFigures[];
  readonly figures: readonly FigureFit[];
  /** values of the rates of each member, in the order of `rates`, and its weight */
  readonly members: readonly { readonly values: readonly number[]; readonly weight: number }[];
  /** how many equally likely members say as much */
  readonly effective: number;
  /** rank-free correlation (Pearson) of each pair, weighted, by `rates` × `rates` */
  readonly correlations: readonly (readonly number[])[];
}

const binCount = 20;
const middle = [0.05, 0.5, 0.95];

/** What a fit came to so far; undefined until its first generation is complete. */
export function posteriorFigures(
  { rates, figures }: Pick<FitPlan, 'rates' | 'figures'>,
  { population }: Pick<AbcState, 'population'>,
): PosteriorFigures | undefined {
  if (population.length === 0) return undefined;
  const weights = population.map(({ weight }) => weight);
  const laws = rates.map(({ name, belief }) => beliefQuantile(belief, allParameters[name]));
  const members = population.map(({ point, weight }) => ({
    values: point.map((u, i) => laws[i](u)),
    weight,
  }));
  return {
    rates: rates.map(({ name }, i) => {
      const { label, unit } = allParameters[name];
      const before = middle.map(laws[i]);
      const values = members.map((member) => member.values[i]);
      const after = weightedQuantiles(values, weights, middle);
      const bins = binsOf(laws[i](0.005), laws[i](0.995));
      const draws = Array.from({ length: 2000 }, (_, k) => laws[i]((k + 0.5) / 2000));
      return {
        ...{ name, label, unit, bins, before, after },
        prior: sharesIn(
          bins,
          draws,
          draws.map(() => 1),
        ),
        posterior: sharesIn(bins, values, weights),
        narrowed: (after[2] - after[0]) / (before[2] - before[0]),
      };
    }),
    figures: figures.map((figure, i) => {
      const [low, half, high] = weightedQuantiles(
        population.map(({ summaries }) => summaries[i]),
        weights,
        middle,
      );
      return { figure, low, middle: half, high };
    }),
    members,
    effective: effectiveSize(weights),
    correlations: rates.map((_, i) => rates.map((__, j) => correlation(members, i, j))),
  };
}

const binsOf = (from: number, to: number): number[] =>
  Array.from({ length: binCount + 1 }, (_, k) => from + ((to - from) * k) / binCount);

/** What lies beyond the ends counts to the outermost bins. */
function sharesIn(bins: readonly number[], values: readonly number[], weights: readonly number[]): number[] {
  const shares = new Array<number>(bins.length - 1).fill(0);
  const [from, to] = [bins[0], bins[bins.length - 1]];
  const total = weights.reduce((sum, w) => sum + w, 0);
  values.forEach((value, i) => {
    const at = Math.floor(((value - from) / (to - from)) * shares.length);
    shares[Math.min(shares.length - 1, Math.max(0, at))] += weights[i] / total;
  });
  return shares;
}

/** 0 where either does not vary. */
function correlation(members: PosteriorFigures['members'], i: number, j: number): number {
  const total = members.reduce((sum, { weight }) => sum + weight, 0);
  const mean = (k: number) => members.reduce((sum, m) => sum + m.weight * m.values[k], 0) / total;
  const [a, b] = [mean(i), mean(j)];
  const shared = (k: number, l: number, x: number, y: number) =>
    members.reduce((sum, m) => sum + m.weight * (m.values[k] - x) * (m.values[l] - y), 0);
  const spread = Math.sqrt(shared(i, i, a, a) * shared(j, j, b, b));
  return spread > 0 ? shared(i, j, a, b) / spread : 0;
}

/** Quantiles of what the prior alone foresaw of each figure; empty until the first generation is complete. */
export const priorForesaw = ({ prior }: Pick<AbcState, 'prior'>, figures: readonly Figure[]): FigureFit[] =>
  prior.length === 0
    ? []
    : figures.map((figure, i) => {
        const [low, half, high] = quantiles(
          prior.map(({ summaries }) => summaries[i]),
          middle,
        );
        return { figure, low, middle: half, high };
      });
