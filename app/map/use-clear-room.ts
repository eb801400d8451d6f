import { useLayoutEffect, useMemo, useState } from 'react';
import type { MapClear } from './map-view.ts';

/** Between the site’s edge and whatever stands next to it, px. */
const gap = 8;
/** A flag on the site’s northern edge stands this high, px. */
const flag = 22;
/** Room for the coordinates along the top and down the left, and for the buttons on the right, px. */
const coordinates = { top: 18, left: 18 };
const buttons = { pointer: 30, finger: 44 };

/**
 * What the whole site keeps clear of on a map with furniture: its coordinates, buttons and legend as it stands; on a
 * small map, a margin all around.
 * @param legend the part of the legend that is always there
 */
export function useClearRoom(legend: HTMLElement | null, furniture: boolean, compact: boolean): MapClear {
  const height = useHeight(legend);
  return useMemo(() => {
    if (!furniture) return { left: gap, top: flag, right: gap, bottom: gap };
    return {
      left: gap + (compact ? 0 : coordinates.left),
      top: Math.max(flag, gap + coordinates.top),
      right: gap + (compact ? buttons.finger : buttons.pointer),
      bottom: gap + height,
    };
  }, [furniture, compact, height]);
}

function useHeight(element: HTMLElement | null): number {
  const [height, setHeight] = useState(0);
  useLayoutEffect(() => {
    if (!element) return;
    const measure = () => setHeight(element.offsetHeight);
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, [element]);
  return height;
}
