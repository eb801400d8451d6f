import { Blank, BlankSelect } from '#app/components/blank.tsx';
import { SelectField, TextAreaField, TextField } from '#app/components/inputs.tsx';
import { howSure, type HowSure, type RateSource } from '#contract/plants.ts';
import type { BeliefLaw } from '#sim-core/spec/belief.ts';
import type { Parameter } from '#sim-core/spec/parameters.ts';
import { beliefForms, proposeBelief, type BeliefDraft } from './belief-draft.ts';

/** Says what is believed of a rate, how sure that is, and where it comes from. */
export function BeliefEditor(props: {
  rate: Parameter;
  value: number;
  belief: BeliefDraft | undefined;
  errors: Readonly<Record<string, string>> | undefined;
  source: RateSource | undefined;
  onBelief: (belief: BeliefDraft | undefined) => void;
  onSource: (source: RateSource | undefined) => void;
}) {
  const { rate, belief, errors, source } = props;
  const type = (name: string, text: string) =>
    belief && props.onBelief({ ...belief, typed: { ...belief.typed, [name]: text } });
  return (
    <fieldset className="mt-2 border-l-2 border-rule pl-3">
      <legend className="sr-only">What is known of {rate.label.toLowerCase()}</legend>
      <p className="flex flex-wrap items-baseline gap-x-1.5 gap-y-1 text-[13.5px]">
        <span>It is</span>
        <BlankSelect
          label={`${rate.label}: known as`}
          value={belief?.law ?? 'fixed'}
          onChange={(event) =>
            props.onBelief(
              event.target.value === 'fixed'
                ? undefined
                : proposeBelief(event.target.value as BeliefLaw, props.value, rate),
            )
          }
        >
          <option value="fixed">one value</option>
          {Object.entries(beliefForms)
            // A rate that may be negative has no logarithm.
            .filter(([law]) => law !== 'log-normal' || rate.min >= 0)
            .map(([law, { label }]) => (
              <option key={law} value={law}>
                {label}
              </option>
            ))}
        </BlankSelect>
        {belief &&
          belief.law !== 'values' &&
          beliefForms[belief.law].fields.map(({ name, label }) => (
            <span key={name} className="whitespace-nowrap">
              {label}{' '}
              <Blank
                label={`${rate.label}: ${label}`}
                inputMode="decimal"
                characters={6}
                value={belief.typed[name] ?? ''}
                error={errors?.[name]}
                onChange={(event) => type(name, event.target.value)}
              />
            </span>
          ))}
      </p>
      {belief?.law === 'values' && (
        <TextAreaField
          className="mt-1.5 max-w-[320px]"
          label={`${rate.label}: values from data`}
          hint="One a line, or between tabs or semicolons; 2 to 2000."
          rows={4}
          spellCheck={false}
          value={belief.typed.values}
          error={errors?.values}
          onChange={(event) => type('values', event.target.value)}
        />
      )}
      {errors && belief?.law !== 'values' && (
        <p role="alert" className="mt-1 text-note text-danger">
          {Object.values(errors).join(' ')}
        </p>
      )}
      <div className="mt-2 grid gap-x-4 gap-y-2 sm:grid-cols-[210px_minmax(0,1fr)]">
        <SelectField
          label="How sure"
          value={source?.sure ?? ''}
          onChange={(event) =>
            props.onSource(
              event.target.value === ''
                ? undefined
                : { source: '', ...source, sure: event.target.value as HowSure },
            )
          }
        >
          <option value="">starting value</option>
          {howSure.map((sure) => (
            <option key={sure} value={sure}>
              {sure}
            </option>
          ))}
        </SelectField>
        {source && (
          <TextField
            label="Where it comes from"
            value={source.source}
            maxLength={600}
            autoComplete="off"
            onChange={(event) => props.onSource({ ...source, source: event.target.value })}
          />
        )}
      </div>
    </fieldset>
  );
}
