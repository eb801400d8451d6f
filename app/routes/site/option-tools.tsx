import type { Option } from '#contract/options.ts';
import { WordButton } from '#app/components/word-button.tsx';
import type { BoardTool } from '#app/features/options/board/board-tools.ts';
import { ToolChoice, ToolList } from '#app/features/options/board/tool-choice.tsx';
import { useNarrow } from '#app/lib/use-media-query.ts';
import type { DraftAction, OptionDraft } from '#app/features/options/option-draft.ts';

/** Tools in words, steps back and forth, and what the map shows. */
export function OptionTools(props: {
  option: Option;
  editable: boolean;
  mayDraw: boolean;
  tool: BoardTool;
  snap: boolean;
  draft: OptionDraft;
  draw: (action: DraftAction) => void;
  asTable: boolean;
  /** undefined where there is no quick look */
  quickLook: boolean | undefined;
  onQuickLook: (shown: boolean) => void;
  onTool: (tool: BoardTool) => void;
  onSnap: (snap: boolean) => void;
  onTable: (asTable: boolean) => void;
}) {
  const { option, editable, draft, draw, tool, asTable } = props;
  const narrow = useNarrow();
  return (
    <div className="flex flex-wrap items-center gap-x-2.5">
      {editable && (
        <>
          {narrow ? (
            <ToolList tool={tool} onTool={props.onTool} />
          ) : (
            <ToolChoice tool={tool} onTool={props.onTool} />
          )}
          <span className="flex items-center gap-x-2.5">
            <WordButton
              pressed={props.snap}
              title="Points keep to the cells. Key on the map: K"
              onClick={() => props.onSnap(!props.snap)}
            >
              snap
            </WordButton>
            <WordButton
              disabled={draft.past.length === 0}
              title="Control and Z"
              onClick={() => draw({ type: 'undo' })}
            >
              Undo
            </WordButton>
            <WordButton
              disabled={draft.future.length === 0}
              title="Control, Shift and Z"
              onClick={() => draw({ type: 'redo' })}
            >
              Redo
            </WordButton>
          </span>
        </>
      )}
      {!editable && (
        <span className="text-[13.5px] text-ink-2">
          {props.mayDraw
            ? option.archived
              ? `${option.name} is in the archive. Bring it back (More) or copy it to draw on it.`
              : `${option.name} stays as it is: it has no works. Add an option to draw on.`
            : 'Modellers, managers and admins draw options; you can look at them here.'}
        </span>
      )}
      <span className="ml-auto" />
      {props.quickLook !== undefined && !asTable && (
        <WordButton
          lined
          pressed={props.quickLook}
          title="Colour the map by the year in which the ground closes, by growth alone"
          onClick={() => props.onQuickLook(!props.quickLook)}
        >
          Quick look
        </WordButton>
      )}
      <WordButton lined pressed={asTable || undefined} onClick={() => props.onTable(!asTable)}>
        {asTable ? (narrow ? 'Map' : 'Read as a map') : narrow ? 'Table' : 'Read as a table'}
      </WordButton>
    </div>
  );
}
