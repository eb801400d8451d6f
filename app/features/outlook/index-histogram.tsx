import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber } from '#app/lib/formats.ts';

/** Shares of values by whole units of the index: a record as bars, what was drawn as a stepped line. */
export function IndexHistogram(props: {
  record: readonly number[];
  drawn: readonly number[];
  label: string;
}) {
  const { record, drawn } = props;
  const all = [...record, ...drawn];
  const low = Math.floor(Math.min(...all));
  const bins = Math.max(1, Math.floor(Math.max(...all)) - low + 1);
  const shares = (values: readonly number[]) => {
    const counts = new Array<number>(bins).fill(0);
    for (const value of values) counts[Math.floor(value) - low]++;
    return counts.map((count) => count / Math.max(1, values.length));
  };
  const [bars, line] = [shares(record), shares(drawn)];
  const most = Math.max(...bars, ...line);
  const y = (share: number) => 100 * (1 - share / most);
  return (
    <figure>
      <figcaption className="text-note text-ink-2">{props.label}</figcaption>
      <svg
        viewBox={`0 0 ${bins} 100`}
        preserveAspectRatio="none"
        className="mt-1 block h-32 w-full border-b border-ink"
        aria-hidden
      >
        {bars.map((share, i) => (
          <rect
            key={i}
            x={i + 0.08}
            y={y(share)}
            width={0.84}
            height={100 - y(share)}
            className="fill-shore"
          />
        ))}
        <path
          d={`M0 100${line.map((share, i) => `L${i} ${y(share)}H${i + 1}`).join('')}V100`}
          fill="none"
          strokeWidth={2}
          vectorEffect="non-scaling-stroke"
          className="stroke-ink"
        />
      </svg>
      <div className="flex justify-between text-note text-ink-2 tabular-nums">
        <span>{formatNumber(low, 0)}</span>
        <span>index</span>
        <span>{formatNumber(low + bins, 0)}</span>
      </div>
      <ReadAsTable
        caption="Share of years, per cent"
        heads={['Index from', 'on record', 'as drawn']}
        rows={bars.map((share, i) => [
          formatNumber(low + i, 0),
          formatNumber(100 * share, 0),
          formatNumber(100 * line[i], 0),
        ])}
      />
    </figure>
  );
}
