import { useState } from 'react';
import { Blank } from '#app/components/blank.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import type { DraftMound } from './option-draft.ts';
import { moundInWords, placeInWords } from './works-words.ts';

export interface MoundNoteProps {
  mound: DraftMound;
  /** its number in the table of works, from 1 */
  number: number;
  /** absent for those who only read */
  edit?: {
    /** an error in words, or undefined when the year was taken */
    onYear: (year: string) => string | undefined;
    onMove: () => void;
    onRemove: () => void;
  };
}

/** What a mound is, and what can be done with it: on the map at the end of a leader line, on a phone in the margin. */
export function MoundNote({ mound: { action }, number, edit }: MoundNoteProps) {
  const [dating, setDating] = useState<string>();
  const [error, setError] = useState<string>();
  const take = () => {
    if (dating === undefined) return;
    const wrong = edit?.onYear(dating);
    setError(wrong);
    if (wrong === undefined) setDating(undefined);
  };
  return (
    <>
      <b className="block text-body leading-tight">Mound {number}</b>
      <span className="block">placed in {action.year}</span>
      <span className="block">{moundInWords(action)}</span>
      <span className="block font-mono text-axis text-ink-2">{placeInWords(action)}</span>
      {edit && (
        <span className="mt-0.5 flex flex-wrap gap-x-3">
          <WordButton lined onClick={edit.onMove}>
            Move
          </WordButton>
          {dating === undefined ? (
            <WordButton lined onClick={() => setDating(String(action.year))}>
              Date
            </WordButton>
          ) : (
            <Blank
              label={`Year of mound ${number}`}
              inputMode="numeric"
              autoFocus
              value={dating}
              error={error}
              onChange={(event) => setDating(event.target.value)}
              onBlur={take}
              onKeyDown={(event) => {
                if (event.key === 'Enter') take();
                else if (event.key === 'Escape') setDating(undefined);
                else return;
                event.preventDefault();
                event.stopPropagation();
              }}
            />
          )}
          <WordButton lined onClick={edit.onRemove}>
            Remove
          </WordButton>
        </span>
      )}
      {error !== undefined && dating !== undefined && (
        <span role="alert" className="block text-danger">
          {error}
        </span>
      )}
    </>
  );
}
