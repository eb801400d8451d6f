import { describe, expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import type { DroughtRenewal } from '#sim-core/spec/weather-source.ts';
import { fitRenewal, renewalOf } from './fit-renewal.ts';
import { recordDroughts } from './record-droughts.ts';
import { drawRenewal } from './renewal.ts';
import { meanWait } from './waiting-law.ts';

const record = (values: ArrayLike<number>, first = 1900) =>
  Array.from(values, (index, i) => ({ year: first + i, index }));

describe('droughts of a record', () => {
  //          1900 …
  const dry = [-4, -3, 0, 1, -3, -5, 0, 0, 0, -3, 1, 2, -3];
  test('by hand: the first began before the record, the last may go on', () => {
    const { droughts, intervals, firstWaits, lastWaits, without } = recordDroughts(record(dry), -3);
    expect(droughts.map(({ from, until, cutShort }) => [from, until, cutShort])).toEqual([
      [1900, 1901, true],
      [1904, 1905, false],
      [1909, 1909, false],
      [1912, 1912, true],
    ]);
    expect(droughts[1]).toMatchObject({ years: 2, meanIndex: -4, driestIndex: -5 });
    expect([intervals, firstWaits, lastWaits, without]).toEqual([[5, 3], [4], [1], []]);
  });
  test('a gap parts the record: nothing is said across it', () => {
    const gapped = record(dry).filter(({ year }) => year !== 1907);
    const { intervals, firstWaits, lastWaits } = recordDroughts(gapped, -3);
    expect([intervals, firstWaits, lastWaits]).toEqual([[3], [4, 1], [3, 1]]);
  });
  test('a stretch without a beginning is known to be so', () => {
    expect(recordDroughts(record([0, 1, 0]), -3).without).toEqual([3]);
    expect(recordDroughts([], -3).without).toEqual([]);
  });
});

describe('recovers the renewal that made a record', () => {
  const made: DroughtRenewal = {
    returnInterval: { law: 'gamma', shape: 4, scale: 4 },
    sinceLatest: 5,
    depth: -4,
    depthSpread: 0.4,
    length: { law: 'fixed', years: 2 },
    between: 0.3,
  };
  const words = stream('renewals', 'weather/0');
  const drawn = drawRenewal(made, 3000, 1, () => ((words.int32() >>> 0) + 0.5) / 2 ** 32);
  const fit = fitRenewal(record(drawn), -2)!;
  test('return interval, within four standard errors', () => {
    // 3000/16 = 188 intervals of coefficient of variation ½; beginnings are rounded to years, which adds little
    expect(Math.abs(fit.interval.mean / 16 - 1)).toBeLessThan((4 * 0.5) / Math.sqrt(188) + 0.02);
    expect(fit.interval.wait.law).not.toBe('exponential');
    expect(fit.found.intervals.length).toBeGreaterThan(150);
  });
  test('depth, its spread, other years and length', () => {
    expect(Math.abs(fit.depth + 4)).toBeLessThan((4 * 0.4) / Math.sqrt(150));
    expect(Math.abs(fit.depthSpread - 0.4)).toBeLessThan(0.1);
    expect(fit.between).toBeCloseTo(0.3, 12);
    // A drought that the next one cuts short is a year long.
    expect(Math.abs(meanWait(fit.length) - 2)).toBeLessThan(0.1);
  });
  test('the empirical curve runs along the fitted one', () => {
    const law = { law: 'gamma', shape: 4, scale: 4 } as const;
    const half = fit.seen.find(({ open }) => open < 0.5)!;
    // The median of this gamma law is 14.69 (scipy: stats.gamma(4, scale=4).median()).
    expect(Math.abs(half.time - 14.69)).toBeLessThan(2);
    expect(meanWait(law)).toBe(16);
  });
  test('as weather of an outlook: the latest drought counts from its beginning to the survey', () => {
    const some = record([0, 0, -4, 0, 0, 0, -3.5, -4, 0, 0, 0, 0, -4.2, 0, 0]);
    const renewal = renewalOf(fitRenewal(some, -2)!, 1914);
    expect(renewal).toMatchObject({ sinceLatest: 3, depth: -3.98, between: 0 });
    expect(renewalOf(fitRenewal(some, -2)!, 1911).sinceLatest).toBe(6);
  });
  test('droughts drawn from a fit last as long as those on record, and are of one year as often', () => {
    const drawnLengths = (lengths: readonly number[]) => {
      const chain = record(
        lengths.flatMap((n) => [...new Array<number>(9).fill(0), ...new Array<number>(n).fill(-4)]).concat(0),
      );
      // The return interval is set wide, so that no drought is cut short by the next one.
      const renewal: DroughtRenewal = {
        ...renewalOf(fitRenewal(chain, -2)!, 2000),
        returnInterval: { law: 'exponential', mean: 60 },
      };
      const draws = stream('lengths', 'weather/0');
      const years = drawRenewal(renewal, 200_000, 1, () => ((draws.int32() >>> 0) + 0.5) / 2 ** 32);
      const seen = recordDroughts(record(years, 2000), -2).droughts.map((drought) => drought.years);
      return {
        mean: seen.reduce((a, b) => a + b, 0) / seen.length,
        ones: seen.filter((n) => n === 1).length / seen.length,
      };
    };
    // Some 3,000 droughts are drawn: four standard errors of the share are 0.03; a few come so close that they join.
    const short = drawnLengths([1, 1, 1, 2, 1, 1]);
    expect(Math.abs(short.mean - 7 / 6)).toBeLessThan(0.06);
    expect(Math.abs(short.ones - 5 / 6)).toBeLessThan(0.05);
    const mixed = drawnLengths([1, 3, 2, 1, 4, 2, 2, 3, 1, 2]);
    expect(Math.abs(mixed.mean - 2.1)).toBeLessThan(0.2);
    expect(Math.abs(mixed.ones - 0.3)).toBeLessThan(0.08);
  });
  test('mixed lengths get a law that rounds to them as often', () => {
    const chain = record(
      Array.from({ length: 400 }, (_, i) =>
        i % 10 < [1, 1, 2, 1, 3][Math.floor(i / 10) % 5] ? -4 : 0,
      ).slice(5),
    );
    const { length } = fitRenewal(chain, -2)!;
    expect(length.law).not.toBe('fixed');
    expect(Math.abs(meanWait(length) - 1.6)).toBeLessThan(0.15);
  });
});

test('too few droughts are not fitted', () => {
  expect(fitRenewal(record([0, -4, 0, 0, -4, 0, 0, 0]), -2)).toBeUndefined();
});
