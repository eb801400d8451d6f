import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Layer } from '#contract/layers.ts';
import { Blank } from '#app/components/blank.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { changeLayerMutation } from './change-layer.ts';

/** A year of four digits as a blank; it is told when the blank is left or Enter is pressed. */
export function YearBlank(props: {
  label: string;
  /** null: nobody has said yet */
  year: number | null;
  disabled?: boolean;
  onYear: (year: number) => void;
}) {
  const { year } = props;
  const [typed, setTyped] = useState<string>();
  const text = (typed ?? year?.toString() ?? '').trim();
  const right = /^[1-9]\d{3}$/.test(text);
  const tell = () => {
    if (right && Number(text) !== year) props.onYear(Number(text));
    if (right) setTyped(undefined);
  };
  return (
    <Blank
      label={props.label}
      inputMode="numeric"
      placeholder="year"
      characters={5}
      disabled={props.disabled}
      value={typed ?? year?.toString() ?? ''}
      error={typed !== undefined && text !== '' && !right ? 'A year of four digits' : undefined}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={tell}
      onKeyDown={(event) => {
        if (event.key === 'Enter') {
          event.preventDefault();
          tell();
        }
      }}
    />
  );
}

/** The year of a resurvey, as a blank in a sentence. */
export function YearChoice({ siteId, layer, editable }: { siteId: string; layer: Layer; editable: boolean }) {
  const change = useMutation(changeLayerMutation(useQueryClient(), siteId, layer.id));
  if (!editable) return null;
  return (
    <>
      <p>
        Surveyed in{' '}
        <YearBlank
          key={layer.year}
          label="Year of the resurvey"
          year={change.isPending ? (change.variables.year ?? layer.year) : layer.year}
          disabled={change.isPending}
          onYear={(year) => change.mutate({ year })}
        />
        .
      </p>
      {change.error && <ProblemNotice error={change.error} className="mt-1" />}
    </>
  );
}
