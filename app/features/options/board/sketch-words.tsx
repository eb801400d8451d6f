import { WordButton } from '#app/components/word-button.tsx';
import { fewestPoints, type Sketch, type SketchEvent } from './sketch.ts';

/** What to do next with an outline or a line, and the same by buttons: for fingers, and whoever cannot double-click. */
export function SketchWords(props: { sketch: Sketch; closed: boolean; send: (event: SketchEvent) => void }) {
  const { sketch, closed, send } = props;
  const { points, done } = sketch;
  const missing = fewestPoints(closed) - points.length;
  const what = closed ? 'outline' : 'line';
  const words =
    points.length === 0
      ? `Press the map for each ${closed ? 'corner of an outline' : 'point of a line'}.`
      : done
        ? `The ${what} is drawn; its points can be dragged.`
        : missing > 0
          ? `${points.length === 1 ? '1 point' : `${points.length} points`}; at least ${missing} more.`
          : closed
            ? 'Press the first point, press twice, or close it:'
            : 'Press twice, or end it:';
  return (
    <p className="flex min-h-7 flex-wrap items-center gap-x-3 text-[13.5px] text-ink-2">
      <span role="status">{words}</span>
      {!done && missing <= 0 && (
        <WordButton lined onClick={() => send({ type: 'finish' })}>
          {closed ? 'Close the outline' : 'End the line'}
        </WordButton>
      )}
      {points.length > 0 && (
        <>
          <WordButton lined onClick={() => send({ type: 'back' })}>
            {done ? `Open the ${what}` : 'Take the last point back'}
          </WordButton>
          <WordButton lined onClick={() => send({ type: 'clear' })}>
            Leave it
          </WordButton>
        </>
      )}
    </p>
  );
}
