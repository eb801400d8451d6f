import type { Interval } from '#sim-core/ensemble/proportion.ts';
import type { FirstLook } from './first-look.ts';
import type { StudyFactor } from './study-design.ts';
import type { RateCurve, StudyFigures } from './study-figures.ts';

/** How much a factor matters, 0 to 1; how sure is what the method can tell. */
export interface FactorWeight {
  readonly factor: StudyFactor;
  readonly weight: Interval;
  readonly standing: 'decides' | 'matters' | 'hardly' | 'unclear';
}

/** Bounds of what is said in words: habits of this product, no source. */
const bounds = {
  /** shares of variance */
  indices: { decides: 0.3, hardly: 0.05, hardlyHigh: 0.1 },
  /** shares of the largest effect */
  effects: { decides: 0.5, hardly: 0.1, hardlyHigh: 0.2 },
  /** partial rank correlations */
  ranks: { decides: 0.5, hardly: 0.1, hardlyHigh: 0.2 },
} as const;

/** Widest change of the output along a rate. */
export const swingOf = ({ outputs }: Pick<RateCurve, 'outputs'>): number =>
  Math.max(...outputs) - Math.min(...outputs);

/** Factors from the one that matters most; none where nothing that was varied changes the output. */
export function weightsOf(figures: StudyFigures): FactorWeight[] {
  switch (figures.method) {
    case 'one-at-a-time': {
      const { luck } = figures;
      const swings = [
        ...figures.curves.map((curve) => ({ factor: curve.factor, swing: swingOf(curve) })),
        ...(luck ? [{ factor: 'luck' as const, swing: luck[1] - luck[0] }] : []),
      ];
      return relative(swings.map(({ factor, swing }) => ({ factor, size: swing, half: 0 })));
    }
    case 'screening':
      return relative(
        figures.effects.map(({ factor, meanSize, meanSizeError }) => ({
          factor,
          size: meanSize,
          half: 1.96 * meanSizeError,
        })),
      );
    case 'indices':
      return figures.variance > 0
        ? sorted(figures.indices.map(({ factor, total }) => standing(factor, total, 'indices')))
        : [];
  }
}

/** The same of a first look, by the size of the partial rank correlation. */
export const weightsOfLook = ({ rates }: FirstLook): FactorWeight[] =>
  sorted(
    rates.map(({ name, partial: { estimate, low, high } }) => {
      const sizes = [Math.abs(low), Math.abs(high)];
      const within = low <= 0 && high >= 0;
      return standing(
        name,
        { estimate: Math.abs(estimate), low: within ? 0 : Math.min(...sizes), high: Math.max(...sizes) },
        'ranks',
      );
    }),
  );

function relative(effects: { factor: StudyFactor; size: number; half: number }[]): FactorWeight[] {
  const most = Math.max(...effects.map(({ size }) => size));
  if (!(most > 0)) return [];
  return sorted(
    effects.map(({ factor, size, half }) =>
      standing(
        factor,
        { estimate: size / most, low: Math.max(0, size - half) / most, high: (size + half) / most },
        'effects',
      ),
    ),
  );
}

function standing(factor: StudyFactor, weight: Interval, kind: keyof typeof bounds): FactorWeight {
  const { decides, hardly, hardlyHigh } = bounds[kind];
  const { estimate, low, high } = weight;
  const found =
    estimate >= decides && low > hardly
      ? 'decides'
      : estimate < hardly && high < hardlyHigh
        ? 'hardly'
        : low > hardly || estimate >= decides / 2
          ? 'matters'
          : 'unclear';
  return { factor, weight, standing: found };
}

const sorted = (weights: FactorWeight[]) => weights.toSorted((a, b) => b.weight.estimate - a.weight.estimate);
