import type { ReactNode } from 'react';
import { Blank } from '#app/components/blank.tsx';

/** A line of words and blanks, with what is wrong below it. */
export function Sentence(props: {
  children: ReactNode;
  errors: Readonly<Partial<Record<string, string>>>;
  /** presses on the map that placed nothing, since the sentence was last written on */
  missed: number;
}) {
  const wrong = [...new Set(Object.values(props.errors))].filter((words) => words !== undefined);
  // The alert is keyed by the press: another one is said again, although the words are the same.
  return (
    <div className="text-[13.5px]">
      <p className="flex flex-wrap items-baseline gap-x-1.5 gap-y-1">{props.children}</p>
      {wrong.length > 0 && (
        <p key={props.missed} role="alert" className="mt-0.5 text-note text-danger">
          {props.missed > 0 && <b>Nothing was placed. </b>}
          {wrong.join(' ')}
        </p>
      )}
    </div>
  );
}

/** A blank for a number; what was typed stays as it was typed. */
export function NumberBlank(props: {
  label: string;
  value: string;
  error: string | undefined;
  onChange: (text: string) => void;
}) {
  return (
    <Blank
      label={props.label}
      error={props.error}
      inputMode="decimal"
      value={props.value}
      onChange={(event) => props.onChange(event.target.value)}
    />
  );
}
