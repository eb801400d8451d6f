import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatMoney } from '#contract/format-money.ts';
import { formatNumber } from '#app/lib/formats.ts';
import type { OutlookFigures } from '#sim-core/compare/comparison-figures.ts';
import { useNarrow } from '#app/lib/use-media-query.ts';
import { halo } from './option-line.tsx';
import { spreadLabels } from './spread-labels.ts';

const height = 230;
const [left, right, top, bottom] = [34, 14, 22, 30];
/** room between the axis and what costs nothing */
const inset = 16;
/** Cost against the years that an option recovers sooner than Wait, the efficient ones joined, and the budget line. */
export function CostGain(props: {
  figures: OutlookFigures;
  currency: string;
  budget: number | null;
  /** place of the option that was decided for */
  chosen: number | undefined;
}) {
  const { figures, currency, budget } = props;
  const { options, efficient, pairs } = figures;
  const width = useNarrow() ? 400 : 560;
  const costs = options.map((option) => option.cost ?? 0);
  const mostCost = Math.max(1, ...costs, budget ?? 0) * 1.08;
  const gains = options.map((option) => option.yearsSooner);
  const intervals = options.map(
    (_, i) => pairs.find((pair) => pair.first === i && options[pair.second].wait)?.sooner,
  );
  const least = Math.min(0, ...gains, ...intervals.map((each) => each?.low ?? 0));
  const most = Math.max(1, ...gains, ...intervals.map((each) => each?.high ?? 0));
  const x = (cost: number) => left + inset + ((width - left - inset - right) * cost) / mostCost;
  const y = (gain: number) => top + ((height - top - bottom) * (most - gain)) / (most - least);
  // The joining line rises: names stand above it on the left of their points and below it on the right. Those of points
  // that stand close together are parted, each side by itself.
  const sides = costs.map((cost) => x(cost) > width * 0.55);
  const labels = options.map((_, i) => ({ left: sides[i], y: 0 }));
  for (const side of [true, false]) {
    const here = options.map((_, i) => i).filter((i) => sides[i] === side);
    spreadLabels(
      here.map((i) => y(gains[i]) + (side ? -7 : 15)),
      14,
      top + 8,
      height - bottom + 15,
    ).forEach((at, n) => (labels[here[n]].y = at));
  }
  return (
    <figure>
      <figcaption className="flex flex-wrap justify-between gap-x-4">
        <b>Cost against gain</b>
        <span className="text-note text-ink-2">years sooner than Wait; efficient ones joined</span>
      </figcaption>
      <svg viewBox={`0 0 ${width} ${height}`} className="mt-1 block w-full" aria-hidden="true">
        {[least, 0, most].map((gain) => (
          <g key={gain}>
            <path
              d={`M${left} ${y(gain)}H${width - right}`}
              className={gain === 0 ? 'stroke-ink' : 'stroke-rule'}
            />
            <text x={left - 6} y={y(gain) + 4} textAnchor="end" className="fill-ink-2 text-axis">
              {formatNumber(gain, 1)}
            </text>
          </g>
        ))}
        <text x={width - right} y={height - 6} textAnchor="end" className="fill-ink-2 text-axis">
          {formatMoney(mostCost, currency)}
        </text>
        <text x={left + inset} y={height - 6} textAnchor="middle" className="fill-ink-2 text-axis">
          {formatMoney(0, currency)}
        </text>
        {budget !== null && (
          <>
            <path d={`M${x(budget)} ${top}V${height - bottom}`} className="stroke-ink" strokeWidth={2.5} />
            <text x={x(budget)} y={top - 6} textAnchor="middle" className="fill-ink text-axis font-semibold">
              budget
            </text>
          </>
        )}
        <path
          d={`M${efficient.map((i) => `${x(costs[i]).toFixed(1)} ${y(gains[i]).toFixed(1)}`).join('L')}`}
          fill="none"
          className="stroke-ink"
          strokeWidth={1.6}
        />
        {options.map((option, i) => {
          const interval = intervals[i];
          return (
            <g key={option.name}>
              {interval && (
                <path
                  d={`M${x(costs[i])} ${y(interval.low)}V${y(interval.high)}m-4 0h8M${x(costs[i]) - 4} ${y(interval.low)}h8`}
                  className="stroke-ink"
                  fill="none"
                />
              )}
              <circle
                cx={x(costs[i])}
                cy={y(gains[i])}
                r={5}
                className={option.wait ? 'fill-ground stroke-ink' : 'fill-flag stroke-ink'}
                strokeWidth={1.5}
              />
            </g>
          );
        })}
        {/* After all lines, so that none runs over a name. */}
        {options.map((option, i) => (
          <text
            key={option.name}
            x={x(costs[i]) + (labels[i].left ? -10 : 10)}
            y={labels[i].y}
            textAnchor={labels[i].left ? 'end' : 'start'}
            className={`fill-ink text-axis ${halo} ${efficient.includes(i) ? 'font-semibold' : ''}`}
          >
            {option.name.length > 26 ? `${option.name.slice(0, 25)}…` : option.name}
            {props.chosen === i && ', chosen'}
          </text>
        ))}
      </svg>
      <ReadAsTable
        caption="Cost, and years that an option recovers sooner than Wait"
        heads={['Option', 'Cost', 'Years sooner', 'Efficient']}
        rows={options.map((option, i) => [
          `${option.name}${props.chosen === i ? ' (chosen)' : ''}`,
          formatMoney(costs[i], currency),
          formatNumber(gains[i], 1),
          efficient.includes(i) ? 'yes' : 'no',
        ])}
      />
    </figure>
  );
}
