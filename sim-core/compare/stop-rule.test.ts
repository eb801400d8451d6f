import { expect, test } from 'vitest';
import { wilsonInterval } from '#sim-core/ensemble/proportion.ts';
import { sureEnough } from './stop-rule.ts';

const lead = (low: number) => ({ estimate: low + 1, low, high: low + 2 });

test('goes on until enough replicates are in, whatever they say', () => {
  const standing = { replicates: 19, chances: [wilsonInterval(19, 19)], lead: lead(5) };
  expect(sureEnough(standing, { atLeast: 20, halfWidth: 0.5, rankSettled: true })).toBeUndefined();
});

test('stops where every chance is known closely enough', () => {
  const chances = [wilsonInterval(50, 100), wilsonInterval(95, 100)];
  const standing = { replicates: 100, chances, lead: undefined };
  // Wilson half-widths of 0.096 and 0.045.
  expect(sureEnough(standing, { atLeast: 20, halfWidth: 0.1 })).toBe('chances known');
  expect(sureEnough(standing, { atLeast: 20, halfWidth: 0.09 })).toBeUndefined();
});

test('stops where the best leads the second for sure', () => {
  const standing = { replicates: 100, chances: [wilsonInterval(50, 100)], lead: lead(0.2) };
  expect(sureEnough(standing, { atLeast: 20, rankSettled: true })).toBe('rank settled');
  expect(sureEnough({ ...standing, lead: lead(-0.1) }, { atLeast: 20, rankSettled: true })).toBeUndefined();
  expect(sureEnough(standing, { atLeast: 20 })).toBeUndefined();
});
