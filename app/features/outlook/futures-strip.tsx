import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import type { ExampleFutures } from './example-futures.ts';

const rowHeight = 9;
const chanceHeight = 44;

/** A line a future, darker where it is drier, and below them the chance of a killing year as columns. */
export function FuturesStrip(props: ExampleFutures & { tolerance: number; firstYear: number }) {
  const { futures, killing, tolerance, firstYear } = props;
  const years = killing.length;
  const height = futures.length * rowHeight;
  const most = Math.max(0.1, ...killing);
  /** 0 where it is near normal or wet, 1 at twice the tolerance */
  const dryness = (index: number) => Math.min(1, Math.max(0, index / (2 * Math.min(-0.5, tolerance))));
  return (
    <figure className="my-2">
      <figcaption className="text-note text-ink-2">
        {futures.length} futures, a line each, darker where drier; ink where a year kills
      </figcaption>
      <svg
        viewBox={`0 0 ${years} ${height}`}
        preserveAspectRatio="none"
        className="mt-1 block w-full"
        style={{ height }}
        aria-hidden
      >
        {futures.map((future, f) =>
          future.map((index, y) => (
            <rect
              key={`${f} ${y}`}
              x={y}
              y={f * rowHeight}
              width={1}
              height={rowHeight - 2}
              className={index < tolerance ? 'fill-ink' : 'fill-ink-2'}
              opacity={index < tolerance ? 1 : 0.06 + 0.5 * dryness(index)}
            />
          )),
        )}
      </svg>
      <div className="mt-2 text-note text-ink-2">
        Chance of a killing year, up to {Math.round(100 * most)} %
      </div>
      <svg
        viewBox={`0 0 ${years} ${chanceHeight}`}
        preserveAspectRatio="none"
        className="block w-full border-b border-rule"
        style={{ height: chanceHeight }}
        aria-hidden
      >
        {killing.map((share, y) => (
          <rect
            key={y}
            x={y + 0.12}
            y={chanceHeight * (1 - share / most)}
            width={0.76}
            height={(chanceHeight * share) / most}
            className="fill-ink"
          />
        ))}
      </svg>
      <div className="flex justify-between text-note text-ink-2 tabular-nums">
        <span>{firstYear}</span>
        <span>{firstYear + years - 1}</span>
      </div>
      <ReadAsTable
        caption="Chance of a killing year"
        heads={['Year', 'Chance']}
        rows={killing.map((share, y) => [String(firstYear + y), `${formatNumber(100 * share, 0)} %`])}
      />
    </figure>
  );
}
