import { useId, useState } from 'react';
import { weighOptions, type Criterion } from '#sim-core/index.ts';
import { formatNumber } from '#app/lib/formats.ts';
import type { ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';

interface Named extends Criterion {
  readonly name: string;
}

/** Criteria that the figures of a comparison hold, with equal weights. */
export function criteriaOf({ outlooks }: ComparisonFigures): Omit<Named, 'weight'>[] {
  const [first] = outlooks;
  const chances = (outlook: (typeof outlooks)[number]) =>
    outlook.options.map((option) => option.summary.beforeDrought.share?.estimate ?? 0);
  const criteria: Omit<Named, 'weight'>[] = [
    { name: 'chance to close in time', values: chances(first), better: 'more' },
    { name: 'years sooner', values: first.options.map((option) => option.yearsSooner), better: 'more' },
  ];
  if (first.options.every((option) => option.cost !== null))
    criteria.push({ name: 'cost', values: first.options.map((option) => option.cost ?? 0), better: 'less' });
  if (outlooks.length > 1)
    criteria.push({
      name: 'chance under the worst outlook',
      values: first.options.map((_, i) => Math.min(...outlooks.map((outlook) => chances(outlook)[i]))),
      better: 'more',
    });
  return criteria;
}

/** One number for those who want it: a ranking by weights, and how far each can move before another comes first. */
export function WeightsBox({ figures }: { figures: ComparisonFigures }) {
  const criteria = criteriaOf(figures);
  const [weights, setWeights] = useState<readonly number[]>([]);
  const id = useId();
  const weighed = criteria.map((criterion, i): Named => ({ ...criterion, weight: weights[i] ?? 50 }));
  const some = weighed.some(({ weight }) => weight > 0);
  const result = some ? weighOptions(weighed) : undefined;
  const names = figures.outlooks[0].options.map((option) => option.name);
  const percent = (share: number) => formatNumber(100 * share, 0);
  return (
    <section aria-label="Weights">
      <b>Weights</b>
      <p className="text-note text-ink-2">
        Each criterion runs from the worst option to the best of this comparison; a ranking says no more than
        its weights.
      </p>
      <div className="mt-1 grid gap-1">
        {weighed.map(({ name, weight }, i) => {
          const room = result?.room[i];
          return (
            <div key={name} className="grid grid-cols-[minmax(0,1fr)_minmax(0,1fr)] items-center gap-x-3">
              <label htmlFor={`${id}-${i}`} className="text-[13px]">
                {name}
                {room && (
                  <span className="block text-note text-ink-2">
                    {percent(room.share)} % of all; the first stays first from {percent(room.low)} to{' '}
                    {percent(room.high)} %
                  </span>
                )}
              </label>
              <input
                id={`${id}-${i}`}
                type="range"
                min={0}
                max={100}
                step={5}
                value={weight}
                className="h-7 w-full cursor-pointer accent-ink touch:h-11"
                onChange={(event) => {
                  const next = weighed.map((each) => each.weight);
                  next[i] = Number(event.target.value);
                  setWeights(next);
                }}
              />
            </div>
          );
        })}
      </div>
      {result ? (
        <ol className="mt-2 text-[13.5px]">
          {result.ranking.map((option, place) => (
            <li
              key={option}
              className={`flex justify-between border-t border-rule-2 py-0.5 ${place === 0 ? 'font-bold' : ''}`}
            >
              <span>
                {place + 1}. {names[option]}
              </span>
              <span className="tabular-nums">{percent(result.scores[option])}</span>
            </li>
          ))}
        </ol>
      ) : (
        <p role="alert" className="text-note text-danger">
          Give at least one criterion some weight.
        </p>
      )}
    </section>
  );
}
