import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber, formatShare } from '#app/lib/formats.ts';
import type { PosteriorFigures, RateFigures } from './posterior-figures.ts';

const [width, height, bottom] = [400, 140, 26];

/** Each fitted rate before (outline) and after (filled): what the surveys told about it. */
export function RateDensities({ posterior }: { posterior: PosteriorFigures }) {
  return (
    <section aria-label="Rates before and after" className="grid gap-3">
      <div className="grid gap-x-8 gap-y-5 sm:grid-cols-2">
        {posterior.rates.map((rate) => (
          <Density key={rate.name} rate={rate} />
        ))}
      </div>
      <ReadAsTable
        caption="Middle nine tenths and median of each rate, before and after"
        heads={['Rate', 'Before', 'After', 'Median after', 'Width left']}
        rows={posterior.rates.map((rate) => [
          unitOf(rate),
          rangeWords(rate.before),
          rangeWords(rate.after),
          formatNumber(rate.after[1], 3),
          formatShare(rate.narrowed),
        ])}
      />
    </section>
  );
}

const unitOf = ({ label, unit }: RateFigures) => (unit === '–' ? label : `${label}, ${unit}`);
const rangeWords = ([low, , high]: readonly number[]) =>
  `${formatNumber(low, 3)} to ${formatNumber(high, 3)}`;

function Density({ rate }: { rate: RateFigures }) {
  const { bins, prior, posterior, after } = rate;
  const most = Math.max(...prior, ...posterior);
  const [from, to] = [bins[0], bins[bins.length - 1]];
  const x = (value: number) => (width * (Math.min(to, Math.max(from, value)) - from)) / (to - from);
  const y = (share: number) => (height - bottom) * (1 - share / most) + 2;
  const step = width / prior.length;
  const outline = prior
    .map((share, i) => `${i === 0 ? 'M' : 'L'}${i * step} ${y(share)}H${(i + 1) * step}`)
    .join('');
  return (
    <figure className="max-w-[420px]">
      <figcaption className="flex flex-wrap justify-between gap-x-3">
        <b>{unitOf(rate)}</b>
        <span className="text-note text-ink-2">
          {formatNumber(after[1], 3)}; nine tenths {rangeWords(after)}
        </span>
      </figcaption>
      <svg viewBox={`-2 0 ${width + 4} ${height}`} className="mt-1 block w-full" aria-hidden="true">
        {posterior.map((share, i) => (
          <rect
            key={i}
            x={i * step + 0.5}
            width={step - 1}
            y={y(share)}
            height={Math.max(0, height - bottom + 2 - y(share))}
            className="fill-cover-5"
          />
        ))}
        <path d={outline} fill="none" className="stroke-ink" strokeWidth={1.5} strokeDasharray="4 3" />
        <path d={`M0 ${height - bottom + 2}H${width}`} className="stroke-ink" />
        <path
          d={`M${x(after[0])} ${height - bottom + 7}H${x(after[2])}m0 -3v6M${x(after[0])} ${height - bottom + 4}v6`}
          className="stroke-ink"
          strokeWidth={1.5}
        />
        <circle cx={x(after[1])} cy={height - bottom + 7} r={3.5} className="fill-flag stroke-ink" />
        <text x={0} y={height - 3} className="fill-ink-2 text-axis">
          {formatNumber(from, 2)}
        </text>
        <text x={width} y={height - 3} textAnchor="end" className="fill-ink-2 text-axis">
          {formatNumber(to, 2)}
        </text>
      </svg>
    </figure>
  );
}
