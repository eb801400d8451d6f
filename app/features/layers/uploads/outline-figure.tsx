import type { Grid } from '#sim-core/grid/grid.ts';

const side = 104;

/** Where a file lies against the cells of the site: the site shaded, the file outlined. The words beside it say how much. */
export function OutlineFigure({
  grid,
  outline,
}: {
  grid: Grid;
  /** [x, y] in the grid's CRS, m */
  outline: readonly (readonly [number, number])[];
}) {
  const west = grid.originX;
  const north = grid.originY;
  const east = west + grid.width * grid.cellSize;
  const south = north - grid.height * grid.cellSize;
  const xs = [...outline.map(([x]) => x), west, east];
  const ys = [...outline.map(([, y]) => y), south, north];
  const least = (values: number[]) => values.reduce((a, b) => Math.min(a, b));
  const most = (values: number[]) => values.reduce((a, b) => Math.max(a, b));
  const [left, right, bottom, top] = [least(xs), most(xs), least(ys), most(ys)];
  const scale = (side - 8) / Math.max(right - left, top - bottom);
  const x = (value: number) => 4 + (value - left) * scale;
  const y = (value: number) => 4 + (top - value) * scale;
  // A file that would be a speck is ringed, so that the eye finds it.
  const own = outline.map(([px, py]) => [x(px), y(py)] as const);
  const middle = [0, 1].map((axis) => own.reduce((sum, point) => sum + point[axis], 0) / own.length);
  const speck = own.every(([px, py]) => Math.hypot(px - middle[0], py - middle[1]) < 4);
  const tall = (top - bottom) * scale + 8;
  return (
    <figure className="shrink-0">
      <svg
        viewBox={`0 0 ${side} ${tall.toFixed(1)}`}
        width={side}
        height={tall}
        className="overflow-visible"
        role="img"
        aria-label="The file, outlined, against the site, shaded"
      >
        <rect
          x={x(west)}
          y={y(north)}
          width={(east - west) * scale}
          height={(north - south) * scale}
          className="fill-rule stroke-ink-2"
          strokeWidth={0.8}
        />
        {speck && (
          <circle cx={middle[0]} cy={middle[1]} r={7} className="fill-none stroke-ink" strokeWidth={1.5} />
        )}
        <path
          d={`${own.map(([px, py], i) => `${i === 0 ? 'M' : 'L'}${px.toFixed(1)} ${py.toFixed(1)}`).join('')}Z`}
          className="fill-none stroke-ink"
          strokeWidth={2}
          strokeLinejoin="round"
        />
      </svg>
      <figcaption aria-hidden="true" className="text-axis text-ink-2">
        file, on the site
      </figcaption>
    </figure>
  );
}
