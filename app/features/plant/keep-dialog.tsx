import { useQuery } from '@tanstack/react-query';
import { useState, type FormEvent } from 'react';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { SelectField, TextField } from '#app/components/inputs.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import type { PlantOrigin } from '#contract/plants.ts';
import { libraryQuery, type KeepAs } from './library.ts';

/** Asks whether a plant is kept as a new profile or as the next version of one, and what changed. */
export function KeepDialog(props: {
  teamId: string;
  plantName: string;
  /** the profile that the plant was taken from is proposed */
  origin: PlantOrigin | undefined;
  busy: boolean;
  error: unknown;
  onKeep: (as: KeepAs, note: string) => void;
  onClose: () => void;
}) {
  const library = useQuery(libraryQuery(props.teamId)).data?.filter(({ archived }) => !archived) ?? [];
  const taken = props.origin?.kind === 'library' ? props.origin.plantId : '';
  const [chosen, setChosen] = useState<string>();
  const [note, setNote] = useState('');
  const of = library.find(({ id }) => id === (chosen ?? taken));
  const submit = (event: FormEvent) => {
    event.preventDefault();
    props.onKeep(of ? { kind: 'version', of } : { kind: 'new' }, note.trim());
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) props.onClose();
      }}
      title="Keep in the library"
      description="The site’s plant is saved, too. A version never changes once it is kept."
    >
      <form onSubmit={submit} className="mt-3 grid grid-cols-[minmax(0,1fr)] gap-3">
        <SelectField
          label="Keep it as"
          value={of?.id ?? ''}
          onChange={(event) => setChosen(event.target.value)}
        >
          <option value="">a new profile, “{props.plantName}”</option>
          {library.map(({ id, name, versions }) => (
            <option key={id} value={id}>
              version {versions[0].version + 1} of “{name}”
            </option>
          ))}
        </SelectField>
        <TextField
          label="What changed, or what it rests on"
          value={note}
          maxLength={500}
          autoComplete="off"
          onChange={(event) => setNote(event.target.value)}
        />
        {props.error ? <ProblemNotice error={props.error} title="Not kept." /> : null}
        <DialogActions>
          <Button type="submit" kind="primary" busy={props.busy}>
            Keep it
          </Button>
          <Button onClick={props.onClose}>Cancel</Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}
