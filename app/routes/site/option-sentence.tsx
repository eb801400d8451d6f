import { moundCaution } from '#contract/grid-cautions.ts';
import { ProblemNotice } from '#app/components/notice.tsx';
import { AreaSentence } from '#app/features/options/board/area-sentence.tsx';
import type { BoardPens } from '#app/features/options/board/board-pens.ts';
import { isAreaTool, isPattern, type PatternTool } from '#app/features/options/board/board-tools.ts';
import { MoundBlanks } from '#app/features/options/board/mound-blanks.tsx';
import { PatternBlanks } from '#app/features/options/board/pattern-sentence.tsx';
import { NumberBlank, Sentence } from '#app/features/options/board/sentence.tsx';
import type { DrawingBoard } from '#app/features/options/board/use-board.ts';
import { readMound } from '#app/features/options/mound-pen.ts';
import { useSite } from './use-site.ts';

interface OptionSentenceProps {
  readonly pens: BoardPens;
  readonly board: DrawingBoard;
  /** ISO 4217; undefined where no costs are set */
  readonly currency: string | undefined;
}

/** What the tool in use does, as blanks in a sentence. */
export function OptionSentence(props: OptionSentenceProps) {
  const { pens, board } = props;
  const { tool, errors, missed, onPens } = board;
  if (isAreaTool(tool))
    return (
      <AreaSentence
        {...{ tool, errors, missed }}
        pen={pens.area}
        year={pens.year}
        onPen={(area) => onPens({ ...pens, area })}
        onYear={(year) => onPens({ ...pens, year })}
      />
    );
  if (isPattern(tool)) return <PatternSentence {...props} tool={tool} />;
  if (tool === 'mound')
    return (
      <>
        <Sentence errors={errors} missed={missed}>
          <span>A press places a mound</span>
          <MoundBlanks pen={pens.mound} errors={errors} onChange={(mound) => onPens({ ...pens, mound })} />
          <YearBlank {...props} />
        </Sentence>
        <MoundOnCells {...props} />
      </>
    );
  return (
    <p className="flex min-h-6 items-center text-[13.5px] text-ink-2">
      {tool === 'box'
        ? 'Drag a box around works, or press two of its corners.'
        : 'Press works to select them, with Shift several; drag them, or use the arrow keys; Delete removes them.'}
    </p>
  );
}

/** What the cells make of the mound that the sentence describes, where they do not hold its shape. */
function MoundOnCells({ pens }: OptionSentenceProps) {
  const { site } = useSite();
  const { mound } = readMound(pens.mound);
  const caution = mound && moundCaution({ radius: mound.radius }, site.grid);
  return caution === undefined ? null : (
    <p role="status" className="mt-0.5 text-note text-ink-2">
      {caution}
    </p>
  );
}

function YearBlank({ pens, board }: OptionSentenceProps) {
  return (
    <>
      <span>in</span>
      <NumberBlank
        label="Year in which it is placed"
        value={pens.year}
        error={board.errors.year}
        onChange={(year) => board.onPens({ ...pens, year })}
      />
    </>
  );
}

function PatternSentence(props: OptionSentenceProps & { readonly tool: PatternTool }) {
  const { tool, pens, board, currency } = props;
  const { errors, laying, missed, onPens } = board;
  const pen = pens.patterns[tool];
  return (
    <>
      <Sentence errors={errors} missed={missed}>
        <PatternBlanks
          {...{ tool, pen, errors, currency }}
          onChange={(next) => onPens({ ...pens, patterns: { ...pens.patterns, [tool]: next } })}
        />
        <YearBlank {...props} />
        {laying.ofMounds && (
          <>
            <span className="ml-2">Each</span>
            <MoundBlanks pen={pens.mound} errors={errors} onChange={(mound) => onPens({ ...pens, mound })} />
          </>
        )}
      </Sentence>
      {laying.ofMounds && <MoundOnCells {...props} />}
      {laying.error && !laying.busy ? (
        <ProblemNotice error={laying.error} title="The pattern could not be laid." />
      ) : (
        !laying.ready && (
          <p className="text-note text-ink-2">
            Patterns need the ground: habitat with its classes, and cover.
          </p>
        )
      )}
    </>
  );
}
