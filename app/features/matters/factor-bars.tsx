import { useNarrow } from '#app/lib/use-media-query.ts';
import { formatNumber } from '#app/lib/formats.ts';

/** One bar: from one value to another, with the interval of its end where there is one. */
export interface FactorBar {
  readonly from: number;
  readonly to: number;
  readonly tone: 'full' | 'open';
  readonly interval?: readonly [number, number];
  /** at the ends, in words: the value of the rate there */
  readonly ends?: readonly [string, string];
}

export interface FactorRow {
  readonly label: string;
  readonly bars: readonly FactorBar[];
}

const [top, foot, barHeight, barGap, rowGap] = [8, 26, 12, 3, 12];
const longest = 22;

/** Bars of factors against one axis. The table beside it says the same in words. */
export function FactorBars(props: {
  rows: readonly FactorRow[];
  domain: readonly [number, number];
  /** where bars begin; drawn as a line of ink */
  base: number;
  digits: number;
}) {
  const { rows, base, digits } = props;
  const narrow = useNarrow();
  const width = narrow ? 400 : 620;
  const [left, right] = narrow ? [128, 22] : [168, 30];
  const [least, most] =
    props.domain[0] < props.domain[1] ? props.domain : [props.domain[0] - 1, props.domain[0] + 1];
  const x = (value: number) =>
    left + ((width - left - right) * (Math.min(most, Math.max(least, value)) - least)) / (most - least);
  const heightOf = ({ bars }: FactorRow) => bars.length * (barHeight + barGap) + rowGap;
  const tops: number[] = [];
  let height = top;
  for (const row of rows) {
    tops.push(height);
    height += heightOf(row);
  }
  const ticks = Array.from(
    { length: narrow ? 3 : 5 },
    (_, i, all = narrow ? 3 : 5) => least + ((most - least) * i) / (all - 1),
  );
  return (
    <svg viewBox={`0 0 ${width} ${height + foot}`} className="mt-1 block w-full" aria-hidden="true">
      {ticks.map((tick) => (
        <g key={tick}>
          <path d={`M${x(tick)} ${top - 4}V${height}`} className="stroke-rule" />
          <text x={x(tick)} y={height + 16} textAnchor="middle" className="fill-ink-2 font-mono text-axis">
            {formatNumber(tick, digits)}
          </text>
        </g>
      ))}
      {rows.map((row, i) => {
        const middle = tops[i] + (heightOf(row) - rowGap) / 2;
        return (
          <g key={row.label}>
            <text x={left - 8} y={middle + 4} textAnchor="end" className="fill-ink text-axis">
              {row.label.length > longest ? `${row.label.slice(0, longest - 1)}…` : row.label}
            </text>
            {row.bars.map(({ from, to, tone, interval, ends }, b) => {
              const y = tops[i] + b * (barHeight + barGap);
              const [a, z] = [Math.min(x(from), x(to)), Math.max(x(from), x(to))];
              const line = y + barHeight / 2;
              return (
                <g key={b}>
                  <rect
                    x={a}
                    y={y}
                    width={Math.max(1.5, z - a)}
                    height={barHeight}
                    className={tone === 'full' ? 'fill-shore stroke-ink' : 'fill-ground stroke-ink'}
                    strokeWidth={1}
                  />
                  {interval && (
                    <path
                      d={`M${x(interval[0])} ${line}H${x(interval[1])}M${x(interval[0])} ${line - 4}v8M${x(interval[1])} ${line - 4}v8`}
                      className="stroke-ink"
                      strokeWidth={1.5}
                      fill="none"
                    />
                  )}
                  {ends && !narrow && (
                    <text
                      x={z + 5}
                      y={line + 4}
                      className="fill-ink-2 text-axis stroke-ground [paint-order:stroke] [stroke-width:3px]"
                    >
                      {ends.join(' to ')}
                    </text>
                  )}
                </g>
              );
            })}
          </g>
        );
      })}
      <path d={`M${x(base)} ${top - 4}V${height + 4}`} className="stroke-ink" strokeWidth={1.5} />
    </svg>
  );
}
