import { expect, it } from 'vitest';
import { elevationCurveSchema } from '#contract/layers.ts';
import { curveInWords } from './curve-words.ts';
import { chartSpan, heightAt, siteHeights } from './elevation-facts.ts';
import { anchorsOf, nextLevel, startingCurves, startingPoint } from './starting-curves.ts';

const flat = { minimum: 0, maximum: 4, histogram: [10, 10, 10, 10] };
const none = { capacity: null, vigour: null, exposure: null };

it('has the heights of the site in metres', () => {
  const layer = {
    minimum: -1,
    maximum: 10,
    histogram: [1],
    vertical: { datum: 'invented', unit: 'foot' as const },
  };
  expect(siteHeights(layer)).toMatchObject({ minimum: -0.3048, maximum: 3.048 });
  expect(siteHeights({ ...layer, vertical: null }).maximum).toBe(10);
});

it('reads the height below which a share of the cells lies', () => {
  expect([0.1, 0.5, 0.9, 1].map((share) => heightAt(flat, share))).toEqual([0.4, 2, 3.6, 4]);
  expect(heightAt({ ...flat, histogram: [0, 0, 40, 0] }, 0.5)).toBe(2.5);
});

it('shows all there is to see', () => {
  const { from, to } = chartSpan(
    flat,
    {
      ...none,
      exposure: [
        [-1, 0],
        [2, 1],
      ],
    },
    [{ name: 'a', height: 5 }],
  );
  expect(from).toBeLessThan(-1);
  expect(to).toBeGreaterThan(5);
});

it('starts from the levels of the tide where all are named in order, else from the site’s own heights', () => {
  const datums = [
    { name: 'Mean low water', height: -1.2 },
    { name: 'mean sea level', height: 0 },
    { name: 'mean high water', height: 1.1 },
  ];
  expect(anchorsOf(flat, datums)).toEqual({ low: -1.2, middle: 0, high: 1.1, levels: 'given' });
  expect(anchorsOf(flat, datums.slice(1))).toEqual({ low: 0.4, middle: 2, high: 3.6, levels: 'missing' });
  expect(anchorsOf(flat, [{ ...datums[0], height: 3 }, ...datums.slice(1)])).toMatchObject({
    middle: 2,
    levels: 'out of order',
  });
  expect(nextLevel([], 0.4)).toBe(0.4);
  expect(nextLevel(datums, 0.4)).toBe(1.6);
});

it('gives curves that can be saved, also on flat ground', () => {
  const level = { low: 1, middle: 1, high: 1, levels: 'missing' as const };
  for (const anchors of [anchorsOf(flat, []), level])
    for (const of of startingCurves)
      for (const curve of Object.values(startingPoint(of, anchors)))
        if (curve) expect(() => elevationCurveSchema.parse(curve)).not.toThrow();
  expect(startingPoint('salt-marsh grass', anchorsOf(flat, [])).capacity?.[0][1]).toBe(0);
});

it('says a curve in words', () => {
  expect(
    curveInWords('capacity', [
      [0, 0],
      [0.5, 1],
      [2, 0.2],
    ]),
  ).toBe('Capacity: 0 % up to 0 m, 100 % at 0.5 m, 20 % from 2 m up.');
});
