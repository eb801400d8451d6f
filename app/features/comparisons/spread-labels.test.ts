import { expect, it } from 'vitest';
import { spreadLabels } from './spread-labels.ts';

it('leaves labels that stand apart, parts those that do not, and keeps all within', () => {
  expect(spreadLabels([10, 40], 12, 0, 100)).toEqual([10, 40]);
  expect(spreadLabels([40, 10, 42], 12, 0, 100)).toEqual([40, 10, 52]);
  expect(spreadLabels([95, 99, 97], 10, 0, 100)).toEqual([80, 100, 90]);
  expect(spreadLabels([-5], 10, 0, 100)).toEqual([0]);
});
