import { useRef } from 'react';

/** The value of an earlier render while the new one says the same (as JSON), so that what hangs on it rests. */
export function useStable<T>(value: T): T {
  const held = useRef({ value, text: JSON.stringify(value) });
  const text = JSON.stringify(value);
  // eslint-disable-next-line react-hooks/refs -- a cache of the value itself: what is returned says the same either way
  if (held.current.text !== text) held.current = { value, text };
  // eslint-disable-next-line react-hooks/refs -- as above
  return held.current.value;
}
