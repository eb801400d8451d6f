import { useState } from 'react';
import { Blank, BlankSelect } from '#app/components/blank.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { parseNumber } from '#app/lib/parse-number.ts';
import type { StudyMethod } from '#sim-core/matters/study-design.ts';
import { studySizes, type StudySettings } from './study-settings.ts';

const methods: Record<StudyMethod, { label: string; words: string }> = {
  'one-at-a-time': {
    label: 'One at a time',
    words:
      'Each rate goes through what is believed of it, the others stay at their medians. Quick, and blind to what rates do together.',
  },
  screening: {
    label: 'Screening',
    words:
      'Walks that move one factor at a time from many places (Morris 1991): few runs show which factors can be left aside.',
  },
  indices: {
    label: 'Indices',
    words:
      'Shares of the variance that each factor explains, alone and with others (Sobol’ 1993): many runs, with intervals.',
  },
};

/** How it is studied: the method, how large, and whether weather and chance count. */
export function StudyForm(props: {
  settings: StudySettings;
  disabled: boolean;
  onChange: (changes: Record<string, string | undefined>) => void;
}) {
  const { settings, disabled, onChange } = props;
  const { method, size, luck } = settings;
  const { least, most, unit } = studySizes[method];
  const [typed, setTyped] = useState<string>();
  const number = typed === undefined ? size : parseNumber(typed);
  const fits = number !== undefined && Number.isInteger(number) && number >= least && number <= most;
  const error = fits
    ? undefined
    : `Found “${typed}” ${unit}; a whole number from ${least} to ${most} is expected.`;
  return (
    <div>
      <WordChoice
        label="Method"
        options={Object.entries(methods).map(([key, { label }]) => ({
          key: key as StudyMethod,
          label,
          disabled,
        }))}
        value={method}
        onChange={(key) => {
          setTyped(undefined);
          onChange({ method: key, size: undefined });
        }}
      />
      <p className="mt-1 max-w-[72ch] text-note text-ink-2">{methods[method].words}</p>
      <p className="mt-1 flex flex-wrap items-baseline gap-x-1.5 gap-y-2 text-[14.5px] leading-loose">
        <span>{method === 'one-at-a-time' ? 'as a mean of' : 'with'}</span>
        <Blank
          label={`Number of ${unit}`}
          inputMode="numeric"
          characters={5}
          disabled={disabled}
          value={typed ?? String(size)}
          error={error}
          onChange={(event) => {
            setTyped(event.target.value);
            const value = parseNumber(event.target.value);
            if (value !== undefined && Number.isInteger(value) && value >= least && value <= most)
              onChange({ size: event.target.value });
          }}
          onBlur={() => {
            if (fits) setTyped(undefined);
          }}
        />
        <span>{method === 'one-at-a-time' ? 'futures, the same for each value' : `${unit},`}</span>
        {method !== 'one-at-a-time' && (
          <BlankSelect
            label="Weather and chance"
            disabled={disabled}
            value={luck ? 'factor' : 'common'}
            onChange={(event) => onChange({ luck: event.target.value === 'common' ? 'common' : undefined })}
          >
            <option value="factor">weather and chance as a factor of their own</option>
            <option value="common">all under the weather and chance of future 0</option>
          </BlankSelect>
        )}
      </p>
      {error && (
        <p role="alert" className="text-note text-danger">
          {error}
        </p>
      )}
    </div>
  );
}
