// @vitest-environment node
import { expect, it } from 'vitest';
import type { SuggestProgress } from '#sim-core/plan/suggest.ts';
import { followProgress, type PlanProgress } from './plan-progress.ts';

function* work(): Generator<SuggestProgress, string> {
  for (let done = 0; done < 5; done++) yield { stage: 'weighing', done, of: 5 };
  for (let done = 0; done < 2; done++) yield { stage: 'placing', done, of: 2 };
  return 'ready';
}

it('tells each stage at once, then ten times a second at most, with the time left by the pace of the stage', () => {
  let time = 1000;
  const told: PlanProgress[] = [];
  const step = () => (time += 60);
  expect(followProgress(work(), (progress) => told.push(progress), step)).toBe('ready');
  expect(told).toEqual([
    { stage: 'weighing', done: 0, of: 5, secondsLeft: undefined },
    { stage: 'weighing', done: 2, of: 5, secondsLeft: expect.closeTo(0.18, 9) as number },
    { stage: 'weighing', done: 4, of: 5, secondsLeft: expect.closeTo(0.06, 9) as number },
    { stage: 'placing', done: 0, of: 2, secondsLeft: undefined },
  ]);
});
