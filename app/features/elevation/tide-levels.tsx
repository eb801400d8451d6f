import type { TidalDatum } from '#contract/layers.ts';
import { NumberBlank } from '#app/components/number-blank.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import type { ElevationEvent } from './curve-draft.ts';
import { metres } from './curve-words.ts';
import { nextLevel, usualDatums } from './starting-curves.ts';

const mostDatums = 12;

/** Levels of the tide that are drawn beside the curves. They guide the eye; the engine does not read them. */
export function TideLevels(props: {
  datums: readonly TidalDatum[];
  /** where a new one stands until somebody says, m */
  startAt: number;
  editable: boolean;
  tell: (event: ElevationEvent) => void;
}) {
  const { datums, editable, tell } = props;
  const set = (i: number, change: Partial<TidalDatum>) =>
    tell({
      type: 'datums',
      datums: datums.map((datum, j) => (i === j ? { ...datum, ...change } : datum)),
      gesture: `level ${i} ${Object.keys(change).join()}`,
    });
  const next = usualDatums.find((name) => datums.every((datum) => datum.name !== name)) ?? '';
  return (
    <div className="mt-2">
      <h3 className="text-note font-semibold text-ink-2">Levels of the tide, as guides</h3>
      {datums.length === 0 && <p className="text-note text-ink-2">None yet.</p>}
      <ul>
        {datums.map(({ name, height }, i) => (
          <li key={i} className="flex flex-wrap items-baseline gap-x-2 border-t border-rule-2 py-0.5">
            {editable ? (
              <>
                <input
                  aria-label={`Name of level ${i + 1}`}
                  aria-invalid={name.trim() === '' || undefined}
                  maxLength={60}
                  value={name}
                  onChange={(event) => set(i, { name: event.target.value })}
                  className="h-7 touch:h-11 min-w-0 flex-1 border-0 border-b-[1.5px] border-ink bg-transparent px-1 text-[13px] hover:bg-sheet aria-invalid:border-b-[3px] aria-invalid:border-danger"
                />
                <span className="whitespace-nowrap">
                  <NumberBlank
                    label={`Height of ${name || `level ${i + 1}`}, m`}
                    value={height}
                    least={-100}
                    most={100}
                    characters={5}
                    onValue={(value) => set(i, { height: value })}
                  />{' '}
                  m
                </span>
                <WordButton
                  onClick={() => tell({ type: 'datums', datums: datums.filter((_, j) => j !== i) })}
                >
                  remove<span className="sr-only"> {name}</span>
                </WordButton>
              </>
            ) : (
              <span>
                {name}, {metres(height)}
              </span>
            )}
          </li>
        ))}
      </ul>
      {editable && datums.length < mostDatums && (
        <WordButton
          lined
          onClick={() =>
            tell({
              type: 'datums',
              datums: [...datums, { name: next, height: nextLevel(datums, props.startAt) }],
            })
          }
        >
          Add a level
        </WordButton>
      )}
    </div>
  );
}
