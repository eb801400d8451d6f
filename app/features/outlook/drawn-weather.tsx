import type { Outlook } from '#contract/outlooks.ts';
import { Blank, BlankSelect } from '#app/components/blank.tsx';
import type { DrawnFutures } from '#sim-core/weather/drawn-futures.ts';
import { formatNumber } from '#app/lib/formats.ts';
import {
  drawnErrors,
  hasShape,
  type Blank as Field,
  type DrawnDraft,
  type DrawnKind,
  type LawName,
} from './drawn-draft.ts';
import { FuturesStrip } from './futures-strip.tsx';
import { KillingChanceFigure } from './killing-chance.tsx';

const kinds: Record<DrawnKind, string> = {
  listed: 'has the years drawn here',
  renewal: 'draws droughts that come back',
  series: 'reads these years on from a drawn one',
  'palmer-type': 'draws weather that remembers',
};

const lawWords: Record<LawName, string> = {
  fixed: 'always as many',
  exponential: 'by an exponential law',
  weibull: 'by a Weibull law',
  gamma: 'by a gamma law',
};

/** Weather of ensembles: what each future draws for itself, as a sentence, with examples of it. */
export function DrawnWeatherSection(props: {
  draft: DrawnDraft;
  onChange: (change: Partial<DrawnDraft>) => void;
  editable: boolean;
  /** undefined while something is wrong */
  outlook: Outlook | undefined;
  /** undefined until the first are drawn */
  futures: DrawnFutures | undefined;
  /** index below which a year kills on open marsh */
  tolerance: number;
}) {
  const { draft, editable, outlook, futures, tolerance } = props;
  const errors = drawnErrors(draft);
  const law = (name: 'returnLaw' | 'lengthLaw', label: string) => (
    <BlankSelect
      label={label}
      value={draft[name]}
      disabled={!editable}
      onChange={(event) => props.onChange({ [name]: event.target.value as LawName })}
    >
      {Object.entries(lawWords).map(([key, words]) => (
        <option key={key} value={key}>
          {words}
        </option>
      ))}
    </BlankSelect>
  );
  const blank = (name: Field, label: string) => (
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
    <section aria-labelledby="drawn-weather" className="mb-4 border-t border-rule pt-3 text-[13.5px]">
      <h2 id="drawn-weather" className="text-lead">
        In runs and ensembles
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
            : every {blank('returnYears', 'Mean years from one drought to the next')} years on average,{' '}
            {law('returnLaw', 'Law of the years from one drought to the next')}
            {hasShape(draft.returnLaw) && <> of shape {blank('returnShape', 'Shape of that law')}</>}, the
            latest {blank('sinceLatest', 'Years since the latest drought began')} years ago; each lasts{' '}
            {blank('length', 'Years that a drought lasts, on average')} years,{' '}
            {law('lengthLaw', 'Law of the length of a drought')}
            {hasShape(draft.lengthLaw) && (
              <> of shape {blank('lengthShape', 'Shape of the law of lengths')}</>
            )}
            , at an index of {blank('depth', 'Index in a drought')} ±{' '}
            {blank('depthSpread', 'Spread of that index')}, other years have{' '}
            {blank('between', 'Index between droughts')}
          </>
        )}
        {draft.kind === 'palmer-type' && (
          <>
            : around {blank('mean', 'Long-run mean of the index')} with a standard deviation of{' '}
            {blank('standardDeviation', 'Long-run standard deviation of the index')}; a year hands on{' '}
            {blank('memory', 'Share of the index that a year hands on to the next')} of its index
            {draft.start !== undefined && `, the first from ${formatNumber(draft.start)} at the survey`}
          </>
        )}
        .
      </p>
      {Object.values(errors).length > 0 && (
        <p role="alert" className="text-note text-danger">
          {Object.values(errors).join('. ')}.
        </p>
      )}
      {draft.kind === 'series' && (
        <p className="text-note text-ink-2">
          {draft.record
            ? `It is the drought record, ${draft.record[0].year} to ${draft.record[draft.record.length - 1].year}.`
            : 'They are the years drawn on this page.'}
        </p>
      )}
      {draft.kind === 'listed' && (
        <p className="text-note text-ink-2">
          All futures then differ by luck alone, and a drought that is listed comes in every one of them.
        </p>
      )}
      {draft.kind !== 'listed' && outlook && futures && (
        <>
          <KillingChanceFigure futures={futures} firstYear={outlook.surveyYear + 1} />
          <FuturesStrip
            examples={futures.examples}
            tolerance={tolerance}
            firstYear={outlook.surveyYear + 1}
          />
          <p className="text-note text-ink-2">
            On the drawing, nine of ten futures run in the shaded band, and the dotted line is their median.
            Options that are compared share the same futures.
          </p>
        </>
      )}
      {draft.kind !== 'listed' && outlook && !futures && (
        <p role="status" className="text-note text-ink-2">
          Drawing a thousand futures.
        </p>
      )}
    </section>
  );
}
