import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { LibraryPlant, Plant, PlantOrigin } from '#contract/plants.ts';
import { startingPlants } from '#contract/starting-plants.ts';
import { Dialog } from '#app/components/dialog.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { NameDialog } from '#app/components/name-dialog.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatDateTime } from '#app/lib/formats.ts';
import { changeInLibrary, copyInLibrary, fetchVersion, libraryQuery, refetchLibrary } from './library.ts';

/** The profiles that a plant can be taken from: the team's own with their versions, and the product's starting values. */
export function LibraryDialog(props: {
  teamId: string;
  editable: boolean;
  onTake: (plant: Plant, origin: PlantOrigin) => void;
  onClose: () => void;
}) {
  const { teamId, editable } = props;
  const library = useQuery(libraryQuery(teamId));
  const [archived, setArchived] = useState(false);
  const plants = library.data?.filter((plant) => plant.archived === archived) ?? [];
  const hidden = library.data?.some((plant) => plant.archived) ?? false;
  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => {
        if (!open) props.onClose();
      }}
      title="Profiles of plants"
      description="Taking one fills in the page; nothing of the site changes until you save."
    >
      <h3 className="mt-4 border-t border-ink pt-2 text-lead">Your team’s library</h3>
      {library.data === undefined ? (
        library.error ? (
          <ProblemNotice error={library.error} title="The library could not be fetched." />
        ) : (
          <LoadingLines label="Fetching the library" lines={2} />
        )
      ) : (
        <>
          {plants.length === 0 && (
            <p className="py-1.5 text-ink-2">
              {archived
                ? 'Nothing is archived.'
                : 'Nothing is kept yet. “Keep in the library” on the page keeps this plant for other sites.'}
            </p>
          )}
          <ul>
            {plants.map((plant) => (
              <LibraryEntry key={plant.id} plant={plant} {...props} />
            ))}
          </ul>
          {hidden && (
            <WordButton lined onClick={() => setArchived(!archived)}>
              {archived ? 'Show those in use' : 'Show the archived'}
            </WordButton>
          )}
        </>
      )}
      <h3 className="mt-4 border-t border-ink pt-2 text-lead">Starting values from the literature</h3>
      <p className="text-note text-ink-2">
        Few of these rates were ever published for these species; each says how sure it is and where it comes
        from. Put in what you measured.
      </p>
      <ul>
        {startingPlants.map(({ key, about, plant }) => (
          <li
            key={key}
            className="flex flex-wrap items-baseline justify-between gap-x-4 border-t border-rule-2 py-2"
          >
            <div className="min-w-0 flex-1 basis-[260px]">
              <b className="font-semibold">{plant.name}</b>
              <p className="text-note text-ink-2">{about}</p>
            </div>
            {editable && (
              <WordButton
                lined
                aria-label={`Take starting values of ${plant.name}`}
                onClick={() => props.onTake(plant, { kind: 'starting', key })}
              >
                Take
              </WordButton>
            )}
          </li>
        ))}
      </ul>
    </Dialog>
  );
}

function LibraryEntry(props: {
  plant: LibraryPlant;
  teamId: string;
  editable: boolean;
  onTake: (plant: Plant, origin: PlantOrigin) => void;
}) {
  const { plant, teamId, editable } = props;
  const queryClient = useQueryClient();
  const [version, setVersion] = useState(plant.versions[0].version);
  const [asking, setAsking] = useState<'copy' | 'rename'>();
  const take = useMutation({
    mutationFn: () => fetchVersion(teamId, plant.id, version),
    onSuccess: (kept) => props.onTake(kept.plant, { kind: 'library', plantId: plant.id, version }),
  });
  const done = async (words: string) => {
    setAsking(undefined);
    await refetchLibrary(queryClient, teamId);
    sayDone(words);
  };
  const copy = useMutation({
    mutationFn: (name: string) => copyInLibrary(teamId, plant.id, name),
    onSuccess: () => done('Profile copied'),
  });
  const change = useMutation({
    mutationFn: (to: { name?: string; archived?: boolean }) => changeInLibrary(teamId, plant.id, to),
    onSuccess: ({ archived }) => done(archived ? 'Profile archived' : 'Profile changed'),
  });
  const shown = plant.versions.find((facts) => facts.version === version) ?? plant.versions[0];
  const error = take.error ?? (asking ? null : change.error);
  return (
    <li className="border-t border-rule-2 py-2">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <div className="min-w-0 flex-1 basis-[260px]">
          <b className="font-semibold">{plant.name}</b>{' '}
          <select
            aria-label={`Version of ${plant.name}`}
            className="h-7 cursor-pointer border-b-[1.5px] border-ink bg-transparent text-[13.5px] touch:h-11"
            value={version}
            onChange={(event) => setVersion(Number(event.target.value))}
          >
            {plant.versions.map((facts) => (
              <option key={facts.version} value={facts.version}>
                version {facts.version}
              </option>
            ))}
          </select>
          <p className="text-note text-ink-2">
            {shown.note && `${shown.note}. `}Saved {formatDateTime(shown.savedAt)} by {shown.savedBy}
          </p>
        </div>
        {editable && (
          <div className="flex flex-wrap gap-x-4">
            <WordButton
              lined
              busy={take.isPending}
              onClick={() => take.mutate()}
              aria-label={`Take ${plant.name}`}
            >
              Take
            </WordButton>
            <WordButton onClick={() => setAsking('copy')} aria-label={`Copy ${plant.name}`}>
              Copy
            </WordButton>
            <WordButton onClick={() => setAsking('rename')} aria-label={`Rename ${plant.name}`}>
              Rename
            </WordButton>
            <WordButton
              busy={change.isPending}
              onClick={() => change.mutate({ archived: !plant.archived })}
              aria-label={`${plant.archived ? 'Bring back' : 'Archive'} ${plant.name}`}
            >
              {plant.archived ? 'Bring back' : 'Archive'}
            </WordButton>
          </div>
        )}
      </div>
      {error && <ProblemNotice error={error} className="mt-2" />}
      {asking && (
        <NameDialog
          title={asking === 'copy' ? `Copy “${plant.name}”` : `Rename “${plant.name}”`}
          label="Name of the profile"
          start={asking === 'copy' ? `${plant.name}, copy`.slice(0, 100) : plant.name}
          longest={100}
          action={asking === 'copy' ? 'Copy it' : 'Rename it'}
          busy={copy.isPending || change.isPending}
          error={asking === 'copy' ? copy.error : change.error}
          onName={(name) => (asking === 'copy' ? copy.mutate(name) : change.mutate({ name }))}
          onClose={() => setAsking(undefined)}
        />
      )}
    </li>
  );
}
