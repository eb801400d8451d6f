import { useEffect, useRef, useState } from 'react';

/** A value that follows another at most once in so many milliseconds; the latest always comes through. */
export function useThrottled<T>(value: T, milliseconds: number): T {
  const [shown, setShown] = useState(value);
  const last = useRef(-Infinity);
  useEffect(() => {
    const wait = last.current + milliseconds - performance.now();
    const timer = setTimeout(
      () => {
        last.current = performance.now();
        setShown(value);
      },
      Math.max(0, wait),
    );
    return () => clearTimeout(timer);
  }, [value, milliseconds]);
  return shown;
}
