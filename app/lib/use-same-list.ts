import { useState } from 'react';

/** A list that stays the same object as long as it holds the same things in the same order. */
export function useSameList<T>(list: readonly T[]): readonly T[] {
  const [held, setHeld] = useState(list);
  if (held === list) return held;
  if (held.length === list.length && held.every((thing, i) => thing === list[i])) return held;
  setHeld(list);
  return list;
}
