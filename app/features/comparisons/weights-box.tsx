import { useId, useState } from 'react';
import { weighOptions, type Criterion, type Weighting } from '#sim-core/index.ts';
import { formatNumber } from '#app/lib/formats.ts';
import type { ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';
import { listed, soonest } from '#sim-core/compare/summary-words.ts';
import { criteriaOf, type NamedCriterion } from './criteria.ts';

const percent = (share: number) => formatNumber(100 * share, 0);

/** One number for those who want it: a ranking by weights, and how far each can move before another comes first. */
export function WeightsBox({ figures }: { figures: ComparisonFigures }) {
  const criteria = criteriaOf(figures);
  const [weights, setWeights] = useState<readonly number[]>([]);
  const id = useId();
  const weighed = criteria.map((criterion, i): NamedCriterion & Criterion => ({
    ...criterion,
    weight: weights[i] ?? 50,
  }));
  const some = weighed.some(({ weight }) => weight > 0);
  const result = some ? weighOptions(weighed) : undefined;
  const names = figures.outlooks[0].options.map((option) => option.name);
  const firsts = result ? result.ranking.filter((option) => result.places[option] === 1) : [];
  return (
    <section aria-label="Weights">
      <b>Weights</b>
      <p className="text-note text-ink-2">
        Each criterion runs from 0 for the worst option of this comparison to 100 for the best; options that
        the futures cannot tell apart get the same. A ranking says no more than its weights.
      </p>
      <div className="mt-1 grid gap-1">
        {weighed.map(({ name, weight, alike }, i) => {
          const room = firsts.length === 1 ? result?.room[i] : undefined;
          return (
            <div key={name} className="grid grid-cols-[minmax(0,1fr)_minmax(0,1fr)] items-center gap-x-3">
              <label htmlFor={`${id}-${i}`} className="text-[13px]">
                {name}
                <span className="block text-note text-ink-2">
                  {alike
                    ? 'the options cannot be told apart; all get the same'
                    : room &&
                      `now ${percent(room.share)} % of all weight; “${names[firsts[0]]}” stays first while it is between ${percent(room.low)} and ${percent(room.high)} %`}
                </span>
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
        <>
          <Ranking result={result} names={names} />
          <p className="mt-1.5 text-note text-ink-2">{bridgeWords(figures, firsts)}</p>
        </>
      ) : (
        <p role="alert" className="text-note text-danger">
          Give at least one criterion some weight.
        </p>
      )}
    </section>
  );
}

function Ranking({ result, names }: { result: Weighting; names: readonly string[] }) {
  return (
    <ul className="mt-2 text-[13.5px]">
      {result.ranking.map((option) => {
        const place = result.places[option];
        const shared = result.places.filter((other) => other === place).length > 1;
        return (
          <li
            key={option}
            className={`flex justify-between border-t border-rule-2 py-0.5 ${place === 1 ? 'font-bold' : ''}`}
          >
            <span>
              {place}
              {shared ? ' =' : '.'} {names[option]}
            </span>
            <span className="tabular-nums">{percent(result.scores[option])}</span>
          </li>
        );
      })}
    </ul>
  );
}

/** How the first of the ranking stands to what the sentence above the maps says; empty where both say the same. */
function bridgeWords({ outlooks: [first] }: ComparisonFigures, firsts: readonly number[]): string {
  if (first.pairs.length === 0) return '';
  const headline = soonest(first);
  if (headline.length === firsts.length && headline.every((option) => firsts.includes(option))) return '';
  const name = (option: number) => `“${first.options[option].name}”`;
  const untold = headline.length === first.options.length;
  return `The ranking puts ${listed(firsts.map(name))} first; ${
    untold
      ? 'by years to recovery alone no option can be told from the others'
      : `by years to recovery alone it is ${listed(headline.map(name))}`
  }. The ranking weighs the other criteria too, as set above${first.name ? `, under “${first.name}”` : ''}.`;
}
