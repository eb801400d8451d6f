import { expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import { coverFan, fanShares } from './cover-fan.ts';
import { quantiles } from './quantile.ts';

const most = 25_000;
/** Replicates of growth: small and scattered at first, near the most at last. */
function replicates(count: number): Float64Array[] {
  const random = stream('fan', 'parameters');
  return Array.from({ length: count }, () => {
    const pace = 0.5 + random();
    return Float64Array.from({ length: 6 }, (_, t) => most * Math.min(1, 0.001 * 4 ** (t * pace)));
  });
}

test.each([1, 2, 37, 2000])('of %i replicates is the exact fan, to within its stated resolution', (count) => {
  const drawn = replicates(count);
  const fan = coverFan(6, most);
  drawn.forEach((values) => fan.add(values));
  const found = fan.quantiles();
  expect(fan.count).toBe(count);
  for (let time = 0; time < 6; time++)
    quantiles(
      drawn.map((values) => values[time]),
      fanShares,
    ).forEach((exact, s) =>
      expect(Math.abs(found[s][time] - exact)).toBeLessThanOrEqual(Math.sqrt(exact * most) / 4000),
    );
});

test('does not depend on the order', () => {
  const drawn = replicates(50);
  const [forth, back] = [coverFan(6, most), coverFan(6, most)];
  drawn.forEach((values) => forth.add(values));
  drawn.toReversed().forEach((values) => back.add(values));
  expect(forth.quantiles()).toEqual(back.quantiles());
});

test('0 and the most are exact, and what lies beyond is refused and leaves no trace', () => {
  const fan = coverFan(2, most);
  fan.add([0, most]);
  expect(() => fan.add([0, most * 1.01])).toThrow('Found a value of 25250; expected 0 to 25000');
  expect(() => fan.add([-1, 0])).toThrow(RangeError);
  expect(() => fan.add([NaN, 0])).toThrow(RangeError);
  expect(() => fan.add([0])).toThrow('Found 1 values; expected one at each of 2 times');
  expect(fan.quantiles([0, 0.5, 1])).toEqual(Array.from({ length: 3 }, () => Float64Array.of(0, most)));
  expect(fan.count).toBe(1);
  const bare = coverFan(1, 0);
  bare.add([0]);
  expect(bare.quantiles([0.5])[0][0]).toBe(0);
});
