import { useState, type ReactNode } from 'react';
import {
  wideParts,
  type BriefFacts,
  type BriefPart,
  type BriefPartText,
  type BriefText,
} from '#contract/brief-content.ts';
import { TextField } from '#app/components/inputs.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatDate } from '#app/lib/formats.ts';
import { movePart, withPart, withTitle } from '../brief-draft.ts';
import { AnswerBody, CautionsBody, CostBody, DecisionBody, MapsBody } from './part-bodies.tsx';
import { PartFrame } from './part-frame.tsx';
import { WrittenWords } from './written-words.tsx';

/** The page of a brief as it prints, on paper in both themes; with `onChange` it is written in place. */
export function BriefSheet(props: {
  text: BriefText;
  facts: BriefFacts;
  version: number;
  mapAddress: (option: number) => string;
  onChange?: ((make: (text: BriefText) => BriefText) => void) | undefined;
}) {
  const { text, facts, onChange } = props;
  const [said, setSaid] = useState('');
  const suggestedOf = (part: BriefPartText) => {
    const words = facts.suggested.parts.find((each) => each.part === part.part)?.words;
    return words === part.words ? undefined : words;
  };
  const bodies: Partial<Record<BriefPart, (words: ReactNode) => ReactNode>> = {
    answer: (words) => <AnswerBody facts={facts}>{words}</AnswerBody>,
    maps: (words) => (
      <MapsBody facts={facts} addressOf={props.mapAddress}>
        {words}
      </MapsBody>
    ),
    cost: (words) => <CostBody facts={facts}>{words}</CostBody>,
    decision: (words) => <DecisionBody facts={facts}>{words}</DecisionBody>,
    cautions: (words) => <CautionsBody facts={facts}>{words}</CautionsBody>,
  };
  const parts = onChange ? text.parts : text.parts.filter(({ shown }) => shown);
  return (
    <article
      aria-label="The page"
      className="printed-paper mx-auto w-full max-w-[820px] border border-rule px-4 py-6 text-[13.5px] leading-snug sm:px-10 sm:py-9"
    >
      <div className="flex flex-wrap justify-between gap-x-4 text-note text-ink-2">
        <span>{facts.teamName}</span>
        <span>
          Brief, version {props.version}, {formatDate(facts.madeAt)}
        </span>
      </div>
      <SheetTitle
        title={text.title}
        onChange={onChange && ((title) => onChange((now) => withTitle(now, title)))}
      />
      {facts.invented && <p className="text-note text-ink-2">Invented place, people and data</p>}
      <div className="mt-3 grid gap-x-8 gap-y-4 md:grid-cols-2">
        {parts.map((part, i) => (
          <PartFrame
            key={part.part}
            part={part}
            wide={isWide(parts, i)}
            words={
              part.words === '' && onChange && !bodies[part.part] ? (
                <p className="my-1 text-ink-3">Nothing written yet.</p>
              ) : (
                <WrittenWords words={part.words} />
              )
            }
            deeds={
              onChange && {
                first: i === 0,
                last: i === parts.length - 1,
                suggested: suggestedOf(part),
                onChange: (change) => onChange((now) => withPart(now, part.part, change)),
                onMove: (by) => {
                  onChange((now) => movePart(now, part.part, by));
                  setSaid(`${part.heading} is now part ${i + 1 + by} of ${parts.length}.`);
                },
              }
            }
          >
            {bodies[part.part] ?? ((words) => words)}
          </PartFrame>
        ))}
      </div>
      <p role="status" className="sr-only">
        {said}
      </p>
    </article>
  );
}

/** Wide by nature, or alone in its row: as the PDF sets them. */
function isWide(parts: readonly BriefPartText[], at: number): boolean {
  const narrow = (i: number) =>
    parts[i] !== undefined && parts[i].shown && !wideParts.includes(parts[i].part);
  if (!narrow(at)) return true;
  let before = 0;
  while (narrow(at - before - 1)) before++;
  return before % 2 === 0 && !narrow(at + 1);
}

function SheetTitle(props: { title: string; onChange?: ((title: string) => void) | undefined }) {
  const [writing, setWriting] = useState(false);
  const { onChange } = props;
  if (onChange && writing)
    return (
      <form
        className="flex items-end gap-3 py-2"
        onSubmit={(event) => {
          event.preventDefault();
          setWriting(false);
        }}
      >
        <TextField
          label="Title"
          className="min-w-0 flex-1"
          autoFocus
          maxLength={160}
          value={props.title}
          onChange={(event) => onChange(event.target.value)}
        />
        <WordButton lined onClick={() => setWriting(false)}>
          done
        </WordButton>
      </form>
    );
  return (
    <div className="flex flex-wrap items-baseline justify-between gap-x-4 py-1">
      <h1
        className={`min-w-0 text-[26px] leading-tight font-bold break-words ${onChange ? 'cursor-text hover:bg-sheet' : ''}`}
        onClick={() => {
          if (onChange && window.getSelection()?.toString() === '') setWriting(true);
        }}
      >
        {props.title || 'No title'}
      </h1>
      {onChange && (
        <WordButton lined aria-label="Write the title" onClick={() => setWriting(true)}>
          write
        </WordButton>
      )}
    </div>
  );
}
