import fc from 'fast-check';
import { expect, it } from 'vitest';
import { curveSchema, type Curve } from '#sim-core/spec/layer-source.ts';
import { curveShare } from './curve-share.ts';

const hump: Curve = [
  [-0.5, 0],
  [0.5, 0.8],
  [1, 0.8],
  [3, 0.2],
];

it('is straight between its points and constant beyond them', () => {
  const at: [number, number][] = [
    [-9, 0],
    [-0.5, 0],
    [0, 0.4],
    [0.5, 0.8],
    [0.7, 0.8],
    [1, 0.8],
    [2, 0.5],
    [3, 0.2],
    [9, 0.2],
  ];
  for (const [z, share] of at) expect(curveShare(hump, z)).toBeCloseTo(share, 12);
  expect(curveShare(hump, Infinity)).toBe(0.2);
  expect(curveShare(hump, -Infinity)).toBe(0);
});

it('stays between the shares of the points beside it, whatever the curve', () => {
  const curves = fc
    .uniqueArray(fc.double({ min: -50, max: 50, noNaN: true }), {
      minLength: 2,
      maxLength: 20,
      comparator: (a, b) => a === b,
    })
    .chain((values) =>
      fc
        .array(fc.double({ min: 0, max: 1, noNaN: true }), {
          minLength: values.length,
          maxLength: values.length,
        })
        .map((shares) => values.sort((a, b) => a - b).map((z, i) => [z, shares[i]])),
    );
  fc.assert(
    fc.property(curves, fc.double({ min: -60, max: 60, noNaN: true }), (points, z) => {
      const curve = curveSchema.parse(points);
      const left = curve.findLast(([at]) => at <= z) ?? curve[0];
      const right = curve.find(([at]) => at >= z) ?? curve[curve.length - 1];
      const share = curveShare(curve, z);
      expect(share).toBeGreaterThanOrEqual(Math.min(left[1], right[1]) - 1e-12);
      expect(share).toBeLessThanOrEqual(Math.max(left[1], right[1]) + 1e-12);
    }),
  );
});
