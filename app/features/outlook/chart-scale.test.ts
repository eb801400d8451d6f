import { expect, it } from 'vitest';
import { chartScale } from './chart-scale.ts';

const scale = chartScale({ width: 1000, height: 500 }, 2027, 34, [0, -3.4, 1], false);

it('puts each year and index where the pointer finds it again', () => {
  for (const year of [2027, 2043, 2060]) expect(scale.yearAt(scale.x(year))).toBe(year);
  for (const index of [-5, -3.4, 0, 2.9]) expect(scale.indexAt(scale.y(index))).toBe(index);
});

it('stays within the years and the drawn range, whatever is pointed at', () => {
  expect(scale.yearAt(-50)).toBe(2027);
  expect(scale.yearAt(5000)).toBe(2060);
  expect(scale.indexAt(-100)).toBe(scale.wettest);
  expect(scale.indexAt(9000)).toBe(scale.driest);
});

it('makes room for the driest value, within the scale', () => {
  expect(chartScale({ width: 1000, height: 500 }, 2027, 34, [-7.5], false).driest).toBe(-8);
  expect(chartScale({ width: 1000, height: 500 }, 2027, 34, [-15, 15], false)).toMatchObject({
    driest: -15,
    wettest: 15,
  });
});
