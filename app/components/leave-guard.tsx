import { useEffect } from 'react';
import { useBlocker } from 'react-router-dom';
import { ConfirmDialog } from './confirm-dialog.tsx';

/** Asks before a page with something unsaved is left: by a link of ours here, by closing the tab in the browser's words. */
export function LeaveGuard(props: {
  when: boolean;
  /** what would be lost, as the start of a sentence: `The class table` */
  what: string;
  /** what the dialog says instead of the usual words */
  description?: string;
}) {
  const { when } = props;
  const blocker = useBlocker(
    ({ currentLocation, nextLocation }) => when && currentLocation.pathname !== nextLocation.pathname,
  );
  useEffect(() => {
    if (!when) return undefined;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', warn);
    return () => window.removeEventListener('beforeunload', warn);
  }, [when]);
  return (
    <ConfirmDialog
      open={blocker.state === 'blocked'}
      onOpenChange={(open) => {
        if (!open) blocker.reset?.();
      }}
      title={`${props.what} is not saved`}
      description={props.description ?? 'What was changed here goes when you leave this page.'}
      action="Leave without saving"
      keep="Stay here"
      onConfirm={() => blocker.proceed?.()}
    />
  );
}
