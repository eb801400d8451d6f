import { Table } from '#app/components/table.tsx';
import { formatNumber } from '#app/lib/formats.ts';

const width = 308;
const height = 96;
const left = 34;
const base = 78;
const top = 12;

/** What each further mound buys: years by which growth arrives sooner on average, added up, with the knee marked. */
export function GainChart(props: {
  /** years that each brings, in order */
  gains: readonly number[];
  knee: number | undefined;
  /** how many of them are taken */
  taken: number;
}) {
  const { gains, knee, taken } = props;
  const sums = gains.reduce<number[]>((all, gain) => [...all, (all.at(-1) ?? 0) + gain], [0]);
  const most = sums[sums.length - 1] || 1;
  const x = (count: number) => left + (count / gains.length) * (width - left - 6);
  const y = (sum: number) => base - (sum / most) * (base - top);
  const line = sums.map((sum, i) => `${i === 0 ? 'M' : 'L'}${x(i).toFixed(1)} ${y(sum).toFixed(1)}`).join('');
  return (
    <>
      <svg
        viewBox={`0 0 ${width} ${height}`}
        role="img"
        aria-label={`Years sooner against the number of mounds: ${formatNumber(most)} years with all ${gains.length}${
          knee === undefined
            ? ''
            : `, ${formatNumber(sums[knee])} with the first ${knee}, where the curve bends`
        }.`}
        className="mt-1 block w-full overflow-visible font-mono text-axis"
      >
        <path d={`M${left} ${base}H${width - 6}M${left} ${top}V${base}`} className="fill-none stroke-rule" />
        <text x={left - 5} y={top + 4} textAnchor="end" className="fill-ink">
          {formatNumber(most)}
        </text>
        <text x={left - 5} y={base} textAnchor="end" className="fill-ink">
          0 y
        </text>
        <text x={x(gains.length)} y={base + 14} textAnchor="end" className="fill-ink">
          {gains.length} mounds
        </text>
        {knee !== undefined && (
          <>
            <path
              d={`M${x(knee)} ${y(sums[knee])}V${base + 4}`}
              strokeDasharray="3 3"
              className="stroke-ink"
            />
            <text x={x(knee)} y={base + 14} textAnchor="middle" className="fill-ink font-semibold">
              {knee}
            </text>
          </>
        )}
        <path d={line} strokeWidth={2.2} className="fill-none stroke-ink" />
        <circle
          cx={x(taken)}
          cy={y(sums[taken] ?? 0)}
          r={4.5}
          strokeWidth={1.5}
          className="fill-flag stroke-ink"
        />
      </svg>
      <details className="text-note">
        <summary className="w-max border-b border-rule">Read as a table</summary>
        <Table
          caption="What each further mound buys"
          className="mt-1"
          columns={[
            { key: 'n', head: 'mounds', number: true, cell: (row) => row.count },
            { key: 'gain', head: 'this one, years', number: true, cell: (row) => formatNumber(row.gain, 3) },
            { key: 'sum', head: 'all, years', number: true, cell: (row) => formatNumber(row.sum, 3) },
          ]}
          rows={gains.map((gain, i) => ({ count: i + 1, gain, sum: sums[i + 1] }))}
          rowKey={(row) => String(row.count)}
        />
      </details>
    </>
  );
}
