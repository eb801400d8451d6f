import type { ReactNode } from 'react';
import { useMapFrame } from './map-context.ts';

export interface MapNoteProps {
  /** the place that the words are about, in the grid's CRS, m */
  readonly x: number;
  readonly y: number;
  /** where the words stand from it, px; to the right unless said */
  readonly offset?: { readonly left: number; readonly top: number };
  readonly children: ReactNode;
}

/** Width that a note is given, px. */
const noteWidth = 210;

/** Words on the map, tied to their place by a thin leader line. On the right edge they go to the other side. */
export function MapNote({ x, y, offset = { left: 84, top: 0 }, children }: MapNoteProps) {
  const { project, size } = useMapFrame();
  const at = project(x, y);
  if (at.left < 0 || at.top < 0 || at.left > size.width || at.top > size.height) return null;
  const flipped = at.left + offset.left + noteWidth > size.width && at.left - offset.left - noteWidth > 0;
  const end = { left: at.left + (flipped ? -offset.left : offset.left), top: at.top + offset.top };
  const start = at.left + (flipped ? -22 : 22);
  const d = `M${start} ${at.top}L${end.left} ${end.top}`;
  return (
    <>
      <svg className="absolute inset-0 size-full" aria-hidden="true">
        <path d={d} stroke="var(--color-halo)" strokeWidth={3.4} />
        <path d={d} stroke="var(--color-ink)" />
      </svg>
      <div
        className="pointer-events-auto absolute max-w-[210px] bg-standing/90 px-1.5 py-1 text-note text-ink"
        style={
          flipped
            ? { right: size.width - end.left, top: end.top - 12 }
            : { left: end.left, top: end.top - 12 }
        }
        onPointerDown={(event) => {
          event.stopPropagation();
        }}
      >
        {children}
      </div>
    </>
  );
}
