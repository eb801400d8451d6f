import { expect, test } from 'vitest';
import { duration, showProgress } from './show-progress.ts';

test('progress tells the time left by the pace so far, and seldom where lines add up', () => {
  let now = 0;
  let text = '';
  const tell = showProgress({ write: (t) => (text += t), isTerminal: false, now: () => now });
  for (const [at, done] of [
    [1000, 1],
    [2000, 2],
    [90_000, 3],
    [120_000, 4],
  ]) {
    now = at;
    tell(done, 4, 'replicate 1 of 2');
  }
  expect(text).toBe(
    '1 of 4 steps, replicate 1 of 2, 3 s left\n3 of 4 steps, replicate 1 of 2, 30 s left\n' +
      '4 of 4 steps, replicate 1 of 2, took 2 min\n',
  );
  expect(duration(5_400_000)).toBe('1 h 30 min');
});
