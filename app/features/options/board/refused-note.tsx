import { useEffect, useEffectEvent } from 'react';
import { useMapFrame } from '#app/map/map-context.ts';
import { MapNote } from '#app/map/MapNote.tsx';
import type { RefusedPlace } from './check-works.ts';

/** How long it stands, ms: long enough to read its two sentences twice. */
const shownFor = 12_000;

/** At the place where nothing could be placed: a cross, and why. It goes by itself, and lets the next press through. */
export function RefusedNote({ refused, onGone }: { refused: RefusedPlace; onGone: () => void }) {
  const { x, y, problem } = refused;
  const gone = useEffectEvent(onGone);
  useEffect(() => {
    const timer = setTimeout(() => gone(), shownFor);
    return () => clearTimeout(timer);
  }, [refused]);
  return (
    <>
      <Cross x={x} y={y} />
      <MapNote {...{ x, y }} offset={{ left: 40, top: 24 }} always passing>
        {/* Keyed by the place: another refusal is said again, although its words are the same. */}
        <span key={`${x} ${y}`} role="alert" className="block border-l-[5px] border-danger pl-2">
          <b className="text-danger">Not here.</b> {problem}
        </span>
      </MapNote>
    </>
  );
}

/** Where it was, also below a finger. */
function Cross({ x, y }: { x: number; y: number }) {
  const { project } = useMapFrame();
  const { left, top } = project(x, y);
  const d = 'M-8-8L8 8M8-8L-8 8';
  return (
    <svg className="absolute inset-0 z-10 size-full" aria-hidden="true">
      <g transform={`translate(${left} ${top})`} strokeLinecap="round">
        <path d={d} stroke="var(--color-halo)" strokeWidth={6} />
        <path d={d} stroke="var(--color-danger)" strokeWidth={2.6} />
      </g>
    </svg>
  );
}
