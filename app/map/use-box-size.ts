import { useLayoutEffect, useState, type RefObject } from 'react';
import type { MapSize } from './map-view.ts';

/** Room inside an element, CSS px, and the screen's pixel ratio, as they change; undefined until there is room. */
export function useBoxSize(
  element: RefObject<HTMLElement | null>,
): { size: MapSize; pixelRatio: number } | undefined {
  const [box, setBox] = useState<{ size: MapSize; pixelRatio: number }>();
  useLayoutEffect(() => {
    const node = element.current;
    if (!node) return;
    const measure = () => {
      const { clientWidth: width, clientHeight: height } = node;
      const pixelRatio = window.devicePixelRatio || 1;
      if (width === 0 || height === 0) return;
      setBox((old) =>
        old?.size.width === width && old.size.height === height && old.pixelRatio === pixelRatio
          ? old
          : { size: { width, height }, pixelRatio },
      );
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(node);
    window.addEventListener('resize', measure);
    return () => {
      observer.disconnect();
      window.removeEventListener('resize', measure);
    };
  }, [element]);
  return box;
}
