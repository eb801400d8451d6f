import type { Option } from '#contract/options.ts';
import { Notice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatDateTime } from '#app/lib/formats.ts';
import { worksInWords } from './works-words.ts';

/** Somebody saved the same option meanwhile: says who and when, and offers both ways on; neither loses anything. */
export function ConflictNotice(props: {
  theirs: Option;
  busy: boolean;
  onKeepMine: () => void;
  onTakeTheirs: () => void;
}) {
  const { theirs } = props;
  return (
    <Notice kind="problem" title={`${theirs.changedBy} changed this option meanwhile.`} className="my-2">
      On {formatDateTime(theirs.changedAt)} it was saved with {worksInWords(theirs.works)}. Your drawing is
      still here and not saved.
      <div className="mt-1 flex flex-wrap gap-x-4">
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
