import { useMemo } from 'react';
import type { Outlook } from '#contract/outlooks.ts';
import { Blank, BlankSelect } from '#app/components/blank.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import { drawnErrors, type DrawnDraft, type DrawnKind } from './drawn-draft.ts';
import { exampleFutures } from './example-futures.ts';
import { FuturesStrip } from './futures-strip.tsx';

const kinds: Record<DrawnKind, string> = {
  listed: 'has the years drawn here',
  renewal: 'draws droughts that come back',
  series: 'reads these years on from a drawn one',
  'palmer-type': 'draws weather that remembers',
};

/** Weather of ensembles: what each future draws for itself, as a sentence, with examples of it. */
export function DrawnWeatherSection(props: {
  draft: DrawnDraft;
  onChange: (change: Partial<DrawnDraft>) => void;
  editable: boolean;
  /** undefined while something is wrong */
  outlook: Outlook | undefined;
  /** index below which a year kills on open marsh */
  tolerance: number;
}) {
  const { draft, editable, outlook, tolerance } = props;
  const errors = drawnErrors(draft);
  const examples = useMemo(() => outlook && exampleFutures(outlook, tolerance), [outlook, tolerance]);
  const blank = (name: Exclude<keyof DrawnDraft, 'kind'>, label: string) => (
    <Blank
      label={label}
      inputMode="decimal"
      characters={5}
      value={draft[name]}
      error={errors[name]}
      disabled={!editable}
      onChange={(event) => props.onChange({ [name]: event.target.value })}
    />
  );
  return (
    <section aria-labelledby="drawn-weather" className="mb-4 border-y border-rule py-3 text-[13.5px]">
      <h2 id="drawn-weather" className="text-lead">
        In ensembles
      </h2>
      <p className="mt-1 leading-[2]">
        Each future{' '}
        <BlankSelect
          label="Weather of each future of an ensemble"
          value={draft.kind}
          disabled={!editable}
          onChange={(event) => props.onChange({ kind: event.target.value as DrawnKind })}
        >
          {Object.entries(kinds).map(([kind, words]) => (
            <option key={kind} value={kind}>
              {words}
            </option>
          ))}
        </BlankSelect>
        {draft.kind === 'renewal' && (
          <>
            : every {blank('returnYears', 'Mean years from one drought to the next')} years on average, the
            latest {blank('sinceLatest', 'Years since the latest drought began')} years ago; each lasts{' '}
            {blank('length', 'Years that a drought lasts')} years at an index of{' '}
            {blank('depth', 'Index in a drought')} ± {blank('depthSpread', 'Spread of that index')}, other
            years have {blank('between', 'Index between droughts')}
          </>
        )}
        {draft.kind === 'palmer-type' && (
          <>
            : around {blank('mean', 'Long-run mean of the index')} with a standard deviation of{' '}
            {blank('standardDeviation', 'Long-run standard deviation of the index')}
          </>
        )}
        .
      </p>
      {Object.values(errors).length > 0 && (
        <p role="alert" className="text-note text-danger">
          {Object.values(errors).join('. ')}.
        </p>
      )}
      {draft.kind === 'listed' ? (
        <p className="text-note text-ink-2">
          All futures then differ by luck alone, and a drought that is listed comes in every one of them.
        </p>
      ) : (
        examples &&
        outlook && (
          <>
            <FuturesStrip {...examples} tolerance={tolerance} firstYear={outlook.surveyYear + 1} />
            <p className="text-note text-ink-2">
              In {Math.round(100 * examples.anyKilling)} of 100 such futures at least one year is dry enough
              to kill on open marsh (below {formatNumber(tolerance)}). Options that are compared share the
              same futures.
            </p>
          </>
        )
      )}
    </section>
  );
}
