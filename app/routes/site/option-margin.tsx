import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import type { Option } from '#contract/options.ts';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { NameDialog } from '#app/components/name-dialog.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Table } from '#app/components/table.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { createOptionMutation, deleteOptionMutation } from '#app/features/options/change-option.ts';
import { ConflictNotice } from '#app/features/options/conflict-notice.tsx';
import { restoreDraft } from '#app/features/options/draft-storage.ts';
import { isUnsaved } from '#app/features/options/option-draft.ts';
import { OptionList } from '#app/features/options/option-list.tsx';
import type { OptionDrawing } from '#app/features/options/use-option-drawing.ts';
import { WorkSymbol } from '#app/features/options/works-table.tsx';
import { countOf, worksByYear, worksInWords } from '#app/features/options/works-words.ts';
import { formatCounted } from '#app/lib/formats.ts';

/** The options, what the chosen one holds, and what to mind. */
export function OptionMargin(props: {
  options: readonly Option[];
  option: Option;
  drawing: OptionDrawing;
  mayDraw: boolean;
  /** what is selected, above all else */
  selection: ReactNode;
  /** what the drawing would cost and bring, and what could be added to it */
  meters: ReactNode;
  /** `isNew`: it was made this moment */
  onChoose: (optionId: string, isNew?: boolean) => void;
}) {
  const { options, option, drawing } = props;
  const { draft } = drawing;
  const drawn = draft.works;
  const groups = worksByYear(drawn);
  const unsaved = (other: Option) =>
    other.id === option.id ? drawing.unsaved : !other.wait && isUnsaved(restoreDraft(other));
  return (
    <>
      {props.selection}
      {drawing.conflict && (
        <ConflictNotice
          theirs={option}
          busy={drawing.saving}
          onKeepMine={() =>
            void drawing.keepAsCopy().then((copy) => {
              if (!copy) return;
              sayDone(`Saved as ${copy.name}`);
              props.onChoose(copy.id);
            })
          }
          onTakeTheirs={drawing.takeTheirs}
        />
      )}
      {drawing.error ? <ProblemNotice error={drawing.error} title="Not saved." className="my-2" /> : null}
      <div className="flex items-baseline justify-between pb-1.5">
        <h1 className="text-lead font-bold">Options</h1>
        <span className="text-note text-ink-2">
          {formatCounted(options.length - 1, 'option')} beside Wait
        </span>
      </div>
      <OptionList {...{ options, drawn, unsaved }} chosen={option.id} onChoose={(id) => props.onChoose(id)} />
      {props.mayDraw && <OptionDeeds {...props} />}
      <h2 className="mt-4 mb-1 border-t border-rule pt-2 text-body font-bold">Works in {option.name}</h2>
      {groups.length === 0 ? (
        <p className="text-note text-ink-2">
          {option.wait
            ? 'None: the ground is left to what survived.'
            : 'None yet. Choose a tool above the map, then press the map.'}
        </p>
      ) : (
        <Table
          caption={`Works in ${option.name}, by year`}
          headless
          columns={[
            {
              key: 'what',
              head: 'works',
              cell: ({ kind, count }) => (
                <>
                  <WorkSymbol work={{ kind }} /> {countOf(kind, count)}
                </>
              ),
            },
            { key: 'year', head: 'year', number: true, cell: ({ year }) => year },
          ]}
          rows={groups}
          rowKey={({ kind, year }) => `${kind}${year}`}
        />
      )}
      {props.meters}
      <p className="mt-4 text-note text-ink-2">
        Moving bivalves between water bodies can need a permit and a biosecurity check. Work between the tides
        needs tide, weather and mud precautions. Follow local codes and licensed practice.
      </p>
    </>
  );
}

/** Add, copy, rename, delete. */
function OptionDeeds(props: {
  options: readonly Option[];
  option: Option;
  drawing: OptionDrawing;
  /** `isNew`: it was made this moment */
  onChoose: (optionId: string, isNew?: boolean) => void;
}) {
  const { option, options, drawing, onChoose } = props;
  const [asked, setAsked] = useState<'add' | 'copy' | 'rename' | 'delete'>();
  const [renaming, setRenaming] = useState<{ busy: boolean; error?: unknown }>({ busy: false });
  const queryClient = useQueryClient();
  const create = useMutation(createOptionMutation(queryClient, option.siteId));
  const remove = useMutation(deleteOptionMutation(queryClient, option.siteId));
  const close = () => {
    setAsked(undefined);
    create.reset();
    remove.reset();
    setRenaming({ busy: false });
  };
  const add = (name: string) => {
    const { works, sets } = asked === 'copy' ? drawing.draft : { works: [], sets: [] };
    create.mutate(
      { name, works: [...works], sets: [...sets] },
      {
        onSuccess: (made) => {
          close();
          onChoose(made.id, true);
        },
      },
    );
  };
  const rename = (name: string) => {
    setRenaming({ busy: true });
    drawing.rename(name).then(close, (error: unknown) => setRenaming({ busy: false, error }));
  };
  return (
    <div className="flex flex-wrap gap-x-4 border-t border-rule pt-1">
      <WordButton onClick={() => setAsked('add')}>Add an option</WordButton>
      <WordButton onClick={() => setAsked('copy')}>Copy</WordButton>
      {!option.wait && (
        <>
          <WordButton onClick={() => setAsked('rename')}>Rename</WordButton>
          <WordButton className="text-danger" onClick={() => setAsked('delete')}>
            Delete
          </WordButton>
        </>
      )}
      {(asked === 'add' || asked === 'copy') && (
        <NameDialog
          title={asked === 'add' ? 'Add an option' : `Copy ${option.name}`}
          label="Name of the option"
          start={asked === 'add' ? `Option ${options.length}` : `${option.name}, copy`}
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
          busy={renaming.busy}
          error={renaming.error}
          onClose={close}
          onName={rename}
        />
      )}
      <ConfirmDialog
        open={asked === 'delete'}
        onOpenChange={(open) => {
          if (!open) close();
        }}
        title={`Delete ${option.name}?`}
        description={`It holds ${worksInWords(option.works)}; they go with it, for everybody in the team. Its runs stay.`}
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
    </div>
  );
}
