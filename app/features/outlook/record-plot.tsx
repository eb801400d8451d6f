import { formatNumber } from '#app/lib/formats.ts';
import type { YearIndex } from '#sim-core/weather/yearly-record.ts';

const height = 120;

/** A record by year as bars from 0, drought downwards; a line where a drought begins to count. */
export function RecordPlot(props: {
  years: readonly YearIndex[];
  threshold: number | undefined;
  label: string;
}) {
  const { years, threshold } = props;
  const first = years[0].year;
  const last = years[years.length - 1].year;
  const span = last - first + 1;
  const most = Math.max(3, ...years.map(({ index }) => Math.abs(index)));
  const y = (index: number) => (height / 2) * (1 - index / most);
  return (
    <figure>
      <figcaption className="text-note text-ink-2">{props.label}</figcaption>
      <div className="mt-1 flex gap-2">
        <div
          className="flex w-8 flex-col justify-between text-right text-note text-ink-2 tabular-nums"
          aria-hidden
        >
          <span>{formatNumber(most, 0)}</span>
          <span>0</span>
          <span>−{formatNumber(most, 0)}</span>
        </div>
        <svg
          viewBox={`0 0 ${span} ${height}`}
          preserveAspectRatio="none"
          className="block h-[120px] min-w-0 flex-1 border-y border-rule-2"
          aria-hidden
        >
          {years.map(({ year, index }) => (
            <rect
              key={year}
              x={year - first + 0.1}
              y={Math.min(y(0), y(index))}
              width={0.8}
              height={Math.abs(y(index) - y(0))}
              className={threshold !== undefined && index <= threshold ? 'fill-ink' : 'fill-shore'}
            />
          ))}
          <path d={`M0 ${y(0)}H${span}`} className="stroke-ink" vectorEffect="non-scaling-stroke" />
          {threshold !== undefined && (
            <path
              d={`M0 ${y(threshold)}H${span}`}
              strokeDasharray="3 4"
              className="stroke-ink"
              vectorEffect="non-scaling-stroke"
            />
          )}
        </svg>
      </div>
      <div className="flex justify-between pl-10 text-note text-ink-2 tabular-nums">
        <span>{first}</span>
        <span>{last}</span>
      </div>
    </figure>
  );
}
