import { useState } from 'react';
import { parseNumber } from '#app/lib/parse-number.ts';
import { Blank } from './blank.tsx';

/**
 * A number as a blank: tells of every number that may stand there while somebody types, and shows again what stands
 * when it is left with something else in it.
 */
export function NumberBlank(props: {
  label: string;
  value: number;
  least: number;
  most: number;
  characters?: number;
  disabled?: boolean;
  onValue: (value: number) => void;
}) {
  const { value, least, most } = props;
  const [typed, setTyped] = useState<string>();
  const read = (text: string) => {
    const number = parseNumber(text);
    return number !== undefined && number >= least && number <= most ? number : undefined;
  };
  return (
    <Blank
      label={props.label}
      inputMode="decimal"
      characters={props.characters}
      disabled={props.disabled}
      value={typed ?? String(value)}
      error={
        typed !== undefined && read(typed) === undefined ? `A number from ${least} to ${most}` : undefined
      }
      onChange={(event) => {
        setTyped(event.target.value);
        const number = read(event.target.value);
        if (number !== undefined) props.onValue(number);
      }}
      onBlur={() => setTyped(undefined)}
    />
  );
}
