import type { LayerFacts } from '#contract/layers.ts';
import { formatNumber } from '#app/lib/formats.ts';

const height = 34;

/** How often each value stands in a layer, in equal bins. Bars rise with the root of the count, so that rare ones show. */
export function Histogram({ layer }: { layer: Pick<LayerFacts, 'histogram' | 'minimum' | 'maximum'> }) {
  const { histogram, minimum, maximum } = layer;
  const most = Math.max(...histogram, 1);
  const peak = histogram.indexOf(most);
  const binWidth = (maximum - minimum) / Math.max(1, histogram.length);
  const words =
    minimum === maximum
      ? `Every cell holds ${formatNumber(minimum)}.`
      : `Values from ${formatNumber(minimum)} to ${formatNumber(maximum)}, most of them between ` +
        `${formatNumber(minimum + peak * binWidth)} and ${formatNumber(minimum + (peak + 1) * binWidth)}.`;
  return (
    <figure className="my-1.5">
      <svg
        viewBox={`0 0 ${histogram.length} ${height}`}
        preserveAspectRatio="none"
        role="img"
        aria-label={words}
        className="block h-[34px] w-full border-b border-ink"
      >
        {histogram.map((count, i) => {
          const rise = count === 0 ? 0 : Math.max(1.5, Math.sqrt(count / most) * height);
          return (
            <rect key={i} x={i + 0.08} y={height - rise} width={0.84} height={rise} className="fill-shore" />
          );
        })}
      </svg>
      <figcaption aria-hidden="true" className="flex justify-between font-mono text-axis text-ink-2">
        <span>{formatNumber(minimum)}</span>
        <span className="font-sans">values, root of the count</span>
        <span>{formatNumber(maximum)}</span>
      </figcaption>
    </figure>
  );
}
