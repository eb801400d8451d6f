import { formatNumber } from '#app/lib/formats.ts';
import { beliefQuantile } from '#sim-core/index.ts';
import type { Belief } from '#sim-core/spec/belief.ts';
import type { Parameter } from '#sim-core/spec/parameters.ts';

const [width, height] = [150, 34];
const bars = 30;

/**
 * How likely the values of a rate are taken to be: share of the law in each of equal stretches, so that a law and pasted
 * values read alike. Its words stand beside it.
 */
export function BeliefPicture({ belief, rate }: { belief: Belief; rate: Parameter }) {
  const shares = stretches(belief, rate);
  if (!shares) return null;
  const { low, high, counts } = shares;
  const most = Math.max(...counts);
  return (
    <span aria-hidden="true" className="inline-block">
      <svg viewBox={`0 0 ${width} ${height + 12}`} className="block h-[46px] w-[150px] overflow-visible">
        {counts.map((count, i) => (
          <rect
            key={i}
            x={(i * width) / bars + 0.4}
            y={height - (count / most) * height}
            width={width / bars - 0.8}
            height={(count / most) * height}
            className="fill-shore"
          />
        ))}
        <path d={`M0 ${height}H${width}`} className="stroke-ink" />
        <g className="fill-ink-2 font-mono text-axis">
          <text x={0} y={height + 11}>
            {formatNumber(low, 3)}
          </text>
          <text x={width} y={height + 11} textAnchor="end">
            {formatNumber(high, 3)}
          </text>
        </g>
      </svg>
    </span>
  );
}

/** Share of a law between its 0.5 and 99.5 % quantiles, by stretch; pasted values are counted whole. */
function stretches(belief: Belief, rate: Parameter) {
  const quantile = beliefQuantile(belief, rate);
  const drawn =
    belief.law === 'values'
      ? belief.values
      : Array.from({ length: 600 }, (_, i) => quantile((i + 0.5) / 600));
  const [low, high] =
    belief.law === 'values' ? [Math.min(...drawn), Math.max(...drawn)] : [quantile(0.005), quantile(0.995)];
  if (!(high > low)) return undefined;
  const counts = new Array<number>(bars).fill(0);
  for (const value of drawn) {
    const at = Math.floor(((value - low) / (high - low)) * bars);
    if (at >= 0 && at <= bars) counts[Math.min(bars - 1, at)]++;
  }
  return { low, high, counts };
}
