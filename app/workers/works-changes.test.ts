// @vitest-environment node
import { expect, it } from 'vitest';
import type { Action } from '#sim-core/spec/run-spec.ts';
import { worksChanges } from './works-changes.ts';

const mound = (x: number): Action => ({
  kind: 'mound',
  year: 2027,
  x,
  y: 0,
  radius: 2,
  strength: 1,
  halo: 0,
});

it('tells what came and what went, by the object', () => {
  const changes = worksChanges();
  const [a, b, c] = [mound(1), mound(2), mound(3)];
  expect(changes.to([a, b])).toEqual({
    removed: [],
    added: [
      [0, a],
      [1, b],
    ],
  });
  expect(changes.to([b, a])).toEqual({ removed: [], added: [] });
  expect(changes.to([a, c])).toEqual({ removed: [1], added: [[2, c]] });
  // Moved: another object takes its place under another key, as does the same one that comes back.
  expect(changes.to([{ ...a }, c])).toEqual({ removed: [0], added: [[3, a]] });
  expect(changes.to([a, c, c])).toEqual({ removed: [3], added: [[4, a]] });
  expect(changes.to([])).toEqual({ removed: [4, 2], added: [] });
});
