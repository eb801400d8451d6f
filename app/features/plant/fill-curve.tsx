import { formatCounted, formatNumber, formatShare } from '#app/lib/formats.ts';
import { ReadAsTable } from '#app/components/read-as-table.tsx';
import type { Band } from './implied-draws.ts';
import { fillFrom, yearsToReach, type Implications } from './implied.ts';

const width = 312;
const height = 84;

/** How ground fills from very little, in years at index 0. */
export function FillCurve({
  fill,
  settles,
  doublingYears,
  band,
}: Pick<Implications, 'fill' | 'settles' | 'doublingYears'> & {
  /** quantiles over draws of what is believed, by year; none where every rate is fixed */
  band: readonly Band[] | undefined;
}) {
  const ceiling = fill.at(-1) ?? 0;
  const near = yearsToReach(fill, ceiling * 0.98) ?? fill.length - 1;
  const shown = Math.min(fill.length - 1, Math.max(5, Math.ceil((near * 1.3) / 5) * 5));
  const x = (year: number) => (year / shown) * width;
  const y = (share: number) => height - share * (height - 6);
  const half = yearsToReach(fill, settles / 2);
  const words =
    settles === 0
      ? 'These rates do not hold a stand even without losses: it shrinks everywhere.'
      : half === undefined
        ? `Good ground at ${formatShare(fillFrom)} cover is not half full within ${fill.length - 1} years, at ordinary losses.`
        : `Good ground at ${formatShare(fillFrom)} cover is half full after ${formatCounted(half, 'year')}` +
          `${ceiling < settles * 0.98 ? '' : ` and settles at ${formatShare(ceiling)}`}.`;
  return (
    <figure>
      <svg viewBox={`0 -4 ${width} ${height + 20}`} role="img" aria-label={words} className="block w-full">
        <path d={`M0 ${y(1)}H${width}M0 ${y(0.5)}H${width}`} className="stroke-rule-2" />
        {band && (
          <path
            d={`M${[
              ...band.slice(0, shown + 1).map(({ high }, year) => [year, high]),
              ...band
                .slice(0, shown + 1)
                .map(({ low }, year) => [year, low])
                .reverse(),
            ]
              .map(([year, share]) => `${x(year).toFixed(1)} ${y(share).toFixed(1)}`)
              .join('L')}Z`}
            className="fill-shore opacity-60"
          />
        )}
        <path
          d={fill
            .slice(0, shown + 1)
            .map((share, year) => `${year === 0 ? 'M' : 'L'}${x(year).toFixed(1)} ${y(share).toFixed(1)}`)
            .join('')}
          strokeWidth={2}
          className="fill-none stroke-ink"
        />
        {half !== undefined && half <= shown && (
          <path d={`M${x(half)} ${height}V${y(fill[half])}`} strokeDasharray="2 3" className="stroke-ink" />
        )}
        <path d={`M0 ${height}H${width}`} className="stroke-ink" />
        <g className="fill-ink-2 font-mono text-axis">
          <text x={2} y={y(1) + 11}>
            100 %
          </text>
          <text x={0} y={height + 13}>
            0
          </text>
          <text x={width} y={height + 13} textAnchor="end">
            {shown} years
          </text>
        </g>
      </svg>
      <figcaption className="text-note text-ink-2">
        {words} From little, cover doubles every {formatNumber(doublingYears)} years, losses aside.
        {band && ' The band holds nine tenths of the draws of what is believed.'}
      </figcaption>
      <ReadAsTable
        caption="Cover of good ground at the end of each year"
        heads={band ? ['year', 'cover', '5 %', '95 %'] : ['year', 'cover']}
        rows={fill
          .slice(0, shown + 1)
          .map((share, year) => [
            String(year),
            formatShare(share),
            ...(band ? [formatShare(band[year].low), formatShare(band[year].high)] : []),
          ])}
      />
    </figure>
  );
}
