import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import type { WorksPreview } from '#contract/option-files.ts';
import type { Option } from '#contract/options.ts';
import type { Work } from '#contract/works.ts';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { FileDrop } from '#app/components/file-drop.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { formatCounted } from '#app/lib/formats.ts';
import { createOptionMutation } from '../change-option.ts';
import { OptionPicture, type PictureBase } from '../list/option-picture.tsx';
import { worksInWords } from '#contract/works-words.ts';
import { worksToAdd, type FoundWorks } from './works-to-add.ts';
import { readWorksMutation } from './read-works-file.ts';

/** Works from a file, looked at before they become an option. */
export function ImportDialog(props: {
  siteId: string;
  base: PictureBase;
  onMade: (option: Option) => void;
  /** the option that is drawn on; absent where it cannot be added to. Returns why the works cannot be taken */
  addTo?: { name: string; works: readonly Work[]; onAdd: (found: FoundWorks) => string | undefined };
  onClose: () => void;
}) {
  const queryClient = useQueryClient();
  const reading = useMutation(readWorksMutation(props.siteId));
  const create = useMutation(createOptionMutation(queryClient, props.siteId));
  const [fileName, setFileName] = useState<string>();
  const [typed, setName] = useState<string>();
  const preview = reading.data;
  const { addTo } = props;
  const [refused, setRefused] = useState<string>();
  const toAdd = useMemo(() => preview && addTo && worksToAdd(preview, addTo.works), [preview, addTo]);
  const name = typed ?? (preview?.name || fileName?.replace(/\.[^.]*$/, '').slice(0, 100) || 'From a file');
  const take = (file: File) => {
    setFileName(file.name);
    setName(undefined);
    setRefused(undefined);
    create.reset();
    reading.mutate(file);
  };
  const save = (found: WorksPreview) =>
    create.mutate(
      { name: name.trim(), note: found.note, works: found.works, sets: found.sets },
      { onSuccess: props.onMade },
    );
  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => {
        if (!open) props.onClose();
      }}
      title="Works from a file"
      description="GeoJSON, or a CSV of points with x and y in the site’s CRS or lon and lat. You see what was found before anything is saved."
    >
      <div className="mt-3">
        <FileDrop
          label="Drop a GeoJSON or CSV file here"
          accept=".geojson,.json,.csv,.txt,.tsv"
          fileName={fileName}
          onFile={take}
        />
      </div>
      {reading.isPending && (
        <p role="status" className="busy-ticks mt-2">
          Reading {fileName}
        </p>
      )}
      {reading.error ? (
        <ProblemNotice error={reading.error} title="The file cannot be read." className="mt-3" />
      ) : null}
      {preview && <Found preview={preview} base={props.base} />}
      {create.error ? <ProblemNotice error={create.error} title="Not saved." className="mt-3" /> : null}
      {addTo && toAdd && toAdd.alike > 0 && (
        <p className="mt-2 text-note text-ink-2">
          {formatCounted(toAdd.alike, 'of them stands', 'of them stand')} in {addTo.name} already, just alike:
          adding to it leaves {toAdd.alike === 1 ? 'it' : 'them'} out.
        </p>
      )}
      {refused !== undefined && (
        <Notice kind="problem" title="Not added." className="mt-3">
          {refused}
        </Notice>
      )}
      {preview && preview.works.length > 0 && (
        <TextField
          className="mt-3 max-w-sm"
          label="Name of the option"
          value={name}
          maxLength={100}
          autoComplete="off"
          error={name.trim() === '' ? 'Give it a name' : undefined}
          onChange={(event) => setName(event.target.value)}
        />
      )}
      <DialogActions>
        {preview && preview.works.length > 0 && (
          <Button busy={create.isPending} disabled={name.trim() === ''} onClick={() => save(preview)}>
            {preview.problems.some(({ row }) => row !== null)
              ? 'Save the rest as an option'
              : 'Save as an option'}
          </Button>
        )}
        {addTo && toAdd && toAdd.works.length > 0 && (
          <Button onClick={() => setRefused(addTo.onAdd(toAdd))}>
            Add {formatCounted(toAdd.works.length, 'work')} to {addTo.name}
          </Button>
        )}
        <Button onClick={props.onClose}>Cancel</Button>
      </DialogActions>
    </Dialog>
  );
}

const problemsShown = 50;

function Found({ preview, base }: { preview: WorksPreview; base: PictureBase }) {
  const { works, problems, assumed, moreProblems, crsName } = preview;
  const hidden = moreProblems + Math.max(0, problems.length - problemsShown);
  return (
    <section
      aria-label="What was found"
      className="mt-3 grid gap-x-4 gap-y-2 sm:grid-cols-[280px_minmax(0,1fr)]"
    >
      <OptionPicture base={base} works={works} />
      <div role="status" className="text-[13.5px]">
        <b>Found {worksInWords(works)}.</b> Coordinates in {crsName}.
        {assumed.length > 0 && (
          <p className="mt-1">
            Taken for granted, as the file does not say:{' '}
            {assumed
              .map(({ words, works: n }) =>
                n === works.length ? words : `${words} (${formatCounted(n, 'work')})`,
              )
              .join(', ')}
            .
          </p>
        )}
      </div>
      {problems.length > 0 && (
        <div className="sm:col-span-2">
          <b className="text-danger">
            {formatCounted(problems.length + moreProblems, 'thing was', 'things were')} left out:
          </b>
          <ul
            className="relative mt-1 max-h-48 overflow-y-auto border-l-[6px] border-danger text-note"
            tabIndex={0}
            aria-label="What was left out"
          >
            {problems.slice(0, problemsShown).map(({ message }, i) => (
              <li key={i} className="border-t border-rule-2 py-1 pl-3 first:border-0">
                {message}
              </li>
            ))}
            {hidden > 0 && <li className="py-1 pl-3 text-ink-2">and {hidden} more</li>}
          </ul>
        </div>
      )}
    </section>
  );
}
