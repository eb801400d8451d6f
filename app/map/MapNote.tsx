import type { CSSProperties, ReactNode } from 'react';
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
  readonly children: ReactNode;
}

/** Width that a note is given, px. */
const noteWidth = 210;
/** Room that the buttons on the right edge take, px. */
const controlsWidth = 48;
/** From the middle of a selected symbol to where its leader starts, px. */
const ring = 22;

/** Words on the map, tied to their place by a thin leader line. Near an edge they go where there is room. */
export function MapNote({ x, y, offset = { left: 84, top: 0 }, always, children }: MapNoteProps) {
  const { project, size } = useMapFrame();
  const exact = project(x, y);
  const at = {
    left: Math.min(size.width, Math.max(0, exact.left)),
    top: Math.min(size.height, Math.max(0, exact.top)),
  };
  if (!always && (at.left !== exact.left || at.top !== exact.top)) return null;
  const { d, style } = layNote(at, size, offset);
  return (
    <>
      <svg className="absolute inset-0 size-full" aria-hidden="true">
        <path d={d} stroke="var(--color-halo)" strokeWidth={3.4} />
        <path d={d} stroke="var(--color-ink)" />
      </svg>
      <div
        className="pointer-events-auto absolute max-w-[210px] bg-standing/90 px-1.5 py-1 text-note text-ink"
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

/** The leader's path and the note's place: beside the point, on the other side, or where neither fits below or above. */
function layNote(at: ScreenPoint, size: MapSize, offset: ScreenPoint): { d: string; style: CSSProperties } {
  const top = at.top + offset.top;
  const right = at.left + offset.left;
  const left = at.left - offset.left;
  const lead = (x1: number, y1: number, x2: number, y2: number) => `M${x1} ${y1}L${x2} ${y2}`;
  if (right + noteWidth <= size.width - controlsWidth)
    return { d: lead(at.left + ring, at.top, right, top), style: { left: right, top: top - 12 } };
  if (left - noteWidth >= 0)
    return {
      d: lead(at.left - ring, at.top, left, top),
      style: { right: size.width - left, top: top - 12 },
    };
  const edge = Math.max(20, Math.min(at.left - noteWidth / 2, size.width - noteWidth - controlsWidth));
  const below = at.top < size.height / 2;
  const end = at.top + (below ? 40 : -40);
  return {
    d: lead(at.left, at.top + (below ? ring : -ring), at.left, end),
    style: { left: edge, ...(below ? { top: end } : { bottom: size.height - end }) },
  };
}
