import type { Work } from '#contract/works.ts';
import { WordButton } from '#app/components/word-button.tsx';
import { placeInWords, placeOf, workInWords } from '#contract/works-words.ts';

/** What one of the works is, at the end of a leader line on the map. */
export function WorkNote(props: {
  work: Work;
  title: string;
  /** absent for those who only read */
  edit?: { onMove: () => void; onRemove: () => void };
}) {
  const { work, edit } = props;
  return (
    <>
      <b className="block text-body leading-tight">{props.title}</b>
      <span className="block">
        {work.kind === 'loss' ? 'expected' : 'placed'} in {work.year}
      </span>
      <span className="block">{workInWords(work)}</span>
      <span className="block font-mono text-axis text-ink-2">{placeInWords(placeOf(work))}</span>
      {edit && (
        <span className="mt-0.5 flex flex-wrap gap-x-3">
          <WordButton lined onClick={edit.onMove}>
            Move
          </WordButton>
          <WordButton lined onClick={edit.onRemove}>
            Remove
          </WordButton>
        </span>
      )}
    </>
  );
}
