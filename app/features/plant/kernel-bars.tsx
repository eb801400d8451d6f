import type { FittedKernel } from '#sim-core/index.ts';
import { formatNumber, formatShare } from '#app/lib/formats.ts';

const width = 312;
const height = 74;

/** How far new clumps land from their parent in one step, along a row of cells. */
export function KernelBars({ kernel, cellSize }: { kernel: FittedKernel; cellSize: number }) {
  const { taps, radius } = kernel;
  const offsets = Array.from({ length: 2 * radius + 1 }, (_, i) => i - radius);
  const step = Math.min(28, width / offsets.length);
  const left = (width - step * offsets.length) / 2;
  const reach = radius * cellSize;
  const stay = taps[0];
  const words =
    `Of what a clump sends along a row in one step, ${formatShare(stay)} lands in its own cell` +
    (radius > 0
      ? `, ${formatShare(2 * taps[1])} in the next ones and nothing beyond ${formatNumber(reach)} m.`
      : '.');
  return (
    <figure>
      <svg viewBox={`0 0 ${width} ${height + 16}`} role="img" aria-label={words} className="block w-full">
        {offsets.map((offset, i) => {
          // The root, so that the tail that carries a front can be seen at all.
          const rise = Math.sqrt(taps[Math.abs(offset)] / stay) * (height - 4);
          return (
            <rect
              key={offset}
              x={left + i * step + step * 0.06}
              y={height - rise}
              width={step * 0.88}
              height={rise}
              className={offset === 0 ? 'fill-ink' : 'fill-shore'}
            />
          );
        })}
        <path d={`M0 ${height}H${width}`} className="stroke-ink" />
        <g className="fill-ink-2 font-mono text-axis">
          <text x={left} y={height + 13}>
            −{formatNumber(reach)}
          </text>
          <text x={width / 2} y={height + 13} textAnchor="middle">
            0
          </text>
          <text x={width - left} y={height + 13} textAnchor="end">
            {formatNumber(reach)} m
          </text>
        </g>
      </svg>
      <figcaption className="text-note text-ink-2">{words} Bars rise with the root of the share.</figcaption>
    </figure>
  );
}
