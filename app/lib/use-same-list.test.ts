import { renderHook } from '@testing-library/react';
import { expect, it } from 'vitest';
import { useSameList } from './use-same-list.ts';

it('gives the same list for the same things, and another as soon as one differs', () => {
  const [a, b] = [{}, {}];
  const first = [a, b];
  const { result, rerender } = renderHook(({ list }) => useSameList(list), { initialProps: { list: first } });
  rerender({ list: [a, b] });
  expect(result.current).toBe(first);
  for (const list of [[a], [b, a], [a, b, a], []]) {
    rerender({ list });
    expect(result.current).toBe(list);
  }
});
