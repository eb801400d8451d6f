import { describe, expect, test } from 'vitest';
import type { StudyRun } from '#sim-core/spec/study-run.ts';
import type { AnyRateName } from '#sim-core/spec/all-parameters.ts';
import type { Beliefs, DrawnRates } from '#sim-core/spec/uncertain.ts';
import { rowsOfBlock, studyDesign, type StudyInput } from './study-design.ts';
import { studyFigures, type StudyFigures } from './study-figures.ts';
import { measureOf } from './study-measure.ts';
import { mattersWords } from './matters-words.ts';
import { weightsOf } from './weights.ts';

/** Rates believed to lie anywhere between two values, which stand for shares of 0..1 of published functions. */
const ranges = {
  lateralSpread: [0.2, 1.2],
  fillRate: [0.5, 1.5],
  backgroundLoss: [0.01, 0.03],
} as const satisfies { [name in AnyRateName]?: readonly [number, number] };
type Name = keyof typeof ranges;
const names = Object.keys(ranges) as Name[];
const rates = Object.fromEntries(
  names.map((name) => [name, { law: 'uniform', low: ranges[name][0], high: ranges[name][1] }]),
) as Beliefs;
const sharesOf = (drawn: DrawnRates) =>
  names.map((name) => (drawn[name]! - ranges[name][0]) / (ranges[name][1] - ranges[name][0]));
const span = { surveyYear: 2024, years: 1 };

/** Figures of a function of the shares and the future, by way of run records as the page has them. */
function figures(
  input: Partial<StudyInput>,
  f: (shares: number[], replicate: number) => number,
): StudyFigures {
  const design = studyDesign({ method: 'indices', size: 32, seed: 'study', rates, luck: false, ...input });
  const runs = design.points.map((point): StudyRun => ({
    ...point,
    digest: '',
    recoveredYear: null,
    coveredArea: [0, f(sharesOf(point.rates), point.replicate)],
    closedShare: [0, 0],
  }));
  return studyFigures(design, (i) => measureOf(runs[i], { kind: 'covered', year: 2025 }, span), 'study')!;
}

describe('indices by the path of the page', () => {
  const check = (f: (u: number[]) => number, first: number[], total: number[], width: number) => {
    const found = figures({ size: 2048 }, f);
    if (found.method !== 'indices') throw new Error('another method');
    expect(found.indices.map(({ factor }) => factor)).toEqual(names);
    found.indices.forEach((of, i) => {
      for (const [interval, published] of [
        [of.first, first[i]],
        [of.total, total[i]],
      ] as const) {
        // A 95 % interval is 3.9 standard errors wide.
        expect(Math.abs(interval.estimate - published)).toBeLessThan(interval.high - interval.low + 1e-3);
        expect(interval.high - interval.low).toBeLessThan(width);
      }
    });
    return found;
  };
  test('Ishigami & Homma 1990 (ISUMA, 398–403), a = 7, b = 0.1', () => {
    check(
      (u) => {
        const [x, y, z] = u.map((v) => Math.PI * (2 * v - 1));
        return Math.sin(x) + 7 * Math.sin(y) ** 2 + 0.1 * z ** 4 * Math.sin(x);
      },
      [0.31390519114781146, 0.4424111447900409, 0],
      [0.5575888552099592, 0.4424111447900409, 0.2436836640621477],
      0.25,
    );
  });
  test('g-function (Saltelli & Sobol’ 1995, Reliab. Eng. Syst. Saf. 50:225–239), a = 0, 1, 9', () => {
    const a = [0, 1, 9];
    // V_i = 1 / (3 (1 + a_i)²); V = Π(1 + V_i) − 1; S_i = V_i / V; S_Ti = V_i Π_{j≠i}(1 + V_j) / V.
    const alone = a.map((ai) => 1 / (3 * (1 + ai) ** 2));
    const whole = alone.reduce((product, v) => product * (1 + v), 1) - 1;
    const found = check(
      (u) => a.reduce((product, ai, i) => (product * (Math.abs(4 * u[i] - 2) + ai)) / (1 + ai), 1),
      alone.map((v) => v / whole),
      alone.map((v) => (v * (whole + 1)) / (1 + v) / whole),
      0.25,
    );
    expect(weightsOf(found)[0]).toMatchObject({ factor: names[0], standing: 'decides' });
    expect(weightsOf(found)[2]).toMatchObject({ factor: names[2], standing: 'hardly' });
  });
  test('weather and chance take the share that they have: rate and luck alike in x + luck', () => {
    const lucks = 0x1000000;
    const found = figures({ size: 1024, luck: true }, ([x], replicate) => x + replicate / lucks);
    if (found.method !== 'indices') throw new Error('another method');
    expect(found.indices.map(({ factor }) => factor)).toEqual([...names, 'luck']);
    for (const i of [0, 3]) expect(Math.abs(found.indices[i].first.estimate - 0.5)).toBeLessThan(0.1);
    for (const i of [1, 2]) expect(found.indices[i].total.high).toBeLessThan(1e-9);
  });
});

test('screening of a linear function is exact: 0.9 of each slope over the middle nine tenths, and no σ', () => {
  const found = figures({ method: 'screening', size: 5 }, ([x, y, z]) => 3 * x - 2 * y + 0.1 * z);
  if (found.method !== 'screening') throw new Error('another method');
  const slopes = [3, -2, 0.1];
  found.effects.forEach(({ mean, meanSize, deviation }, i) => {
    expect(mean).toBeCloseTo(0.9 * slopes[i], 10);
    expect(meanSize).toBeCloseTo(0.9 * Math.abs(slopes[i]), 10);
    expect(deviation).toBeCloseTo(0, 10);
  });
  expect(weightsOf(found).map(({ factor, standing }) => [factor, standing])).toEqual([
    [names[0], 'decides'],
    [names[1], 'decides'],
    [names[2], 'hardly'],
  ]);
});

test('screening counts another future as one whole step', () => {
  // The four futures of a walk differ by their number, of which only two meet: two levels apart.
  const found = figures({ method: 'screening', size: 4, luck: true }, (_, replicate) =>
    replicate % 4 < 2 ? 0 : 5,
  );
  if (found.method !== 'screening') throw new Error('another method');
  expect(found.effects.at(-1)).toMatchObject({ factor: 'luck', meanSize: 5 });
});

test('one at a time: the curve of each rate, others at their medians, as a mean over futures', () => {
  const found = figures(
    { method: 'one-at-a-time', size: 3 },
    ([x, y], replicate) => 10 * x + y * y + replicate,
  );
  if (found.method !== 'one-at-a-time') throw new Error('another method');
  expect(found.middle).toBeCloseTo(5 + 0.25 + 1, 10);
  const [spread, fill, loss] = found.curves;
  expect(spread.values[0]).toBeCloseTo(0.25, 10);
  [0.5, 2.5, 5, 7.5, 9.5].forEach((x, i) => expect(spread.outputs[i]).toBeCloseTo(x + 0.25 + 1, 10));
  [0.05, 0.25, 0.5, 0.75, 0.95].forEach((y, i) => expect(fill.outputs[i]).toBeCloseTo(5 + y * y + 1, 10));
  expect(new Set(loss.outputs.map((o) => o.toFixed(9))).size).toBe(1);
  // Quantiles of type 7 of 5.25 + (0, 1, 2).
  expect(found.luck![0]).toBeCloseTo(5.35, 10);
  expect(found.luck![1]).toBeCloseTo(7.15, 10);
});

test.each(['one-at-a-time', 'screening', 'indices'] as const)(
  'a larger study of %s begins with the smaller',
  (method) => {
    const input = { method, seed: 'grow', rates, luck: true };
    const small = studyDesign({ ...input, size: 20 });
    const large = studyDesign({ ...input, size: 48 });
    expect(large.points.slice(0, small.points.length)).toEqual(small.points);
    expect(large.points.length).toBe((small.points.length / 20) * 48);
    expect(studyDesign({ ...input, seed: 'other', size: 20 }).points).toEqual(
      method === 'one-at-a-time' ? small.points : expect.not.arrayContaining([small.points[0]]),
    );
  },
);

test('rows of a block take each rate once from every part of what is believed', () => {
  const { points, groupSize } = studyDesign({
    method: 'indices',
    size: 2 * rowsOfBlock,
    seed: 's',
    rates,
    luck: false,
  });
  for (const block of [0, 1])
    for (const name of [0, 1, 2])
      for (const side of [0, 1]) {
        const parts = Array.from({ length: rowsOfBlock }, (_, r) =>
          Math.floor(
            sharesOf(points[(block * rowsOfBlock + r) * groupSize + side].rates)[name] * rowsOfBlock,
          ),
        );
        expect(parts.sort((a, b) => a - b)).toEqual(Array.from({ length: rowsOfBlock }, (_, i) => i));
      }
});

test('groups that are not complete are left out, and too few tell nothing', () => {
  const design = studyDesign({ method: 'screening', size: 4, seed: 's', rates, luck: false });
  const some = (until: number) => studyFigures(design, (i) => (i < until ? i : undefined), 's');
  expect(some(7)).toBeUndefined();
  expect(some(8)?.groups).toBe(2);
  expect(some(11)?.groups).toBe(2);
});

describe('in words', () => {
  const weight = (estimate: number) => ({ estimate, low: estimate, high: estimate });
  test('what decides, what hardly matters, what to measure', () => {
    expect(
      mattersWords(
        [
          { factor: 'lateralSpread', weight: weight(0.7), standing: 'decides' },
          { factor: 'luck', weight: weight(0.25), standing: 'matters' },
          { factor: 'fillRate', weight: weight(0.01), standing: 'hardly' },
          { factor: 'backgroundLoss', weight: weight(0), standing: 'hardly' },
        ],
        'years to recovery',
      ),
    ).toMatch(
      /^Lateral spread decides years to recovery\. Weather and chance matter too\. .* and .* hardly matter\. Lateral spread is worth measuring better first\.$/,
    );
  });
  test('luck alone, and nothing at all', () => {
    expect(mattersWords([{ factor: 'luck', weight: weight(0.9), standing: 'decides' }], 'it')).toBe(
      'Weather and chance decide it. That is no rate: measuring the plant better would not make this much surer.',
    );
    expect(mattersWords([], 'it')).toBe('Nothing that was varied changes it.');
  });
});
