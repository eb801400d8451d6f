import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import type { FirstLook } from '#sim-core/matters/first-look.ts';
import { factorLabel } from '#sim-core/matters/matters-words.ts';
import { FactorBars } from './factor-bars.tsx';

/** Partial rank correlations of the rates that a comparison's futures drew. */
export function LookChart({ look }: { look: FirstLook }) {
  const rates = look.rates.toSorted((a, b) => Math.abs(b.partial.estimate) - Math.abs(a.partial.estimate));
  return (
    <figure className="max-w-[760px]">
      <figcaption className="flex flex-wrap justify-between gap-x-4">
        <b>Partial rank correlation</b>
        <span className="text-note text-ink-2">
          right: more of the rate, more of what is measured; lines 95 %
        </span>
      </figcaption>
      <FactorBars
        domain={[-1, 1]}
        base={0}
        digits={1}
        rows={rates.map(({ name, partial: { estimate, low, high } }) => ({
          label: factorLabel(name),
          bars: [{ from: 0, to: estimate, tone: 'full', interval: [low, high] }],
        }))}
      />
      <ReadAsTable
        caption="Rank correlations of the rates with what is measured"
        heads={['Rate', 'Partial', '95 %', 'Plain']}
        rows={rates.map(({ name, partial, correlation }) => [
          factorLabel(name),
          formatNumber(partial.estimate, 2),
          `${formatNumber(partial.low, 2)} to ${formatNumber(partial.high, 2)}`,
          formatNumber(correlation, 2),
        ])}
      />
    </figure>
  );
}
