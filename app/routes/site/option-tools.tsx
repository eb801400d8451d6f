import type { Option } from '#contract/options.ts';
import { FlagSymbol } from '#app/components/symbols.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import type { MoundPen, PenErrors } from '#app/features/options/mound-pen.ts';
import { MoundSentence } from '#app/features/options/mound-sentence.tsx';
import type { DraftAction, OptionDraft } from '#app/features/options/option-draft.ts';

/** Tools in words, and the sentence that says what a click does. */
export function OptionTools(props: {
  option: Option;
  editable: boolean;
  mayDraw: boolean;
  tool: 'place' | 'look';
  pen: MoundPen;
  errors: PenErrors;
  missed: number;
  draft: OptionDraft;
  draw: (action: DraftAction) => void;
  asTable: boolean;
  onPen: (pen: MoundPen) => void;
  onTool: (tool: 'place' | 'look') => void;
  onTable: (asTable: boolean) => void;
}) {
  const { option, editable, draft, draw, tool, asTable } = props;
  return (
    <div className="grid gap-y-1">
      <div className="flex flex-wrap items-center gap-x-4">
        {editable && (
          <>
            <span className="hidden items-center gap-1.5 text-[13.5px] text-ink-2 sm:flex">
              <FlagSymbol /> Mounds
            </span>
            <WordChoice
              label="Tool"
              options={[
                { key: 'place', label: 'Place mounds' },
                { key: 'look', label: 'Select and move' },
              ]}
              value={tool}
              onChange={props.onTool}
            />
            <span aria-hidden="true" className="hidden h-5 border-l border-rule sm:block" />
            <WordButton disabled={draft.past.length === 0} onClick={() => draw({ type: 'undo' })}>
              Undo
            </WordButton>
            <WordButton disabled={draft.future.length === 0} onClick={() => draw({ type: 'redo' })}>
              Redo
            </WordButton>
          </>
        )}
        {!editable && (
          <span className="text-[13.5px] text-ink-2">
            {props.mayDraw
              ? `${option.name} stays as it is: it has no works. Add an option to draw on.`
              : 'Modellers, managers and admins draw options; you can look at them here.'}
          </span>
        )}
        <WordButton
          className="ml-auto"
          lined
          pressed={asTable || undefined}
          onClick={() => props.onTable(!asTable)}
        >
          {asTable ? 'Read as a map' : 'Read as a table'}
        </WordButton>
      </div>
      {editable && tool === 'place' && (
        <MoundSentence pen={props.pen} errors={props.errors} missed={props.missed} onChange={props.onPen} />
      )}
      {editable && tool === 'look' && (
        <p className="flex min-h-6 items-center text-[13.5px] text-ink-2">
          Press a flag for its note; drag it, or use the arrow keys; Delete removes it.
        </p>
      )}
    </div>
  );
}
