import type { Criterion } from '#sim-core/compare/weighting.ts';
import type { ComparisonFigures, OutlookFigures } from '#sim-core/compare/comparison-figures.ts';
import { differenceOf, leavesOutNone, levelValues } from '#sim-core/compare/told-apart.ts';

export interface NamedCriterion extends Omit<Criterion, 'weight'> {
  readonly name: string;
  /** no option can be told from another by it, so that it gives all the same */
  readonly alike: boolean;
}

/**
 * What options can be weighed by. What futures cannot tell apart is evened out first: luck earns no points.
 */
export function criteriaOf({ outlooks }: ComparisonFigures): NamedCriterion[] {
  const [first] = outlooks;
  const costs = first.options.map((option) => option.cost);
  const chances = outlooks.map((outlook) =>
    outlook.options.map((option) => option.summary.beforeDrought.share?.estimate ?? 0),
  );
  const worst = first.options.map((_, i) => {
    const mine = chances.map((chance) => chance[i]);
    return mine.indexOf(Math.min(...mine));
  });
  return [
    named('chance to close in time', chances[0], apartIn(first, 'chanceGained')),
    named(
      'years sooner',
      first.options.map((option) => option.yearsSooner),
      apartIn(first, 'sooner'),
    ),
    ...(costs.every((cost) => cost !== null)
      ? [{ name: 'cost', values: costs, better: 'less' as const, alike: new Set(costs).size === 1 }]
      : []),
    ...(outlooks.length > 1
      ? [
          named(
            'chance under the worst outlook',
            worst.map((outlook, i) => chances[outlook][i]),
            (a, b) => [worst[a], worst[b]].every((o) => apartIn(outlooks[o], 'chanceGained')(a, b)),
          ),
        ]
      : []),
  ];
}

function named(
  name: string,
  values: readonly number[],
  apart: (a: number, b: number) => boolean,
): NamedCriterion {
  const level = levelValues(values, apart);
  return { name, values: level, better: 'more', alike: level.every((value) => value === level[0]) };
}

const apartIn = (outlook: OutlookFigures, figure: 'sooner' | 'chanceGained') => (a: number, b: number) => {
  const difference = differenceOf(outlook, figure, a, b);
  return difference !== undefined && leavesOutNone(difference);
};
