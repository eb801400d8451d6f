import type { Rates } from '#sim-core/spec/parameters.ts';
import { formatNumber, formatShare } from '#app/lib/formats.ts';
import { ReadAsTable } from '#app/components/read-as-table.tsx';
import type { ImpliedDraws } from './implied-draws.ts';
import { yearlyLoss, type Implications } from './implied.ts';

const width = 312;
const height = 96;
const samples = 156;

/** Share lost in one year by drought index, on open marsh and on a full refuge. */
export function LossCurves({
  rates,
  halfLoss,
  bands,
}: Pick<Implications, 'halfLoss'> & {
  rates: Rates;
  /** of the two half-loss indices over draws of what is believed; none where every rate is fixed */
  bands: ImpliedDraws['halfLoss'] | undefined;
}) {
  const { open, refuge } = halfLoss;
  const driest = Math.floor(Math.min(-4, open, refuge) - 2.5);
  const wettest = Math.ceil(Math.max(1, open + 1));
  const x = (index: number) => ((wettest - index) / (wettest - driest)) * width;
  const y = (share: number) => height - share * (height - 6);
  const curve = (place: number) =>
    Array.from({ length: samples + 1 }, (_, i) => {
      const index = wettest - (i / samples) * (wettest - driest);
      return `${i === 0 ? 'M' : 'L'}${x(index).toFixed(1)} ${y(yearlyLoss(rates, place, index)).toFixed(1)}`;
    }).join('');
  const atOpen = formatShare(yearlyLoss(rates, open, open));
  const sheltered = formatShare(yearlyLoss(rates, refuge, open));
  const words =
    `A year at index ${formatNumber(open)} takes ${atOpen} of what stands alone on open marsh and ` +
    `${sheltered} of what stands on a full refuge, which loses as much at ${formatNumber(refuge)}.`;
  const ticks = [0, -2, -4, -6, -8, -10].filter((t) => t < wettest && t > driest);
  return (
    <figure>
      <div aria-hidden="true" className="mb-1 flex gap-5 text-note font-semibold">
        <Key words="open marsh" />
        <Key words="near a mound" dash="6 3" />
      </div>
      <svg viewBox={`0 -4 ${width} ${height + 20}`} role="img" aria-label={words} className="block w-full">
        <path d={`M0 ${y(1)}H${width}M0 ${y(0.5)}H${width}`} className="stroke-rule-2" />
        {bands &&
          [bands.open, bands.refuge].map(({ low, high }, i) => (
            <rect
              key={i}
              x={Math.max(0, x(high))}
              y={height - (i === 0 ? 10 : 5)}
              width={Math.max(1, Math.min(width, x(low)) - Math.max(0, x(high)))}
              height={4}
              className="fill-shore"
            />
          ))}
        {[open, refuge].map((place) => (
          <path
            key={place}
            d={`M${x(place)} ${height}V${y(yearlyLoss(rates, place, place))}`}
            className="stroke-ink"
            strokeDasharray={place === open ? '1 3' : '5 3'}
          />
        ))}
        <path d={curve(open)} strokeWidth={2} className="fill-none stroke-ink" />
        <path d={curve(refuge)} strokeWidth={2} strokeDasharray="6 3" className="fill-none stroke-ink" />
        <path d={`M0 ${height}H${width}`} className="stroke-ink" />
        <g className="fill-ink-2 font-mono text-axis">
          {ticks.map((tick) => (
            <text key={tick} x={x(tick)} y={height + 13} textAnchor="middle">
              {formatNumber(tick)}
            </text>
          ))}
          <text x={2} y={y(1) + 11}>
            100 % lost
          </text>
          <text x={width} y={height + 13} textAnchor="end" className="font-sans">
            drier
          </text>
        </g>
      </svg>
      <figcaption className="text-note text-ink-2">
        {words} Half of the drought loss acts at {formatNumber(halfLoss.neighbours)} among full neighbours and
        at {formatNumber(halfLoss.exposed)} on fully exposed ground.
        {bands &&
          ` Bars: nine tenths of the draws put the index of half the drought loss between ${formatNumber(bands.open.low)} and ` +
            `${formatNumber(bands.open.high)} on open marsh, between ${formatNumber(bands.refuge.low)} and ` +
            `${formatNumber(bands.refuge.high)} on a full refuge.`}
      </figcaption>
      <ReadAsTable
        caption="Share lost in a year, by drought index"
        heads={['index', 'open marsh', 'near a mound']}
        rows={[1, 0, -1, -2, -3, -4, -5, -6].map((index) => [
          formatNumber(index),
          formatShare(yearlyLoss(rates, open, index)),
          formatShare(yearlyLoss(rates, refuge, index)),
        ])}
      />
    </figure>
  );
}

function Key({ words, dash }: { words: string; dash?: string }) {
  return (
    <span className="flex items-center gap-1.5">
      <svg width={26} height={4}>
        <path d="M0 2h26" strokeWidth={2} strokeDasharray={dash} className="stroke-ink" />
      </svg>
      {words}
    </span>
  );
}
