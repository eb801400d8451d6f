import { useState, type ReactNode } from 'react';
import type { BriefPartText } from '#contract/brief-content.ts';
import { TextAreaField, TextField } from '#app/components/inputs.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { classNames } from '#app/lib/class-names.ts';

export interface PartDeeds {
  readonly first: boolean;
  readonly last: boolean;
  /** the words that the figures suggest, where these are others */
  readonly suggested: string | undefined;
  onChange: (change: Partial<Omit<BriefPartText, 'part'>>) => void;
  onMove: (by: -1 | 1) => void;
}

/** A part of the page: its heading and what stands in it; with `deeds` it is written in place and moved. */
export function PartFrame(props: {
  part: BriefPartText;
  wide: boolean;
  deeds?: PartDeeds | undefined;
  /** the words as they print, to be placed among what was computed */
  children: (words: ReactNode) => ReactNode;
  words: ReactNode;
}) {
  const { part, deeds } = props;
  const [writing, setWriting] = useState(false);
  const words =
    writing && deeds ? (
      <PartWriting part={part} deeds={deeds} onDone={() => setWriting(false)} />
    ) : (
      props.words
    );
  const clickable = deeds && !writing;
  return (
    <section
      aria-label={part.heading}
      className={classNames('min-w-0 border-t border-ink pt-1.5', props.wide ? 'md:col-span-2' : '')}
    >
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <h2 className="text-[15px] font-bold">{part.heading}</h2>
        {deeds && (
          <div
            className="flex flex-wrap items-baseline gap-x-2.5 text-ink-2"
            role="group"
            aria-label={`${part.heading}, on this page`}
          >
            <WordButton
              aria-label={`Move ${part.heading} up`}
              disabled={deeds.first}
              onClick={() => deeds.onMove(-1)}
            >
              up
            </WordButton>
            <WordButton
              aria-label={`Move ${part.heading} down`}
              disabled={deeds.last}
              onClick={() => deeds.onMove(1)}
            >
              down
            </WordButton>
            {part.part !== 'cautions' && (
              <WordButton
                aria-label={`${part.shown ? 'Leave out' : 'Print'} ${part.heading}`}
                onClick={() => deeds.onChange({ shown: !part.shown })}
              >
                {part.shown ? 'leave out' : 'print'}
              </WordButton>
            )}
            <WordButton
              lined
              aria-label={`${writing ? 'Done with' : 'Write'} ${part.heading}`}
              onClick={() => setWriting(!writing)}
            >
              {writing ? 'done' : 'write'}
            </WordButton>
          </div>
        )}
      </div>
      {!part.shown && <p className="text-note">Left out of the printed page.</p>}
      {part.shown || writing
        ? props.children(
            clickable ? (
              // The button “write” does the same from the keyboard.
              <div
                className="cursor-text rounded-edge hover:bg-sheet"
                onClick={() => {
                  if (window.getSelection()?.toString() === '') setWriting(true);
                }}
              >
                {words}
              </div>
            ) : (
              words
            ),
          )
        : null}
    </section>
  );
}

function PartWriting(props: { part: BriefPartText; deeds: PartDeeds; onDone: () => void }) {
  const { part, deeds } = props;
  return (
    <div
      className="grid gap-2 py-2"
      onKeyDown={(event) => {
        if (event.key === 'Escape') props.onDone();
      }}
    >
      <TextField
        label="Heading"
        value={part.heading}
        maxLength={80}
        onChange={(event) => deeds.onChange({ heading: event.target.value })}
      />
      <TextAreaField
        label="Words"
        autoFocus
        rows={Math.min(14, 2 + Math.ceil(part.words.length / 70) + part.words.split('\n').length)}
        maxLength={3000}
        value={part.words}
        hint="A line that begins with a hyphen becomes an item of a list."
        onChange={(event) => deeds.onChange({ words: event.target.value })}
      />
      {deeds.suggested !== undefined && (
        <div>
          <WordButton lined onClick={() => deeds.onChange({ words: deeds.suggested ?? '' })}>
            Put back what the figures say
          </WordButton>
        </div>
      )}
    </div>
  );
}
