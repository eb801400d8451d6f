import { expect, it } from 'vitest';
import { parseNumber } from './parse-number.ts';

it.each([
  [' 1.5 ', 1.5],
  ['0,25', 0.25],
  ['−2,3', -2.3],
  ['.5', 0.5],
  ['3.', 3],
  ['1e-3', 0.001],
])('reads %j', (text, value) => {
  expect(parseNumber(text)).toBe(value);
});

it.each(['', 'x', '1,5,0', '1.500,2', '0x10', 'Infinity', '1 000'])('does not guess at %j', (text) => {
  expect(parseNumber(text)).toBeUndefined();
});
