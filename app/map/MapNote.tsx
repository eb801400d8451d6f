import { useEffect, useRef, useState, type CSSProperties, type ReactNode } from 'react';
import { classNames } from '#app/lib/class-names.ts';
import { useMapFrame } from './map-context.ts';
import type { MapSize, ScreenPoint } from './map-view.ts';

export interface MapNoteProps {
  /** the place that the words are about, in the grid's CRS, m */
  readonly x: number;
  readonly y: number;
  /** where the words stand from it, px; to the right unless said */
  readonly offset?: { readonly left: number; readonly top: number };
  /** shown at the edge of the map where the place itself is out of sight */
  readonly always?: boolean;
  /** it only says something: presses go through it, and it stands before the legend and whatever else is on the map */
  readonly passing?: boolean;
  readonly children: ReactNode;
}

/** Width that a note is given, px. */
const noteWidth = 210;
/** Room that the buttons on the right edge take, px. */
const controlsWidth = 48;
/** Room below a note, px, for what the map says of the cell under the pointer. */
const readingHeight = 32;
/** From the middle of a selected symbol to where its leader starts, px. */
const ring = 22;

/** Words on the map, tied to their place by a thin leader line. Near an edge they go where there is room. */
export function MapNote({ x, y, offset = { left: 84, top: 0 }, always, passing, children }: MapNoteProps) {
  const { project, size } = useMapFrame();
  const exact = project(x, y);
  const box = useRef<HTMLDivElement>(null);
  const [height, setHeight] = useState(0);
  // Told by the browser after its own layout: asking at every step of a drag would make it lay out the page each time.
  const shown = always === true || isInside(exact, size);
  useEffect(() => {
    if (!box.current) return;
    const observer = new ResizeObserver(([{ borderBoxSize }]) => setHeight(borderBoxSize[0].blockSize));
    observer.observe(box.current);
    return () => observer.disconnect();
  }, [shown]);
  const at = {
    left: Math.min(size.width, Math.max(0, exact.left)),
    top: Math.min(size.height, Math.max(0, exact.top)),
  };
  if (!shown) return null;
  const { d, style } = layNote(at, size, offset, height);
  return (
    <>
      <svg className={classNames('absolute inset-0 size-full', passing && 'z-10')} aria-hidden="true">
        <path d={d} stroke="var(--color-halo)" strokeWidth={3.4} />
        <path d={d} stroke="var(--color-ink)" />
      </svg>
      <div
        ref={box}
        className={classNames(
          'absolute max-w-[210px] px-1.5 py-1 text-note text-ink',
          passing ? 'z-10 bg-ground' : 'pointer-events-auto bg-standing/90',
        )}
        style={style}
        onPointerDown={(event) => {
          event.stopPropagation();
        }}
      >
        {children}
      </div>
    </>
  );
}

const isInside = ({ left, top }: ScreenPoint, { width, height }: MapSize) =>
  left >= 0 && top >= 0 && left <= width && top <= height;

/**
 * The leader's path and the note's place: beside the point, on the other side, or where neither fits below or above;
 * always as a whole on the map.
 */
export function layNote(
  at: ScreenPoint,
  size: MapSize,
  offset: ScreenPoint,
  height: number,
): { d: string; style: CSSProperties } {
  const inside = (top: number) => Math.max(0, Math.min(top, size.height - readingHeight - height));
  const lead = (x1: number, y1: number, x2: number, y2: number) => `M${x1} ${y1}L${x2} ${y2}`;
  const right = at.left + offset.left;
  const left = at.left - offset.left;
  const top = inside(at.top + offset.top - 12);
  if (right + noteWidth <= size.width - controlsWidth)
    return { d: lead(at.left + ring, at.top, right, top + 12), style: { left: right, top } };
  if (left - noteWidth >= 0)
    return { d: lead(at.left - ring, at.top, left, top + 12), style: { right: size.width - left, top } };
  const edge = Math.max(20, Math.min(at.left - noteWidth / 2, size.width - noteWidth - controlsWidth));
  const below = at.top < size.height / 2;
  const end = inside(below ? at.top + 40 : at.top - 40 - height);
  return {
    d: lead(at.left, at.top + (below ? ring : -ring), at.left, below ? end : end + height),
    style: { left: edge, top: end },
  };
}
