import { expect, test } from 'vitest';
import { quantiles } from './quantile.ts';

test('type 7, Hyndman & Fan 1996, Am. Stat. 50:361 (R, quantile(x, p, type = 7))', () => {
  const close = (found: number[], expected: number[]) =>
    expected.forEach((value, i) => expect(found[i]).toBeCloseTo(value, 12));
  close(quantiles([10, 9, 8, 7, 6, 5, 4, 3, 2, 1], [0.1, 0.25, 0.5, 0.9]), [1.9, 3.25, 5.5, 9.1]);
  const x = [1, 3, 4, 8, 9, 12, 15, 20, 21, 40];
  close(quantiles(x, [0.1, 0.25, 0.5, 0.75, 0.9, 0.95]), [2.8, 5, 10.5, 18.75, 22.9, 31.45]);
  // Types 1 to 6, 8 and 9 give 4, 4, 3, 3.5, 4, 3.75, 3.916667 and 3.9375 here: only type 7 gives 5.
  close(quantiles(x, [0.25]), [5]);
  close(quantiles(x, [0, 1]), [1, 40]);
  close(quantiles([7], [0, 0.3, 1]), [7, 7, 7]);
});

test('what has no quantile is refused', () => {
  expect(() => quantiles([], [0.5])).toThrow('No values');
  expect(() => quantiles([1], [50])).toThrow('The quantile 50; expected a share between 0 and 1');
});
