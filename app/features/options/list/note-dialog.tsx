import { useState, type FormEvent } from 'react';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { TextAreaField } from '#app/components/inputs.tsx';
import { errorText } from '#app/lib/api-client.ts';

/** The note of an option: what to know about it, for everybody in the team. */
export function NoteDialog(props: {
  name: string;
  note: string;
  busy: boolean;
  error: unknown;
  onNote: (note: string) => void;
  onClose: () => void;
}) {
  const [note, setNote] = useState(props.note);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    props.onNote(note.trim());
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) props.onClose();
      }}
      title={`Note on ${props.name}`}
    >
      <form onSubmit={submit} noValidate>
        <TextAreaField
          className="mt-3"
          label="What to know about it"
          hint="The team sees it here and in the exported file."
          rows={6}
          maxLength={4000}
          value={note}
          error={props.error ? errorText(props.error) : undefined}
          onChange={(event) => setNote(event.target.value)}
        />
        <DialogActions>
          <Button type="submit" busy={props.busy}>
            Keep the note
          </Button>
          <Button onClick={props.onClose}>Cancel</Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}
