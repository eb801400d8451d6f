import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import { useNarrow } from '#app/lib/use-media-query.ts';
import { factorLabel } from '#sim-core/matters/matters-words.ts';
import type { StudyFigures } from '#sim-core/matters/study-figures.ts';

type Screening = Extract<StudyFigures, { method: 'screening' }>;
const height = 300;
const [left, right, top, bottom] = [52, 16, 16, 42];

/** Size of each factor's effect against how much it bends or hangs on others. */
export function ScreeningChart({
  figures,
  unit,
  digits,
}: {
  figures: Screening;
  unit: string;
  digits: number;
}) {
  const effects = figures.effects.toSorted((a, b) => b.meanSize - a.meanSize);
  const width = useNarrow() ? 400 : 620;
  const most =
    Math.max(1e-9, ...effects.map(({ meanSize, deviation }) => Math.max(meanSize, deviation))) * 1.1;
  const x = (value: number) => left + ((width - left - right) * value) / most;
  const y = (value: number) => height - bottom - ((height - top - bottom) * value) / most;
  const labels = parted(effects.map(({ deviation }) => y(deviation)));
  return (
    <figure className="max-w-[760px]">
      <figcaption className="flex flex-wrap justify-between gap-x-4">
        <b>Effects</b>
        <span className="text-note text-ink-2">
          further right: matters more; above the line: bends, or hangs on others
        </span>
      </figcaption>
      <svg viewBox={`0 0 ${width} ${height}`} className="mt-1 block w-full" aria-hidden="true">
        <path d={`M${x(0)} ${y(0)}L${x(most)} ${y(most)}`} className="stroke-ink-2" strokeDasharray="4 4" />
        <path d={`M${x(0)} ${top}V${y(0)}H${width - right}`} className="stroke-ink" fill="none" />
        {[0, most / 2.2, most / 1.1].map((tick) => (
          <g key={tick} className="fill-ink-2 font-mono text-axis">
            <text x={x(tick)} y={y(0) + 16} textAnchor="middle">
              {formatNumber(tick, digits)}
            </text>
            {tick > 0 && (
              <text x={left - 6} y={y(tick) + 4} textAnchor="end">
                {formatNumber(tick, digits)}
              </text>
            )}
          </g>
        ))}
        <text x={width - right} y={height - 6} textAnchor="end" className="fill-ink-2 text-axis">
          mean size of the effect, μ*, {unit}
        </text>
        <text x={left + 6} y={top + 2} className="fill-ink-2 text-axis">
          spread of the effects, σ
        </text>
        {effects.map(({ factor, meanSize, deviation }, i) => {
          const onRight = x(meanSize) > width * 0.6;
          return (
            <g key={factor}>
              <circle cx={x(meanSize)} cy={y(deviation)} r={5} className="fill-ink stroke-ground" />
              <text
                x={x(meanSize) + (onRight ? -9 : 9)}
                y={labels[i] + 4}
                textAnchor={onRight ? 'end' : 'start'}
                className="fill-ink text-axis stroke-ground [paint-order:stroke] [stroke-width:4px]"
              >
                {factorLabel(factor)}
              </text>
            </g>
          );
        })}
      </svg>
      <ReadAsTable
        caption={`Elementary effects over the middle nine tenths of what is believed, ${unit}`}
        heads={['Factor', 'Mean size μ*', '± error', 'Mean μ', 'Spread σ']}
        rows={effects.map(({ factor, meanSize, meanSizeError, mean, deviation }) => [
          factorLabel(factor),
          ...[meanSize, meanSizeError, mean, deviation].map((value) => formatNumber(value, digits)),
        ])}
      />
    </figure>
  );
}

/** Heights of labels, each at least a line from those above it. */
function parted(heights: readonly number[]): number[] {
  const found = [...heights];
  const order = heights.map((_, i) => i).sort((a, b) => heights[b] - heights[a]);
  let below = Infinity;
  for (const i of order) below = found[i] = Math.min(heights[i], below - 13);
  return found;
}
