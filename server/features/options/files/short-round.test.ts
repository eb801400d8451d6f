import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Point } from '#server/files/place-projection.ts';
import { shortRound, wayLength } from './short-round.ts';

const orders = (n: number): number[][] =>
  n === 0
    ? [[]]
    : orders(n - 1).flatMap((order) => Array.from({ length: n }, (_, i) => order.toSpliced(i, 0, n - 1)));
const shortest = (points: readonly Point[], start?: Point) =>
  Math.min(
    ...orders(points.length)
      .filter((order) => start || order[0] === 0)
      .map((order) => wayLength(points, order, start)),
  );

describe('shortRound', () => {
  it('visits every point once, and no stretch of it is shorter the other way about', () => {
    const point = fc.tuple(fc.integer({ min: 0, max: 500 }), fc.integer({ min: 0, max: 500 }));
    fc.assert(
      fc.property(
        fc.array(point, { maxLength: 25 }),
        fc.option(point, { nil: undefined }),
        (points, start) => {
          const order = shortRound(points, start);
          expect(order.toSorted((a, b) => a - b)).toEqual(points.map((_, i) => i));
          const length = wayLength(points, order, start);
          for (let i = start ? 0 : 1; i < order.length; i++)
            for (let j = i + 1; j < order.length; j++) {
              const turned = [
                ...order.slice(0, i),
                ...order.slice(i, j + 1).reverse(),
                ...order.slice(j + 1),
              ];
              expect(wayLength(points, turned, start)).toBeGreaterThanOrEqual(length - 1e-6);
            }
        },
      ),
      { numRuns: 100 },
    );
  });

  it('comes close to the shortest of all ways through seven points', () => {
    const coordinate = fc.integer({ min: 0, max: 100 });
    const places = fc.uniqueArray(fc.tuple(coordinate, coordinate), {
      minLength: 7,
      maxLength: 7,
      selector: String,
    });
    let [mine, best] = [0, 0];
    fc.assert(
      fc.property(places, (points) => {
        mine += wayLength(points, shortRound(points, [0, 0]), [0, 0]);
        best += shortest(points, [0, 0]);
      }),
      { numRuns: 40, seed: 7 },
    );
    expect(mine / best).toBeGreaterThanOrEqual(1);
    expect(mine / best).toBeLessThan(1.05);
  });

  it('begins at the westernmost point where no start is given', () => {
    const row: Point[] = [[50, 0], [0, 0], [20, 0], [90, 0], [10, 0]]; // prettier-ignore
    expect(shortRound(row)).toEqual([1, 4, 2, 0, 3]);
    expect(shortRound(row, [100, 0])).toEqual([3, 0, 2, 4, 1]);
    expect(shortRound([])).toEqual([]);
  });
});
