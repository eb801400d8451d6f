import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { countTimes, kaplanMeier, medianInterval, medianTime, restrictedMean } from './kaplan-meier.ts';

/** Times as printed: a plus is one last seen open. */
const read = (text: string) =>
  countTimes(text.split(' ').map((t) => ({ time: Number.parseInt(t), recovered: !t.endsWith('+') })));

// Leukaemia remission, weeks: Freireich et al. 1963, Blood 21:699; Gehan 1965, Biometrika 52:203.
const treated = read('6 6 6 6+ 7 9+ 10 10+ 11+ 13 16 17+ 19+ 20+ 22 23 25+ 32+ 32+ 34+ 35+');
const placebo = read('1 1 2 2 3 4 4 5 5 8 8 8 8 11 11 12 12 15 17 22 23');

describe('6-mercaptopurine, Kaplan & Meier 1958, JASA 53:457', () => {
  const events = kaplanMeier(treated).filter((p) => p.events > 0);
  test('curve and Greenwood’s standard error (R survival)', () => {
    expect(events.map((p) => [p.time, p.atRisk])).toEqual([
      [6, 21],
      [7, 17],
      [10, 15],
      [13, 12],
      [16, 11],
      [22, 7],
      [23, 6],
    ]);
    [0.857143, 0.806723, 0.752941, 0.690196, 0.627451, 0.537815, 0.448179].forEach((s, i) =>
      expect(events[i].open).toBeCloseTo(s, 6),
    );
    [0.07636035, 0.08693529, 0.09634965, 0.10681471, 0.11405387, 0.12823375, 0.13459146].forEach((se, i) =>
      expect(events[i].standardError).toBeCloseTo(se, 8),
    );
    expect(medianTime(events)).toBe(23);
  });
  test('bands of both kinds: scipy.stats.ecdf(CensoredData(…)).sf.confidence_interval (SciPy 1.17.1)', () => {
    const plain = kaplanMeier(treated, { band: 'plain' }).filter((p) => p.events > 0);
    const logLog = events;
    for (const [i, low, high] of [
      [0, 0.7074793118252003, 1],
      [3, 0.4808430981731827, 0.8995490586895621],
      [6, 0.1843848638406128, 0.711973679576754],
    ]) {
      expect(plain[i].low).toBeCloseTo(low, 12);
      expect(plain[i].high).toBeCloseTo(high, 12);
    }
    for (const [i, low, high] of [
      [0, 0.6197179552659838, 0.951551747646997],
      [3, 0.43161022248618397, 0.8490659633494507],
      [6, 0.18805200595923235, 0.6801426284952414],
    ]) {
      expect(logLog[i].low).toBeCloseTo(low, 12);
      expect(logLog[i].high).toBeCloseTo(high, 12);
    }
    expect(medianInterval(logLog)).toEqual({ low: 13, high: undefined });
  });
  test('restricted mean to 35: 23.29 ± 2.83 (standard error by the formula in whole fractions)', () => {
    const mean = restrictedMean(kaplanMeier(treated), 35);
    expect(mean.estimate).toBeCloseTo(23.287394957983192, 12);
    expect(mean.standardError).toBeCloseTo(2.8274676233714393, 12);
    expect(mean.high - mean.estimate).toBeCloseTo(1.959963984540054 * 2.8274676233714393, 10);
  });
});

describe('placebo', () => {
  const curve = kaplanMeier(placebo);
  test('curve and median', () => {
    [
      0.904762, 0.809524, 0.761905, 0.666667, 0.571429, 0.380952, 0.285714, 0.190476, 0.142857, 0.095238,
      0.047619, 0,
    ].forEach((s, i) => expect(curve[i].open).toBeCloseTo(s, 6));
    expect(curve).toHaveLength(12);
    expect(medianTime(curve)).toBe(8);
    expect(curve[11]).toMatchObject({ open: 0, standardError: 0, low: 0, high: 0 });
  });
  test('without censoring the restricted mean is the mean, 8.67, and its error s/√n of the values', () => {
    const mean = restrictedMean(curve, 35);
    expect(mean.estimate).toBeCloseTo(26 / 3, 12);
    expect(mean.standardError).toBeCloseTo(1.3773900412645483, 12);
  });
});

test('cut before the last time, and events at time 0', () => {
  const curve = kaplanMeier(read('0 0 4 4 10+'));
  expect(curve[0]).toMatchObject({ time: 0, atRisk: 5, open: 0.6 });
  // 0.6 for 4 years, 0.2 for 2
  expect(restrictedMean(curve, 6).estimate).toBeCloseTo(2.8, 12);
  expect(restrictedMean(curve, 2).estimate).toBeCloseTo(1.2, 12);
  expect(medianTime(kaplanMeier(read('3 5+')))).toBe(3);
});

test('what is not known is refused, and nothing gives nothing', () => {
  expect(() => restrictedMean(kaplanMeier(treated), 36)).toThrow(
    'The curve is known to 35; a mean cut at 36',
  );
  expect(() => restrictedMean([], 5)).toThrow(RangeError);
  expect(kaplanMeier([])).toEqual([]);
  expect(medianTime([])).toBeUndefined();
  expect(() => kaplanMeier(treated, { level: 95 })).toThrow('A level of confidence of 95');
});

test('with all censored at the horizon the curve is the plain share, and falls', () => {
  fc.assert(
    fc.property(fc.array(fc.integer({ min: 0, max: 45 }), { minLength: 1, maxLength: 200 }), (times) => {
      const horizon = 40;
      const curve = kaplanMeier(
        countTimes(times.map((t) => ({ time: Math.min(t, horizon), recovered: t <= horizon }))),
      );
      for (const [i, point] of curve.entries()) {
        const open = times.filter((t) => t > point.time).length / times.length;
        expect(point.open).toBeCloseTo(open, 12);
        expect(point.standardError).toBeCloseTo(Math.sqrt((open * (1 - open)) / times.length), 12);
        expect(point.low).toBeLessThanOrEqual(point.open);
        expect(point.high).toBeGreaterThanOrEqual(point.open);
        if (i > 0) expect(point.open).toBeLessThanOrEqual(curve[i - 1].open);
      }
    }),
    { seed: 3, numRuns: 200 },
  );
});
