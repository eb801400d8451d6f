import { useQuery } from '@tanstack/react-query';
import type { Option } from '#contract/options.ts';
import { changesInWords, countsInWords } from '#contract/work-changes.ts';
import { Notice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatDateTime } from '#app/lib/formats.ts';
import { revisionQuery } from '../history/revisions.ts';
import type { DraftState } from '../option-draft.ts';
import { mergeDrawings } from './merge-drawings.ts';

/**
 * Somebody saved the same option meanwhile: says who, when and what differs, and offers all ways on. None loses anything:
 * what is taken over can be undone, and what was saved stands in the history.
 */
export function ConflictNotice(props: {
  theirs: Option;
  mine: DraftState;
  /** the revision that the drawing was made on */
  madeOn: number;
  busy: boolean;
  onKeepMine: () => void;
  onTakeTheirs: () => void;
  onMerge: (merged: DraftState) => void;
}) {
  const { theirs, mine, madeOn } = props;
  const base = useQuery(revisionQuery(theirs.siteId, theirs.id, madeOn));
  const merged = base.data && mergeDrawings(base.data, mine, theirs);
  const clash = merged && countsInWords(merged.clashes).join(' and ');
  return (
    <Notice kind="problem" title={`${theirs.changedBy} changed this option meanwhile.`} className="my-2">
      On {formatDateTime(theirs.changedAt)} it was saved{theirs.archived && ' and put in the archive'}. Your
      drawing is still here and not saved.
      {base.data && (
        <dl className="mt-1 grid grid-cols-[auto_1fr] gap-x-3">
          <dt className="text-ink-2">Theirs</dt>
          <dd>{changesInWords(base.data.works, theirs.works) || 'no works changed'}</dd>
          <dt className="text-ink-2">Yours</dt>
          <dd>{changesInWords(base.data.works, mine.works) || 'no works changed'}</dd>
        </dl>
      )}
      {clash && <p className="mt-1">Both of you changed {clash}, so they cannot be put together.</p>}
      <div className="mt-1 flex flex-wrap gap-x-4">
        {merged && !clash && !theirs.archived && (
          <WordButton lined onClick={() => props.onMerge({ works: merged.works, sets: merged.sets })}>
            Put both together
          </WordButton>
        )}
        <WordButton lined busy={props.busy} onClick={props.onKeepMine}>
          Keep mine as a copy
        </WordButton>
        <WordButton lined onClick={props.onTakeTheirs}>
          Take theirs
        </WordButton>
      </div>
    </Notice>
  );
}
