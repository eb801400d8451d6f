import type { ReactNode } from 'react';
import { isAreaTool, isPattern } from '#app/features/options/board/board-tools.ts';
import { isShown, PlaceBar } from '#app/features/options/board/place-bar.tsx';
import { drawsOutline } from '#app/features/options/board/sketch.ts';
import { SketchWords } from '#app/features/options/board/sketch-words.tsx';
import type { DrawingBoard } from '#app/features/options/board/use-board.ts';
import { useNarrow } from '#app/lib/use-media-query.ts';

/** What waits on the map for a word: an outline to be closed, a pattern to be placed. On a phone that goes to the foot. */
export function OptionStrip({ board }: { board: DrawingBoard }) {
  const { tool, laying } = board;
  const narrow = useNarrow();
  const sketches =
    isAreaTool(tool) || (isPattern(tool) && (laying.needsSketch || board.sketch.points.length > 0));
  const waits = !narrow && (isPattern(tool) || isShown(laying));
  if (!sketches && !waits) return null;
  // Presses go through the words to the map, and stop at the buttons alone.
  return (
    <div className="pointer-events-none absolute top-6 left-2 z-10 grid max-w-[calc(100%-4rem)] gap-y-1 bg-ground px-3 py-1.5 empty:hidden lg:left-6 [&_button]:pointer-events-auto">
      {sketches && <SketchWords sketch={board.sketch} closed={drawsOutline(tool)} send={board.send} />}
      {waits && (
        <p className="flex flex-wrap items-center gap-x-3 gap-y-1 empty:hidden">
          <BoardPlaceBar board={board} />
        </p>
      )}
    </div>
  );
}

/** The same at the foot of a phone's screen, where it stays in view in place of the action that comes after it. */
export function PlaceFirst({ board, children }: { board: DrawingBoard; children: ReactNode }): ReactNode {
  return useNarrow() && isShown(board.laying) ? <BoardPlaceBar board={board} /> : children;
}

function BoardPlaceBar({ board }: { board: DrawingBoard }) {
  return (
    <PlaceBar
      laying={board.laying}
      inUse={isPattern(board.tool)}
      sound={Object.keys(board.errors).length === 0}
      onDrop={board.leave}
    />
  );
}
