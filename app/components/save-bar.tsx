import type { ReactNode } from 'react';
import { Button } from './button.tsx';
import { WordButton } from './word-button.tsx';

/** The one action of a page that is edited: save, or go back to what was saved. */
export function SaveBar(props: {
  /** `Save the plant` */
  label: string;
  /** something was changed, so it can be taken back */
  dirty: boolean;
  busy: boolean;
  /** stands beside the button: what is unsaved, or what is wrong */
  words: ReactNode;
  onSave: () => void;
  onRevert: () => void;
}) {
  return (
    <>
      <Button kind="primary" busy={props.busy} busyLabel="Saving" onClick={props.onSave}>
        {props.label}
      </Button>
      {props.dirty && !props.busy && (
        <WordButton lined onClick={props.onRevert}>
          Revert
        </WordButton>
      )}
      <p role="status" className="min-w-0 flex-1 text-note text-ink-2">
        {props.words}
      </p>
    </>
  );
}
