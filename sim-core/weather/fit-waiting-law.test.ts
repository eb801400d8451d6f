import { describe, expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import { bestFit, fitWaitingLaw, lawOf, logLikelihood, type FittedLaw } from './fit-waiting-law.ts';
import { waitExceededWith } from './waiting-law.ts';

const none = { whole: [], open: [], first: [], without: [] };
const whole = [7, 12, 9, 15, 4, 11, 20, 8];
const uniformOf = (replicate: number) => {
  const words = stream('waits', `weather/${replicate}`);
  return () => ((words.int32() >>> 0) + 0.5) / 2 ** 32;
};

describe('agrees with scipy 1.17', () => {
  // stats.<law>.fit(stats.CensoredData(uncensored=whole, right=[6]), floc=0), and the sum of logpdf and logsf there
  test.each([
    ['exponential', { mean: 11.5 }, -27.538776282953634],
    ['weibull', { shape: 2.531940824980909, scale: 12.312407417570533 }, -23.5475098258084],
    ['gamma', { shape: 5.347465319971762, scale: 2.0331477971770386 }, -23.41174998330079],
  ] as const)('%s with an open interval', (law, expected, value) => {
    const fit = fitWaitingLaw(law, { ...none, whole, open: [6] })!;
    expect(fit.logLikelihood).toBeCloseTo(value, 6);
    for (const [name, x] of Object.entries(expected))
      expect((fit.wait as unknown as Record<string, number>)[name] / x).toBeCloseTo(1, 2);
    expect(fit.aic).toBeCloseTo(2 * Object.keys(expected).length - 2 * value, 5);
  });
  // scipy.optimize.minimize of −Σ logpdf − Σ logsf(open) − Σ (logsf(first) − log mean), Nelder–Mead
  test.each([
    ['exponential', { mean: 10.77777772 }, -30.397377610504467],
    ['weibull', { shape: 2.54605076, scale: 12.15304344 }, -26.035474327462637],
    ['gamma', { shape: 5.51259091, scale: 1.94045258 }, -25.86805750898456],
  ] as const)('%s with a first wait besides', (law, expected, value) => {
    const fit = fitWaitingLaw(law, { ...none, whole, open: [6], first: [5] })!;
    expect(fit.logLikelihood).toBeCloseTo(value, 6);
    for (const [name, x] of Object.entries(expected))
      expect((fit.wait as unknown as Record<string, number>)[name] / x).toBeCloseTo(1, 2);
  });
  test('a look without any beginning', () => {
    // log(quad(D.sf, 12, inf)[0] / D.mean()) of D = stats.weibull_min(2, scale=10)
    const found = logLikelihood({ law: 'weibull', shape: 2, scale: 10 }, { ...none, without: [12] });
    expect(found).toBeCloseTo(-2.4114403551669295, 6);
  });
});

describe('recovers the law that made the waits', () => {
  const made: FittedLaw[] = [lawOf('exponential', 12, 1), lawOf('weibull', 12, 2), lawOf('gamma', 12, 3)];
  test.each(made)('$law, within four standard errors', (wait) => {
    const draw = uniformOf(1);
    const waits = Array.from({ length: 400 }, () => waitExceededWith(wait, draw()));
    const fit = fitWaitingLaw(wait.law, { ...none, whole: waits })!;
    const spread = wait.law === 'exponential' ? 1 : wait.law === 'weibull' ? 0.523 : Math.sqrt(1 / 3);
    expect(Math.abs(fit.mean / 12 - 1)).toBeLessThan((4 * spread) / 20);
    // Standard errors of ln shape: Weibull √(0.608/n); gamma with shape 3 √(1.80/n), from its information matrix.
    if ('shape' in wait && 'shape' in fit.wait)
      expect(Math.abs(Math.log(fit.wait.shape / wait.shape))).toBeLessThan(
        4 * Math.sqrt((wait.law === 'weibull' ? 0.608 : 1.8) / 400),
      );
  });
  test('windows of a process that has gone on for long give its mean, however short they are', () => {
    // A record of 30 years at an exponential mean of 20: what is open, first or missing carries most of it.
    const draw = uniformOf(2);
    const seen = {
      whole: [] as number[],
      open: [] as number[],
      first: [] as number[],
      without: [] as number[],
    };
    for (let window = 0; window < 300; window++) {
      let at = waitExceededWith(lawOf('exponential', 20, 1), draw());
      if (at > 30) {
        seen.without.push(30);
        continue;
      }
      seen.first.push(at);
      for (;;) {
        const wait = waitExceededWith(lawOf('exponential', 20, 1), draw());
        if (at + wait > 30) {
          seen.open.push(30 - at);
          break;
        }
        seen.whole.push(wait);
        at += wait;
      }
    }
    const fit = fitWaitingLaw('exponential', seen)!;
    // events ~ Poisson(300 · 30/20 = 450): four standard errors of the mean are 4/√450 of it
    expect(Math.abs(fit.mean / 20 - 1)).toBeLessThan(4 / Math.sqrt(450));
    expect(fit.mean).toBeCloseTo((300 * 30) / (seen.whole.length + seen.first.length), 3);
  });
  test('the interval of the mean holds the truth in about 95 of 100', () => {
    const held = Array.from({ length: 200 }, (_, i) => {
      const draw = uniformOf(10 + i);
      const waits = Array.from({ length: 8 }, () => waitExceededWith(lawOf('exponential', 12, 1), draw()));
      const [low, high] = fitWaitingLaw('exponential', { ...none, whole: waits })!.meanInterval;
      return low <= 12 && 12 <= high;
    }).filter(Boolean).length;
    expect(held / 200).toBeGreaterThan(0.88);
    expect(held / 200).toBeLessThan(1);
  });
});

test('takes the simpler law unless another is clearly better', () => {
  const fits = (waits: number[]) =>
    (['exponential', 'weibull', 'gamma'] as const).map((law) =>
      fitWaitingLaw(law, { ...none, whole: waits })!,
    );
  const draw = uniformOf(3);
  const memoryless = Array.from({ length: 12 }, () => waitExceededWith(lawOf('exponential', 10, 1), draw()));
  expect(bestFit(fits(memoryless))?.wait.law).toBe('exponential');
  expect(bestFit(fits([9, 10, 11, 10, 9, 12, 10, 11]))?.wait.law).not.toBe('exponential');
  expect(bestFit([])).toBeUndefined();
});

test('no beginning, no fit', () => {
  expect(fitWaitingLaw('exponential', { ...none, open: [5], without: [20] })).toBeUndefined();
});
