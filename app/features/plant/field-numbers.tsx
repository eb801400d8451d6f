import { Blank } from '#app/components/blank.tsx';
import {
  fieldNumberErrors,
  fieldNumbersOf,
  fieldNumberWords,
  type FieldNumbersDraft,
} from './field-numbers-draft.ts';
import { verdictOf, verdictWords } from './field-verdict.ts';
import type { ImpliedDraws } from './implied-draws.ts';

/** What was measured in the field, beside what the rates imply. */
export function FieldNumbers(props: {
  draft: FieldNumbersDraft;
  implied: ImpliedDraws | undefined;
  editable: boolean;
  onChange: (draft: FieldNumbersDraft) => void;
}) {
  const { draft, implied, editable } = props;
  const errors = fieldNumberErrors(draft);
  const known = fieldNumbersOf(draft);
  const bands = {
    frontSpeed: implied?.speeds?.[0].speed,
    yearsToHalf: implied?.yearsToHalf,
  };
  return (
    <div>
      {(Object.keys(fieldNumberWords) as (keyof FieldNumbersDraft)[]).map((name) => {
        const { label, unit } = fieldNumberWords[name];
        const [measured, band, error] = [known[name], bands[name], errors[name]];
        const type = (part: 'value' | 'plusMinus', text: string) =>
          props.onChange({ ...draft, [name]: { ...draft[name], [part]: text } });
        return (
          <div key={name} className="mb-2">
            <p className="flex flex-wrap items-baseline gap-x-1.5 text-[13.5px]">
              <span>{label}</span>
              <Blank
                label={`${label}, ${unit}`}
                inputMode="decimal"
                characters={5}
                value={draft[name].value}
                error={error}
                readOnly={!editable}
                onChange={(event) => type('value', event.target.value)}
              />
              <span>±</span>
              <Blank
                label={`${label}: plus or minus, ${unit}`}
                inputMode="decimal"
                characters={4}
                value={draft[name].plusMinus}
                error={error}
                readOnly={!editable}
                onChange={(event) => type('plusMinus', event.target.value)}
              />
              <span>{unit}.</span>
            </p>
            {error ? (
              <p role="alert" className="text-note text-danger">
                {error}
              </p>
            ) : (
              measured &&
              band && (
                <p
                  role="status"
                  className={`text-note ${verdictOf(band, measured) === 'agrees' ? 'text-ink-2' : 'font-semibold'}`}
                >
                  {verdictWords(band, measured, name === 'frontSpeed' ? 'speed' : 'time')}
                </p>
              )
            )}
          </div>
        );
      })}
    </div>
  );
}
