import { useState, type FormEvent } from 'react';
import { errorText } from '#app/lib/api-client.ts';
import { Button } from './button.tsx';
import { Dialog, DialogActions } from './dialog.tsx';
import { TextField } from './inputs.tsx';

/** Asks for a name: of what is added, copied or renamed. */
export function NameDialog(props: {
  onClose: () => void;
  title: string;
  label: string;
  start: string;
  longest: number;
  /** `Add it` */
  action: string;
  keep?: string;
  busy: boolean;
  error: unknown;
  onName: (name: string) => void;
}) {
  const [name, setName] = useState(props.start);
  const empty = name.trim() === '';
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (!empty) props.onName(name.trim());
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) props.onClose();
      }}
      title={props.title}
    >
      <form onSubmit={submit} noValidate>
        <TextField
          className="mt-3"
          label={props.label}
          value={name}
          maxLength={props.longest}
          autoComplete="off"
          error={props.error ? errorText(props.error) : empty ? 'Give it a name' : undefined}
          onChange={(event) => setName(event.target.value)}
        />
        <DialogActions>
          <Button type="submit" busy={props.busy} disabled={empty}>
            {props.action}
          </Button>
          <Button onClick={props.onClose}>{props.keep ?? 'Cancel'}</Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}
