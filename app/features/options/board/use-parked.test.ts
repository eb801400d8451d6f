import { act, renderHook } from '@testing-library/react';
import { expect, it } from 'vitest';
import type { ParkedPattern } from './use-parked.ts';
import { useParked } from './use-parked.ts';

const pattern = (tool: ParkedPattern['tool'], id: string): ParkedPattern => ({
  tool,
  works: [{ kind: 'mound', id: `${id}m`, set: id, year: 2027, x: 1, y: 2, radius: 1, strength: 1, halo: 0 }],
  set: { id, laid: { pattern: 'grid', seed: id, parameters: {} } },
  instead: undefined,
});

it('keeps patterns whose tools were left, until they are dropped', () => {
  const { result } = renderHook(useParked);
  act(() => result.current.park(pattern('scattered', 'a')));
  act(() => result.current.park(pattern('line', 'b')));
  expect(result.current.works.map(({ id }) => id)).toEqual(['am', 'bm']);
  expect(result.current.sets.map(({ id }) => id)).toEqual(['a', 'b']);
  act(() => result.current.drop());
  expect(result.current.works).toEqual([]);
});

it('gives the last one back to a tool that its outline or line serves, and to no other', () => {
  const { result } = renderHook(useParked);
  act(() => result.current.park(pattern('scattered', 'a')));
  expect(result.current.take('line')).toBeUndefined();
  let taken: ParkedPattern | undefined;
  act(() => {
    taken = result.current.take('grid');
  });
  expect([taken?.set.id, result.current.works]).toEqual(['a', []]);
});
