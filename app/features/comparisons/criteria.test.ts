// @vitest-environment node
import { expect, it } from 'vitest';
import type { ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';
import { weighOptions } from '#sim-core/compare/weighting.ts';
import { criteriaOf } from './criteria.ts';

const share = (estimate: number) => ({ summary: { beforeDrought: { share: { estimate } } } });
const figures = (low: number) =>
  ({
    outlooks: [
      {
        options: [
          { name: 'Wait', cost: 0, yearsSooner: 0, ...share(0.42) },
          { name: 'Clumps', cost: 500, yearsSooner: 2, ...share(0.44) },
        ],
        pairs: [
          {
            ...{ first: 1, second: 0 },
            sooner: { estimate: 2, low: 1, high: 3 },
            chanceGained: { estimate: 0.02, low, high: 0.09 },
          },
        ],
      },
    ],
  }) as unknown as ComparisonFigures;

it('gives no points for what cannot be told apart', () => {
  const [chance, years, cost] = criteriaOf(figures(-0.05));
  expect(chance).toMatchObject({ alike: true, values: [0.43, 0.43] });
  expect(years).toMatchObject({ alike: false, values: [0, 2] });
  expect(cost).toMatchObject({ alike: false, values: [0, 500] });
  // Half a point of years each way against half a point of cost: level.
  const { scores, places } = weighOptions([chance, years, cost].map((each) => ({ ...each, weight: 50 })));
  expect(scores[0]).toBeCloseTo(scores[1], 12);
  expect(places).toEqual([1, 1]);
});

it('keeps what can be told apart', () => {
  expect(criteriaOf(figures(0.01))[0]).toMatchObject({ alike: false, values: [0.42, 0.44] });
});
