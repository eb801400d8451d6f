import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Option } from '#contract/options.ts';
import { copyName, freeName } from '#contract/work-titles.ts';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { Menu, MenuItem, MenuRule } from '#app/components/menu.tsx';
import { NameDialog } from '#app/components/name-dialog.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { createOptionMutation, deleteOptionMutation } from '#app/features/options/change-option.ts';
import { ExportDialog } from '#app/features/options/files/export-dialog.tsx';
import { ImportDialog } from '#app/features/options/files/import-dialog.tsx';
import type { FoundWorks } from '#app/features/options/files/works-to-add.ts';
import { HistoryDialog } from '#app/features/options/history/history-dialog.tsx';
import { NoteDialog } from '#app/features/options/list/note-dialog.tsx';
import type { PictureBase } from '#app/features/options/list/option-picture.tsx';
import type { OptionDrawing, OptionWords } from '#app/features/options/use-option-drawing.ts';
import { worksInWords } from '#contract/works-words.ts';

type Deed = 'add' | 'copy' | 'import' | 'rename' | 'note' | 'history' | 'files' | 'delete';

/** What can be done with the options: words for what is done often, a menu for the rest. */
export function OptionDeeds(props: {
  options: readonly Option[];
  option: Option;
  drawing: OptionDrawing;
  base: PictureBase;
  mayDraw: boolean;
  /** of the chosen one among those beside Wait, from 0; below 0 for Wait and in the archive */
  place: number;
  places: number;
  onMove: (to: number) => void;
  /** Adds works from a file to the drawing; returns why they cannot be taken. */
  onAdd: (found: FoundWorks) => string | undefined;
  /** `isNew`: it was made this moment */
  onChoose: (optionId: string, isNew?: boolean) => void;
}) {
  const { option, options, drawing, mayDraw, place, onChoose } = props;
  const [asked, setAsked] = useState<Deed>();
  const [saying, setSaying] = useState<{ busy: boolean; error?: unknown }>({ busy: false });
  const queryClient = useQueryClient();
  const create = useMutation(createOptionMutation(queryClient, option.siteId));
  const remove = useMutation(deleteOptionMutation(queryClient, option.siteId));
  const close = () => {
    setAsked(undefined);
    create.reset();
    remove.reset();
    setSaying({ busy: false });
  };
  const made = (copy: Option) => {
    close();
    onChoose(copy.id, true);
  };
  const add = (name: string) => {
    const { works, sets } = asked === 'copy' ? drawing.draft : { works: [], sets: [] };
    const note = asked === 'copy' && !option.wait ? option.note : '';
    create.mutate({ name, note, works: [...works], sets: [...sets] }, { onSuccess: made });
  };
  const say = (words: OptionWords, done?: string) => {
    setSaying({ busy: true });
    drawing.describe(words).then(
      () => {
        close();
        if (done !== undefined) sayDone(done);
      },
      (error: unknown) => setSaying({ busy: false, error }),
    );
  };
  const own = mayDraw && !option.wait;
  const names = options.map(({ name }) => name);
  return (
    <>
      {mayDraw && <WordButton onClick={() => setAsked('add')}>Add an option</WordButton>}
      {mayDraw && <WordButton onClick={() => setAsked('copy')}>Copy</WordButton>}
      <Menu align="start" trigger={<WordButton>More</WordButton>}>
        {own && <MenuItem onSelect={() => setAsked('rename')}>Rename</MenuItem>}
        {own && (
          <MenuItem onSelect={() => setAsked('note')}>
            {option.note === '' ? 'Add a note' : 'Change the note'}
          </MenuItem>
        )}
        {own && place >= 0 && (
          <>
            <MenuItem disabled={place === 0} onSelect={() => props.onMove(place - 1)}>
              Move before
            </MenuItem>
            <MenuItem disabled={place >= props.places - 1} onSelect={() => props.onMove(place + 1)}>
              Move after
            </MenuItem>
          </>
        )}
        {own && <MenuRule />}
        {!option.wait && <MenuItem onSelect={() => setAsked('history')}>History</MenuItem>}
        <MenuItem onSelect={() => setAsked('files')}>Files and crew list</MenuItem>
        {mayDraw && <MenuItem onSelect={() => setAsked('import')}>Works from a file</MenuItem>}
        {own && <MenuRule />}
        {own && !option.archived && (
          <MenuItem
            disabled={drawing.unsaved}
            onSelect={() => say({ archived: true }, `${option.name} is in the archive`)}
          >
            {drawing.unsaved ? 'Archive, once it is saved' : 'Archive'}
          </MenuItem>
        )}
        {own && option.archived && (
          <MenuItem onSelect={() => say({ archived: false }, `${option.name} is back in the list`)}>
            Bring back from the archive
          </MenuItem>
        )}
        {own && <MenuItem onSelect={() => setAsked('delete')}>Delete</MenuItem>}
      </Menu>
      {asked === undefined && saying.error !== undefined && (
        <ProblemNotice error={saying.error} title="Not changed." className="my-2 w-full" />
      )}
      {(asked === 'add' || asked === 'copy') && (
        <NameDialog
          title={asked === 'add' ? 'Add an option' : `Copy ${option.name}`}
          label="Name of the option"
          start={asked === 'add' ? freeName('Option', names) : copyName(option.name, names)}
          longest={100}
          action={asked === 'add' ? 'Add it' : 'Copy it'}
          busy={create.isPending}
          error={create.error}
          onClose={close}
          onName={add}
        />
      )}
      {asked === 'rename' && (
        <NameDialog
          title={`Rename ${option.name}`}
          label="Name of the option"
          start={option.name}
          longest={100}
          action="Rename"
          keep="Keep the name"
          {...saying}
          error={saying.error}
          onClose={close}
          onName={(name) => say({ name })}
        />
      )}
      {asked === 'note' && (
        <NoteDialog
          name={option.name}
          note={option.note}
          {...saying}
          error={saying.error}
          onClose={close}
          onNote={(note) => say({ note })}
        />
      )}
      {asked === 'history' && (
        <HistoryDialog
          option={option}
          base={props.base}
          mayBringBack={own && !option.archived && !drawing.unsaved}
          reason={
            own && drawing.unsaved
              ? 'Save or discard your drawing first; then an older state can be brought back.'
              : undefined
          }
          onClose={close}
        />
      )}
      {asked === 'files' && <ExportDialog option={option} unsaved={drawing.unsaved} onClose={close} />}
      {asked === 'import' && (
        <ImportDialog
          siteId={option.siteId}
          base={props.base}
          onMade={made}
          addTo={
            own && !option.archived
              ? {
                  name: option.name,
                  works: drawing.draft.works,
                  onAdd: (found) => {
                    const problem = props.onAdd(found);
                    if (problem === undefined) {
                      close();
                      sayDone('Added to this option; not saved yet. Undo takes it back in one step');
                    }
                    return problem;
                  },
                }
              : undefined
          }
          onClose={close}
        />
      )}
      <ConfirmDialog
        open={asked === 'delete'}
        onOpenChange={(open) => {
          if (!open) close();
        }}
        title={`Delete ${option.name}?`}
        description={`It holds ${worksInWords(option.works)}; they and their history go with it, for everybody in the team. Its runs stay. To keep it out of the way, archive it instead.`}
        action="Delete the option"
        keep="Keep it"
        busy={remove.isPending}
        error={remove.error}
        onConfirm={() =>
          remove.mutate(option.id, {
            onSuccess: () => {
              close();
              onChoose(options[0].id);
            },
          })
        }
      />
    </>
  );
}
