import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState, type FormEvent } from 'react';
import { useNavigate } from 'react-router-dom';
import { Button } from '#app/components/button.tsx';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { deleteSiteMutation, renameSiteMutation } from '#app/features/sites/change-site.ts';
import { errorText } from '#app/lib/api-client.ts';
import { formatCounted } from '#app/lib/formats.ts';
import { useSite } from './use-site.ts';

/** Rename and delete, at the foot of Ground; only for those who may. */
export function SiteSettings() {
  const { site, mayKeepGround } = useSite();
  const [open, setOpen] = useState<'rename' | 'delete'>();
  if (!mayKeepGround) return null;
  const close = (stays: boolean) => {
    if (!stays) setOpen(undefined);
  };
  return (
    <div className="mt-4 flex gap-4 border-t border-rule pt-2">
      <WordButton onClick={() => setOpen('rename')}>Rename {site.name}</WordButton>
      <WordButton className="text-danger" onClick={() => setOpen('delete')}>
        Delete this site
      </WordButton>
      {open === 'rename' && <RenameDialog onOpenChange={close} />}
      {open === 'delete' && <DeleteDialog onOpenChange={close} />}
    </div>
  );
}

function RenameDialog({ onOpenChange }: { onOpenChange: (open: boolean) => void }) {
  const { site } = useSite();
  const [name, setName] = useState(site.name);
  const rename = useMutation(renameSiteMutation(useQueryClient(), site.id));
  const submit = (event: FormEvent) => {
    event.preventDefault();
    rename.mutate(name, {
      onSuccess: () => {
        onOpenChange(false);
        sayDone('Renamed');
      },
    });
  };
  return (
    <Dialog open onOpenChange={onOpenChange} title={`Rename ${site.name}`}>
      <form onSubmit={submit} noValidate>
        <TextField
          className="mt-3"
          label="Name of the site"
          value={name}
          maxLength={100}
          autoComplete="off"
          error={
            rename.error ? errorText(rename.error) : name.trim() === '' ? 'Give the site a name' : undefined
          }
          onChange={(event) => setName(event.target.value)}
        />
        <DialogActions>
          <Button type="submit" busy={rename.isPending} disabled={name.trim() === ''}>
            Rename
          </Button>
          <Button onClick={() => onOpenChange(false)}>Keep the name</Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}

function DeleteDialog({ onOpenChange }: { onOpenChange: (open: boolean) => void }) {
  const { site } = useSite();
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const remove = useMutation(deleteSiteMutation(queryClient, site));
  return (
    <ConfirmDialog
      open
      onOpenChange={onOpenChange}
      title={`Delete ${site.name}?`}
      description={
        `Its ${formatCounted(site.layers.length, 'layer')}, ${formatCounted(site.options, 'option')} and ` +
        `${formatCounted(site.runs, 'run')} go with it, for everybody in the team. This cannot be taken back.`
      }
      action="Delete the site"
      keep="Keep it"
      busy={remove.isPending}
      error={remove.error}
      onConfirm={() => remove.mutate(undefined, { onSuccess: () => void navigate('/') })}
    />
  );
}
