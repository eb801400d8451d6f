import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import type { PosteriorFigures } from './posterior-figures.ts';

const side = 160;

/** How the fitted rates hang together: a cloud of members for each pair, larger where they weigh more. */
export function PairPlot({ posterior }: { posterior: PosteriorFigures }) {
  const { rates, members, correlations } = posterior;
  const pairs = rates.flatMap((_, i) => rates.slice(i + 1).map((__, k) => [i, i + 1 + k] as const));
  if (pairs.length === 0) return null;
  const most = Math.max(...members.map(({ weight }) => weight));
  return (
    <section aria-label="How the rates hang together" className="grid gap-3">
      <div className="flex flex-wrap gap-x-8 gap-y-5">
        {pairs.map(([i, j]) => {
          const [a, b] = [rates[i], rates[j]];
          const place = (value: number, { bins }: typeof a) =>
            Math.min(1, Math.max(0, (value - bins[0]) / (bins[bins.length - 1] - bins[0]))) * side;
          return (
            <figure key={`${a.name} ${b.name}`} className="w-[220px]">
              <figcaption className="text-note">
                <b>{b.label}</b> against <b>{a.label.toLowerCase()}</b>: correlation{' '}
                {formatNumber(correlations[i][j], 2)}
              </figcaption>
              <svg
                viewBox={`-34 -4 ${side + 42} ${side + 24}`}
                className="mt-1 block w-full"
                aria-hidden="true"
              >
                <path d={`M0 0V${side}H${side}`} fill="none" className="stroke-ink" />
                {members.map(({ values, weight }, k) => (
                  <circle
                    key={k}
                    cx={place(values[i], a)}
                    cy={side - place(values[j], b)}
                    r={1 + 2 * Math.sqrt(weight / most)}
                    className="fill-cover-6"
                    fillOpacity={0.6}
                  />
                ))}
                {[0, 1].map((end) => (
                  <g key={end} className="fill-ink-2 text-axis">
                    <text x={end * side} y={side + 15} textAnchor={end ? 'end' : 'start'}>
                      {formatNumber(a.bins[end ? a.bins.length - 1 : 0], 2)}
                    </text>
                    <text x={-4} y={end ? 9 : side} textAnchor="end">
                      {formatNumber(b.bins[end ? b.bins.length - 1 : 0], 2)}
                    </text>
                  </g>
                ))}
              </svg>
            </figure>
          );
        })}
      </div>
      <ReadAsTable
        caption="Correlation of the fitted rates: near 1 or −1, the surveys tell them apart only together"
        heads={['Rates', 'Correlation']}
        rows={pairs.map(([i, j]) => [
          `${rates[i].label} and ${rates[j].label.toLowerCase()}`,
          formatNumber(correlations[i][j], 2),
        ])}
      />
    </section>
  );
}
