import { AlertDialog } from 'radix-ui';
import { Button } from './button.tsx';
import { DialogActions, sheet, veil } from './dialog.tsx';
import { ProblemNotice } from './notice.tsx';

/** Asks before something is lost. It says what goes and what stays, and its buttons name the deed. */
export function ConfirmDialog(props: {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: string;
  /** what goes with it, and what stays */
  description: string;
  /** `Remove 18 mounds` */
  action: string;
  /** `Keep them` */
  keep: string;
  busy?: boolean;
  error?: unknown;
  onConfirm: () => void;
}) {
  return (
    <AlertDialog.Root open={props.open} onOpenChange={props.onOpenChange}>
      <AlertDialog.Portal>
        <AlertDialog.Overlay className={veil} />
        <AlertDialog.Content className={sheet}>
          <AlertDialog.Title className="text-[17px]">{props.title}</AlertDialog.Title>
          <AlertDialog.Description className="mt-1">{props.description}</AlertDialog.Description>
          {props.error !== undefined && props.error !== null && (
            <ProblemNotice error={props.error} className="mt-3" />
          )}
          <DialogActions>
            <Button kind="danger" busy={props.busy} onClick={props.onConfirm}>
              {props.action}
            </Button>
            <AlertDialog.Cancel asChild>
              <Button>{props.keep}</Button>
            </AlertDialog.Cancel>
          </DialogActions>
        </AlertDialog.Content>
      </AlertDialog.Portal>
    </AlertDialog.Root>
  );
}
