import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import type { DrawnFutures } from '#sim-core/weather/drawn-futures.ts';

const width = 300;
const height = 96;

/** Chance that a year dry enough to kill has come by then: on open marsh and on a full refuge, as lines and as a table. */
export function KillingChanceFigure(props: { futures: DrawnFutures; firstYear: number }) {
  const { futures, firstYear } = props;
  const [open, mound] = futures.lines;
  const years = open.byThen.length;
  const last = firstYear + years - 1;
  const x = (y: number) => (years === 1 ? width : (y * width) / (years - 1));
  const path = (shares: readonly number[]) =>
    shares.map((share, y) => `${y === 0 ? 'M' : 'L'}${x(y)} ${height * (1 - share)}`).join('');
  const percent = (share: number) => `${formatNumber(100 * share, 0)} %`;
  return (
    <figure className="my-3">
      <figcaption className="text-[13.5px]">
        By {last} a killing year has come on <b>open marsh</b> in {percent(open.byThen[years - 1])} of{' '}
        {futures.futures} futures, <b>near a mound</b> too in {percent(mound.byThen[years - 1])}.
      </figcaption>
      <div className="mt-2 flex gap-2">
        <div
          className="flex w-9 flex-col justify-between text-right text-note text-ink-2 tabular-nums"
          aria-hidden
        >
          <span>100</span>
          <span>50</span>
          <span>0</span>
        </div>
        <svg
          viewBox={`0 0 ${width} ${height}`}
          preserveAspectRatio="none"
          className="block h-24 min-w-0 flex-1 overflow-visible border-b border-rule"
          aria-hidden
        >
          {[0, 0.5].map((share) => (
            <path
              key={share}
              d={`M0 ${height * share}H${width}`}
              className="stroke-rule-2"
              vectorEffect="non-scaling-stroke"
            />
          ))}
          <path
            d={path(open.byThen)}
            fill="none"
            strokeWidth={2.5}
            vectorEffect="non-scaling-stroke"
            className="stroke-ink"
          />
          <path
            d={path(mound.byThen)}
            fill="none"
            strokeWidth={2}
            strokeDasharray="6 4"
            vectorEffect="non-scaling-stroke"
            className="stroke-ink"
          />
        </svg>
      </div>
      <div className="flex justify-between gap-x-3 pl-11 text-note text-ink-2 tabular-nums">
        <span>{firstYear}</span>
        <span aria-hidden>% by then: — open marsh, – – near a mound</span>
        <span>{last}</span>
      </div>
      <ReadAsTable
        caption="Chance of a killing drought, of a hundred futures"
        heads={['Year', 'open marsh', '… by then', 'near a mound', '… near one by then']}
        rows={open.inYear.map((share, y) => [
          String(firstYear + y),
          ...[share, open.byThen[y], mound.inYear[y], mound.byThen[y]].map((s) => formatNumber(100 * s, 0)),
        ])}
      />
    </figure>
  );
}
