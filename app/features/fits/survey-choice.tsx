import { Link } from 'react-router-dom';
import type { Layer } from '#contract/layers.ts';
import { NumberBlank } from '#app/components/number-blank.tsx';
import { TextAreaField } from '#app/components/inputs.tsx';

/** What is chosen and typed about surveys. */
export interface SurveyDraft {
  /** hashes of resurveys that are left out */
  readonly left: ReadonlySet<string>;
  /** per cent of a map's covered area */
  readonly areaError: number;
  readonly areas: string;
  readonly fronts: string;
}
export const noSurveys: SurveyDraft = { left: new Set(), areaError: 5, areas: '', fronts: '' };

/** Which surveys a fit is made to: resurveys of the ground, a cover series, fronts. */
export function SurveyChoice(props: {
  siteId: string;
  surveyYear: number;
  resurveys: readonly Layer[];
  draft: SurveyDraft;
  areaProblems: readonly string[];
  frontProblems: readonly string[];
  onChange: (draft: SurveyDraft) => void;
}) {
  const { resurveys, surveyYear, draft, onChange } = props;
  const toggle = (hash: string) => {
    const left = new Set(draft.left);
    if (!left.delete(hash)) left.add(hash);
    onChange({ ...draft, left });
  };
  return (
    <section aria-label="Surveys">
      <h2 className="text-lead">What was found later</h2>
      <p className="mt-0.5 mb-2 max-w-[62ch] text-note text-ink-2">
        Runs start from the cover of {surveyYear} and are held against each later survey.
      </p>
      {resurveys.length === 0 ? (
        <p className="mb-3 max-w-[62ch]">
          No resurvey yet. <Link to={`/sites/${props.siteId}/ground`}>Add one on Ground</Link> as part{' '}
          <b>resurvey</b> with its year, or type what was measured below.
        </p>
      ) : (
        <fieldset className="mb-2">
          <legend className="text-[13px] font-semibold">Maps</legend>
          {resurveys.map(({ hash, year, source }) => (
            <label key={hash} className="flex min-h-7 items-center gap-2 touch:min-h-11">
              <input
                type="checkbox"
                className="size-4 accent-ink"
                checked={!draft.left.has(hash) && year! > surveyYear}
                disabled={year! <= surveyYear}
                onChange={() => toggle(hash)}
              />
              <span>
                <b>{year}</b>{' '}
                <span className="font-mono text-note wrap-anywhere text-ink-2">{source.fileName}</span>
                {year! <= surveyYear && (
                  <span className="text-note text-ink-2">, not later than the survey of {surveyYear}</span>
                )}
              </span>
            </label>
          ))}
          <p className="mt-1 text-[13.5px]">
            Their covered area is good to ±{' '}
            <NumberBlank
              label="Standard error of the covered area of maps, per cent"
              value={draft.areaError}
              least={0}
              most={50}
              characters={4}
              onValue={(areaError) => onChange({ ...draft, areaError })}
            />{' '}
            % (standard error).
          </p>
        </fieldset>
      )}
      <details className="mb-1" open={resurveys.length === 0 || draft.areas !== ''}>
        <summary className="min-h-7 cursor-pointer leading-7 font-semibold touch:min-h-11 touch:leading-[44px]">
          A cover series
        </summary>
        <TextAreaField
          className="max-w-[420px]"
          label="Year, covered area, ±; a line a year"
          rows={4}
          placeholder={`${surveyYear + 2}, 1250, 60\n${surveyYear + 4}, 14 %, 1 %`}
          hint="Area of the whole site in m², or per cent of the ground that can hold the plant. ± is a standard error and may be left out."
          value={draft.areas}
          error={props.areaProblems.join(' ') || undefined}
          onChange={(event) => onChange({ ...draft, areas: event.target.value })}
        />
      </details>
      <details open={draft.fronts !== ''}>
        <summary className="min-h-7 cursor-pointer leading-7 font-semibold touch:min-h-11 touch:leading-[44px]">
          Measured fronts
        </summary>
        <TextAreaField
          className="max-w-[420px]"
          label="From year, until year, m/yr, ±; a line a measurement"
          rows={3}
          placeholder={`${surveyYear}, ${surveyYear + 3}, 0.45, 0.1`}
          hint="Mean advance of all edges of the site; below 0 where they retreat."
          value={draft.fronts}
          error={props.frontProblems.join(' ') || undefined}
          onChange={(event) => onChange({ ...draft, fronts: event.target.value })}
        />
      </details>
    </section>
  );
}
