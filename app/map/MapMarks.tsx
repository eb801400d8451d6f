import type { MapFoothold } from './map-symbols.ts';
import { useMapFrame } from './map-context.ts';

const halo = 'var(--color-halo)';
const ink = 'var(--color-sel)';

/** Ring with four marks around the selected foothold, and the reach of its refuge where that is larger. */
export function SelectionRing({ foothold }: { foothold: MapFoothold }) {
  const { project, pixelsPerMetre } = useMapFrame();
  const { left, top } = project(foothold.x, foothold.y);
  const middle = foothold.kind === 'planned' ? { left: left + 3, top: top - 5 } : { left, top };
  const ring = 'M0-17A17 17 0 1 1 0 17A17 17 0 1 1 0-17M0-23v6M0 23v-6M-23 0h6M23 0h-6';
  const reach = (foothold.radius ?? 0) * pixelsPerMetre;
  return (
    <>
      {reach > 26 && (
        <g transform={`translate(${left} ${top})`} fill="none">
          <circle r={reach} stroke={halo} strokeWidth={3} />
          <circle r={reach} stroke={ink} strokeDasharray="2 3" />
        </g>
      )}
      <g transform={`translate(${middle.left} ${middle.top})`} fill="none">
        <path d={ring} stroke={halo} strokeWidth={4.5} />
        <path d={ring} stroke={ink} strokeWidth={1.8} />
      </g>
    </>
  );
}

/** Lines through the cell that the keyboard reads, with the cell itself where it is large enough to be seen. */
export function Crosshair({ x, y }: { x: number; y: number }) {
  const { project, size, scale } = useMapFrame();
  const { left, top } = project(x, y);
  const lines = `M0 ${top}H${left - 11}M${left + 11} ${top}H${size.width}M${left} 0V${top - 11}M${left} ${top + 11}V${size.height}`;
  const side = Math.max(scale, 3);
  return (
    <g fill="none">
      <path d={lines} stroke={halo} strokeWidth={3} strokeOpacity={0.7} />
      <path d={lines} stroke={ink} strokeDasharray="1 3" />
      <circle cx={left} cy={top} r={11} stroke={halo} strokeWidth={4} />
      <circle cx={left} cy={top} r={11} stroke={ink} strokeWidth={1.6} />
      <rect
        x={left - side / 2}
        y={top - side / 2}
        width={side}
        height={side}
        stroke={halo}
        strokeWidth={2.5}
      />
      <rect x={left - side / 2} y={top - side / 2} width={side} height={side} stroke={ink} />
    </g>
  );
}
