import { useState } from 'react';
import { Blank } from '#app/components/blank.tsx';

/**
 * A blank that is taken when it is left or confirmed, and put back by Escape. Give it a key that changes with its value,
 * so that it follows what is changed elsewhere.
 */
export function EditedBlank(props: {
  label: string;
  value: string;
  /** an error in words, or undefined when the text was taken */
  onTake: (text: string) => string | undefined;
  words?: boolean;
  placeholder?: string;
  characters?: number;
}) {
  const [text, setText] = useState(props.value);
  const [error, setError] = useState<string>();
  const take = () => setError(text === props.value ? undefined : props.onTake(text));
  return (
    <>
      <Blank
        label={props.label}
        inputMode={props.words ? 'text' : 'decimal'}
        placeholder={props.placeholder}
        characters={props.characters}
        value={text}
        error={error}
        onChange={(event) => setText(event.target.value)}
        onBlur={take}
        onKeyDown={(event) => {
          if (event.key === 'Enter') take();
          if (event.key === 'Escape') {
            setText(props.value);
            setError(undefined);
          }
        }}
      />
      {error !== undefined && (
        <span role="alert" className="block max-w-[32ch] text-left text-note text-danger">
          {error}
        </span>
      )}
    </>
  );
}
