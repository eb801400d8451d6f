import { useState } from 'react';
import { Blank } from '#app/components/blank.tsx';

/** A name that is told when it is left, not letter by letter. */
export function DatumBlank(props: { label: string; datum: string; onDatum: (datum: string) => void }) {
  const [typed, setTyped] = useState(props.datum);
  const tell = () => {
    if (typed.trim() !== props.datum) props.onDatum(typed.trim());
  };
  return (
    <Blank
      label={props.label}
      value={typed}
      placeholder="a vertical datum"
      characters={Math.max(16, typed.length)}
      maxLength={100}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={tell}
      onKeyDown={(event) => {
        if (event.key === 'Enter') tell();
      }}
    />
  );
}
