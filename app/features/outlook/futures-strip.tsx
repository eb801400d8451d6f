import type { DrawnFutures } from '#sim-core/weather/drawn-futures.ts';

const rowHeight = 9;

/** A line a future, further from the ground's colour where it is drier: darker on a light sheet, lighter on a dark one. */
export function FuturesStrip(props: {
  examples: DrawnFutures['examples'];
  tolerance: number;
  firstYear: number;
}) {
  const { examples, tolerance, firstYear } = props;
  const years = examples[0]?.length ?? 0;
  const height = examples.length * rowHeight;
  /** 0 where it is near normal or wet, 1 at twice the tolerance */
  const dryness = (index: number) => Math.min(1, Math.max(0, index / (2 * Math.min(-0.5, tolerance))));
  return (
    <figure className="my-2">
      <figcaption className="text-note text-ink-2">
        {examples.length} futures, a line each: the drier a year, the more it stands out; full strength where
        it kills open marsh
      </figcaption>
      <svg
        viewBox={`0 0 ${years} ${height}`}
        preserveAspectRatio="none"
        className="mt-1 block w-full"
        style={{ height }}
        aria-hidden
      >
        {examples.map((future, f) =>
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
      <div className="flex justify-between text-note text-ink-2 tabular-nums">
        <span>{firstYear}</span>
        <span>{firstYear + years - 1}</span>
      </div>
    </figure>
  );
}
