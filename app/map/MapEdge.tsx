import type { Grid } from '#sim-core/grid/grid.ts';
import { edgeTicks } from './map-ticks.ts';
import { toGround, type MapSize, type MapView } from './map-view.ts';

const halo = {
  paintOrder: 'stroke',
  stroke: 'var(--color-halo)',
  strokeWidth: 3,
  strokeLinejoin: 'round',
} as const;
const ink = 'var(--color-ink)';
/** Room that a label needs along an edge, px. */
const room = 88;

interface MapEdgeProps {
  readonly grid: Grid;
  readonly view: MapView;
  readonly size: MapSize;
  /** a small map has ticks without numbers down its side */
  readonly compact: boolean;
}

/** Eastings ticked along the top and northings down the left, as on a survey sheet. */
export function MapEdge({ grid, view, size, compact }: MapEdgeProps) {
  const { width, height, clear } = size;
  // The legend stands in the south-west corner.
  const foot = Math.max(12, clear?.bottom ?? 0);
  const from = toGround(view, grid, size, { left: 0, top: 0 });
  const to = toGround(view, grid, size, { left: width, top: height });
  const labels = 'fill-ink font-mono text-axis font-semibold';
  return (
    <g>
      {edgeTicks(from.x, to.x, width, room).map(({ value, at, labelled }) => (
        <g key={value} transform={`translate(${at.toFixed(1)} 0)`}>
          <path d={`M0.500 0v${labelled ? 9 : 5}`} stroke={ink} />
          {labelled && at < width - 50 && at > 12 && (
            <text x={5} y={13} className={labels} style={halo}>
              {value}
            </text>
          )}
        </g>
      ))}
      {edgeTicks(from.y, to.y, height, room).map(({ value, at, labelled }) => (
        <g key={value} transform={`translate(0 ${at.toFixed(1)})`}>
          <path d={`M0 0.500h${labelled ? 9 : 5}`} stroke={ink} />
          {labelled && !compact && at > 60 && at < height - foot && (
            <text transform="translate(13 -5) rotate(-90)" className={labels} style={halo}>
              {value}
            </text>
          )}
        </g>
      ))}
    </g>
  );
}
