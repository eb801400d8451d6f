import { useMapFrame } from '#app/map/map-context.ts';
import type { GroundPoint, Ring } from '#app/map/rings.ts';
import { middles } from './corners.ts';
import type { Sketch } from './sketch.ts';

const halo = 'var(--color-halo)';
const ink = 'var(--color-sel)';

/** What is being drawn, the handles of an outline and the box of a selection, over the map. */
export function SketchMarks(props: {
  sketch: Sketch;
  closed: boolean;
  shape: Ring | undefined;
  corner: number | undefined;
  box: readonly [GroundPoint, GroundPoint] | undefined;
}) {
  const { sketch, closed, shape, corner, box } = props;
  if (sketch.points.length === 0 && !shape && !box) return null;
  return (
    <svg className="absolute inset-0 size-full" aria-hidden="true" data-sketch>
      {box && <Box from={box[0]} to={box[1]} />}
      {sketch.points.length > 0 && <Drawn sketch={sketch} closed={closed} />}
      {shape && <Handles ring={shape} closed corner={corner} withMiddles />}
    </svg>
  );
}

function usePath(points: readonly GroundPoint[], closed: boolean): string {
  const { project } = useMapFrame();
  const at = points.map(([x, y]) => project(x, y));
  return `${at.map(({ left, top }, i) => `${i === 0 ? 'M' : 'L'}${left.toFixed(1)} ${top.toFixed(1)}`).join('')}${closed ? 'Z' : ''}`;
}

function Drawn({ sketch, closed }: { sketch: Sketch; closed: boolean }) {
  const { points, over, done } = sketch;
  const path = usePath(points, closed && done);
  // Where the next point would go, and back to the first where that would close it.
  const next = usePath(
    over && !done
      ? [points[points.length - 1], over, ...(closed && points.length > 1 ? [points[0]] : [])]
      : [],
    false,
  );
  return (
    <>
      <g fill="none" strokeLinejoin="round">
        <path d={path} stroke={halo} strokeWidth={4.5} />
        <path d={path} stroke={ink} strokeWidth={1.8} />
        {next && (
          <>
            <path d={next} stroke={halo} strokeWidth={3.4} strokeOpacity={0.8} />
            <path d={next} stroke={ink} strokeDasharray="4 3" />
          </>
        )}
      </g>
      <Handles ring={points} closed={closed} corner={undefined} withMiddles={done} />
    </>
  );
}

function Handles(props: { ring: Ring; closed: boolean; corner: number | undefined; withMiddles: boolean }) {
  const { project } = useMapFrame();
  return (
    <g fill={halo} stroke={ink}>
      {props.withMiddles &&
        middles(props.ring, props.closed).map(([x, y], i) => {
          const { left, top } = project(x, y);
          return <circle key={i} cx={left} cy={top} r={3} />;
        })}
      {props.ring.map(([x, y], i) => {
        const { left, top } = project(x, y);
        const side = i === props.corner ? 13 : 8;
        return (
          <rect
            key={i}
            x={left - side / 2}
            y={top - side / 2}
            width={side}
            height={side}
            strokeWidth={i === props.corner ? 3 : 1.6}
          />
        );
      })}
    </g>
  );
}

function Box({ from, to }: { from: GroundPoint; to: GroundPoint }) {
  const { project } = useMapFrame();
  const [a, b] = [project(...from), project(...to)];
  const box = {
    x: Math.min(a.left, b.left),
    y: Math.min(a.top, b.top),
    width: Math.abs(a.left - b.left),
    height: Math.abs(a.top - b.top),
  };
  return (
    <g fill="none">
      <rect {...box} stroke={halo} strokeWidth={4} />
      <rect {...box} stroke={ink} strokeWidth={1.5} strokeDasharray="5 3" />
    </g>
  );
}
