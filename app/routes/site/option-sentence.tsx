import { AreaSentence } from '#app/features/options/board/area-sentence.tsx';
import type { AreaErrors } from '#app/features/options/board/area-pen.ts';
import type { BoardPens } from '#app/features/options/board/board-pens.ts';
import { isAreaTool, type BoardTool } from '#app/features/options/board/board-tools.ts';
import { MoundBlanks } from '#app/features/options/board/mound-blanks.tsx';
import { NumberBlank, Sentence } from '#app/features/options/board/sentence.tsx';
import { SketchWords } from '#app/features/options/board/sketch-words.tsx';
import type { Board } from '#app/features/options/board/use-board-tool.ts';
import type { MoundErrors } from '#app/features/options/mound-pen.ts';

/** What the tool in use does, as blanks in a sentence. */
export function OptionSentence(props: {
  tool: BoardTool;
  pens: BoardPens;
  board: Board;
  errors: MoundErrors & AreaErrors;
  missed: number;
  onPens: (pens: BoardPens) => void;
}) {
  const { tool, pens, board, errors, missed, onPens } = props;
  const setYear = (year: string) => onPens({ ...pens, year });
  if (isAreaTool(tool))
    return (
      <>
        <AreaSentence
          {...{ tool, errors, missed }}
          pen={pens.area}
          year={pens.year}
          onPen={(area) => onPens({ ...pens, area })}
          onYear={setYear}
        />
        <SketchWords sketch={board.sketch} closed send={board.send} />
      </>
    );
  if (tool === 'mound')
    return (
      <Sentence errors={errors} missed={missed}>
        <span>A press places a mound</span>
        <MoundBlanks pen={pens.mound} errors={errors} onChange={(mound) => onPens({ ...pens, mound })} />
        <span>m, in</span>
        <NumberBlank
          label="Year in which it is placed"
          value={pens.year}
          error={errors.year}
          onChange={setYear}
        />
      </Sentence>
    );
  return (
    <p className="flex min-h-6 items-center text-[13.5px] text-ink-2">
      {tool === 'box'
        ? 'Drag a box around works, or press two of its corners.'
        : 'Press works to select them, with Shift several; drag them, or use the arrow keys; Delete removes them.'}
    </p>
  );
}
