import { useState } from 'react';
import { Blank, BlankSelect } from '#app/components/blank.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { parseNumber } from '#app/lib/parse-number.ts';
import type { Boundary, StepsPerYear } from '#sim-core/spec/run-spec.ts';
import { draftErrors, type OutlookDraft, type OutlookEvent } from './outlook-draft.ts';

const steps: readonly { value: StepsPerYear; label: string }[] = [
  { value: 1, label: 'yearly' },
  { value: 2, label: 'half-yearly' },
  { value: 4, label: 'quarterly' },
  { value: 12, label: 'monthly' },
];
const boundaries: Record<Boundary, string> = {
  mirror: 'the ground goes on as it is',
  bare: 'bare ground begins',
};

/** The outlook's settings as blanks in a sentence. */
export function OutlookSentence(props: {
  draft: OutlookDraft;
  tell: (event: OutlookEvent) => void;
  editable: boolean;
  onSeries: () => void;
}) {
  const { draft, tell, editable } = props;
  const errors = draftErrors(draft);
  const [constant, setConstant] = useState('0');
  const index = parseNumber(constant);
  const fits = index !== undefined && Math.abs(index) <= 15;
  const { surveyYear, years } = draft.span;
  const messages = Object.values(errors);
  return (
    <>
      <div className="flex flex-wrap items-center gap-x-7 gap-y-1 text-[13.5px] leading-[2]">
        <p>
          The survey shows the end of{' '}
          <Blank
            label="Year of the survey"
            inputMode="numeric"
            characters={5}
            value={draft.surveyYear}
            error={errors.surveyYear}
            disabled={!editable}
            onChange={(event) => tell({ type: 'surveyYear', text: event.target.value })}
          />
          ; simulate{' '}
          <Blank
            label="Years to simulate"
            inputMode="numeric"
            characters={4}
            value={draft.years}
            error={errors.years}
            disabled={!editable}
            onChange={(event) => tell({ type: 'years', text: event.target.value })}
          />{' '}
          years, to the end of {surveyYear + years}, in{' '}
          <BlankSelect
            label="Steps a year"
            value={draft.stepsPerYear}
            disabled={!editable}
            onChange={(event) =>
              tell({ type: 'stepsPerYear', value: Number(event.target.value) as StepsPerYear })
            }
          >
            {steps.map(({ value, label }) => (
              <option key={value} value={value}>
                {label}
              </option>
            ))}
          </BlankSelect>{' '}
          steps; at the edge of the site{' '}
          <BlankSelect
            label="What lies beyond the edge of the site"
            value={draft.boundary}
            disabled={!editable}
            onChange={(event) => tell({ type: 'boundary', value: event.target.value as Boundary })}
          >
            {Object.entries(boundaries).map(([value, label]) => (
              <option key={value} value={value}>
                {label}
              </option>
            ))}
          </BlankSelect>
          .
        </p>
        {editable && (
          <p className="flex flex-wrap items-center gap-x-4">
            <WordButton lined onClick={props.onSeries}>
              Paste or upload a series
            </WordButton>
            <span>
              <WordButton
                lined
                disabled={!fits}
                onClick={() => {
                  if (index !== undefined) tell({ type: 'constant', value: index });
                }}
              >
                Set every year
              </WordButton>{' '}
              to{' '}
              <Blank
                label="Index for every year"
                characters={5}
                value={constant}
                error={fits ? undefined : 'A number from −15 to 15 is expected'}
                onChange={(event) => setConstant(event.target.value)}
              />
            </span>
          </p>
        )}
      </div>
      {messages.length > 0 && (
        <p role="alert" className="text-note text-danger">
          {messages.join('. ')}.
        </p>
      )}
    </>
  );
}
