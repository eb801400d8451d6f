// @vitest-environment node
import { expect, it, vi } from 'vitest';
import { createLiveList } from './live-list.ts';

interface Work {
  id: string;
  phase: string;
}

it('tells each change and how many are at work, and keeps its array until then', () => {
  const onChange = vi.fn();
  const heard = vi.fn();
  const lives = createLiveList<Work>({ idOf: (w) => w.id, isAtWork: (w) => w.phase === 'running', onChange });
  const leave = lives.subscribe(heard);
  lives.put({ id: 'a', phase: 'running' });
  lives.put({ id: 'b', phase: 'done' });
  const before = lives.list();
  expect(lives.list()).toBe(before);
  lives.put({ id: 'a', phase: 'loading' });
  expect(lives.list().map(({ id }) => id)).toEqual(['b', 'a']);
  lives.change('b', { phase: 'running' });
  lives.change('c', { phase: 'running' });
  expect(lives.get('b')).toEqual({ id: 'b', phase: 'running' });
  expect(lives.get('c')).toBeUndefined();
  lives.remove('a');
  expect(lives.list().map(({ id }) => id)).toEqual(['b']);
  expect(onChange.mock.calls.map(([active]) => active as number)).toEqual([1, 1, 0, 1, 1, 1]);
  expect(heard).toHaveBeenCalledTimes(6);
  leave();
  lives.remove('b');
  expect(heard).toHaveBeenCalledTimes(6);
});
