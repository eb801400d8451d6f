import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import type { Interval } from '#sim-core/index.ts';
import { factorLabel } from '#sim-core/matters/matters-words.ts';
import type { StudyFigures } from '#sim-core/matters/study-figures.ts';
import { FactorBars } from './factor-bars.tsx';

type Indices = Extract<StudyFigures, { method: 'indices' }>;
const percent = ({ estimate, low, high }: Interval) =>
  `${formatNumber(100 * estimate, 0)} % (${formatNumber(100 * low, 0)} to ${formatNumber(100 * high, 0)})`;

/** Shares of the variance that each factor explains alone, and together with others. */
export function IndexChart({ figures }: { figures: Indices }) {
  const indices = figures.indices.toSorted((a, b) => b.total.estimate - a.total.estimate);
  const most = Math.max(1, ...indices.map(({ total }) => total.high));
  return (
    <figure className="max-w-[760px]">
      <figcaption className="flex flex-wrap justify-between gap-x-4">
        <b>Shares of the variance</b>
        <span className="text-note text-ink-2">filled: alone; open: alone and with others; lines 95 %</span>
      </figcaption>
      <FactorBars
        domain={[0, most]}
        base={0}
        digits={2}
        rows={indices.map(({ factor, first, total }) => ({
          label: factorLabel(factor),
          bars: [
            { from: 0, to: Math.max(0, first.estimate), tone: 'full', interval: [first.low, first.high] },
            { from: 0, to: total.estimate, tone: 'open', interval: [total.low, total.high] },
          ],
        }))}
      />
      <ReadAsTable
        caption="Sobol’ indices: shares of the variance, with 95 % intervals"
        heads={['Factor', 'Alone', 'With others']}
        rows={indices.map(({ factor, first, total }) => [
          factorLabel(factor),
          percent(first),
          percent(total),
        ])}
      />
    </figure>
  );
}
