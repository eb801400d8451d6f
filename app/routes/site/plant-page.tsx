import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useDeferredValue, useMemo, useState } from 'react';
import { TextField } from '#app/components/inputs.tsx';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import { KeepDialog } from '#app/features/plant/keep-dialog.tsx';
import { LibraryDialog } from '#app/features/plant/library-dialog.tsx';
import { keepInLibrary, refetchLibrary, type KeepAs } from '#app/features/plant/library.ts';
import { originWords } from '#app/features/plant/origin-words.ts';
import { useImpliedDraws } from '#app/features/plant/use-implied-draws.ts';
import { useSettled } from '#app/lib/use-settled.ts';
import { useStable } from '#app/lib/use-stable.ts';
import { LeaveGuard } from '#app/components/leave-guard.tsx';
import { LinkButton } from '#app/components/link-button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { SaveBar } from '#app/components/save-bar.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { implications } from '#app/features/plant/implied.ts';
import { GrazersInWords } from '#app/features/plant/grazers-in-words.tsx';
import {
  beliefsOf,
  believe,
  plantErrors,
  plantOf,
  rateGroups,
  startPlant,
  tellSource,
  wrongFields,
  type PlantDraft,
} from '#app/features/plant/plant-draft.ts';
import { ProcessSection } from '#app/features/plant/process-section.tsx';
import { RateRows, type RateKnowledge } from '#app/features/plant/rate-row.tsx';
import { RateSection } from '#app/features/plant/rate-section.tsx';
import { setPlantMutation } from '#app/features/plant/set-plant.ts';
import { formatCounted, formatNumber } from '#app/lib/formats.ts';
import { rateProblems } from '#sim-core/run/grid-problems.ts';
import { parameters } from '#sim-core/spec/parameters.ts';
import { fragmentParameters, grazerParameters } from '#sim-core/spec/process-parameters.ts';
import { PlantMargin } from './plant-margin.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** The rates of the plant, and at once what they imply. */
export function Page() {
  const { site, mayKeepGround } = useSite();
  const { cellSize } = site.grid;
  const { stepsPerYear } = site.outlook;
  const [edited, setEdited] = useState<PlantDraft>();
  const [dialog, setDialog] = useState<'profiles' | 'keep'>();
  const draft = edited ?? startPlant(site.plant);
  const queryClient = useQueryClient();
  const save = useMutation(setPlantMutation(queryClient, site.id));
  const keep = useMutation({
    mutationFn: async ({ as, note }: { as: KeepAs; note: string }) => {
      const plant = plantOf(draft);
      const kept = await keepInLibrary(site.teamId, plant, as, note);
      await refetchLibrary(queryClient, site.teamId);
      const origin = { kind: 'library', plantId: kept.id, version: kept.versions[0].version } as const;
      await save.mutateAsync({ ...plant, origin });
      return kept;
    },
    onSuccess: ({ name, versions }) => {
      setEdited(undefined);
      setDialog(undefined);
      sayDone(`Kept as “${name}”, version ${versions[0].version}`);
    },
  });
  const rates = useDeferredValue(draft.rates.values);
  const beliefs = useDeferredValue(useStable(beliefsOf(draft)));
  const question = useMemo(
    () => ({ rates, beliefs, cellSize, stepsPerYear }),
    [rates, beliefs, cellSize, stepsPerYear],
  );
  const drawn = useImpliedDraws(useSettled(question, 250));
  const implied = useMemo(() => implications(rates, cellSize, stepsPerYear), [rates, cellSize, stepsPerYear]);
  const grazers = draft.grazers.on ? draft.grazers.values : undefined;
  const refused = useMemo(
    () => rateProblems({ rates, processes: { grazers }, stepsPerYear }, cellSize),
    [rates, grazers, stepsPerYear, cellSize],
  );
  const errors = plantErrors(draft, refused);
  const wrong = wrongFields(errors);

  const submit = () => {
    if (wrong > 0) {
      document.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus();
      return;
    }
    save.mutate(
      { ...plantOf(draft), ...(draft.origin && { origin: draft.origin }) },
      {
        onSuccess: () => {
          setEdited(undefined);
          sayDone('Plant saved');
        },
      },
    );
  };

  const knowledge: RateKnowledge = {
    beliefs: draft.beliefs,
    beliefErrors: errors.beliefs,
    sources: draft.sources,
    onBelief: (name, belief) => setEdited(believe(draft, name, belief)),
    onSource: (name, source) => setEdited(tellSource(draft, name, source)),
  };

  return (
    <SitePage
      step="plant"
      sheet={
        <div className="max-w-[960px]">
          <h1 className="text-figure font-heavy tracking-tight">Plant</h1>
          <p className="mt-1 mb-4 max-w-[62ch] text-lead text-ink-2">
            {site.plantSet
              ? 'The rates that every run of this site takes from now on. Runs already made keep theirs.'
              : 'Starting values of the trade, not measurements of this site. Put in what you know.'}
            {!mayKeepGround && ' Modellers and admins of the team change them.'}
          </p>
          <p className="mb-4 flex flex-wrap items-baseline gap-x-5 gap-y-1 text-[13.5px]">
            <span>
              {draft.origin ? 'Taken from a profile just now, not yet saved.' : originWords(site.plantOrigin)}
            </span>
            <WordButton lined onClick={() => setDialog('profiles')}>
              {mayKeepGround ? 'Take a profile' : 'Look at the profiles'}
            </WordButton>
            {mayKeepGround && (
              <WordButton lined disabled={wrong > 0} onClick={() => setDialog('keep')}>
                Keep in the library
              </WordButton>
            )}
            <WordLink to={`/sites/${site.id}/fit`}>Fit to a resurvey</WordLink>
          </p>
          {dialog === 'profiles' && (
            <LibraryDialog
              teamId={site.teamId}
              editable={mayKeepGround}
              onTake={(plant, origin) => {
                const { fieldNumbers } = site.plant;
                setEdited(startPlant({ ...plant, fieldNumbers }, origin));
                setDialog(undefined);
                sayDone(`“${plant.name}” fills the page; save to keep it`);
              }}
              onClose={() => setDialog(undefined)}
            />
          )}
          {dialog === 'keep' && (
            <KeepDialog
              teamId={site.teamId}
              plantName={draft.name.trim()}
              origin={draft.origin ?? site.plantOrigin?.origin}
              busy={keep.isPending}
              error={keep.error}
              onKeep={(as, note) => keep.mutate({ as, note })}
              onClose={() => {
                setDialog(undefined);
                keep.reset();
              }}
            />
          )}
          <TextField
            className="mb-5 max-w-[420px]"
            label="Name of the plant"
            value={draft.name}
            maxLength={100}
            autoComplete="off"
            readOnly={!mayKeepGround}
            error={errors.name}
            onChange={(event) => setEdited({ ...draft, name: event.target.value })}
          />
          {rateGroups.map((group) => (
            <RateSection key={group.title} title={group.title} note={group.note}>
              <RateRows
                table={parameters}
                names={group.names}
                sheet={draft.rates}
                errors={errors.rates}
                editable={mayKeepGround}
                knowledge={knowledge}
                onChange={(sheet) => setEdited({ ...draft, rates: sheet })}
              />
            </RateSection>
          ))}
          <ProcessSection
            title="Grazers"
            note="Animals that eat the plant, held down by predators except in drought. Fences keep them out."
            table={grazerParameters}
            sheet={draft.grazers}
            errors={errors.grazers}
            editable={mayKeepGround}
            knowledge={knowledge}
            saved={site.plant.processes?.grazers !== undefined}
            onChange={(grazers) => setEdited({ ...draft, grazers })}
          >
            <GrazersInWords rates={draft.grazers.values} />
          </ProcessSection>
          <ProcessSection
            title="Fragments"
            note="Pieces that break off and take root elsewhere, in runs that count clumps."
            table={fragmentParameters}
            sheet={draft.fragments}
            errors={errors.fragments}
            editable={mayKeepGround}
            knowledge={knowledge}
            saved={site.plant.processes?.fragments !== undefined}
            onChange={(fragments) => setEdited({ ...draft, fragments })}
          />
        </div>
      }
      margin={
        <>
          <PlantMargin
            implied={implied}
            drawn={drawn}
            uncertain={Object.keys(beliefs).length > 0}
            wrong={wrong}
            rates={rates}
            grazing={draft.grazers.on}
            fragments={draft.fragments.on}
            fieldNumbers={draft.fieldNumbers}
            editable={mayKeepGround}
            onFieldNumbers={(fieldNumbers) => setEdited({ ...draft, fieldNumbers })}
          />
          {save.error && <ProblemNotice error={save.error} title="Not saved." className="mt-3" />}
          <LeaveGuard when={mayKeepGround && edited !== undefined} what="The plant" />
        </>
      }
      action={
        mayKeepGround && (edited !== undefined || !site.plantSet) ? (
          <SaveBar
            label={edited === undefined ? 'Keep these rates' : 'Save the plant'}
            dirty={edited !== undefined}
            busy={save.isPending}
            words={
              wrong > 0
                ? `${formatCounted(wrong, 'field')} to mend first.`
                : edited !== undefined
                  ? 'Changed and not saved.'
                  : 'Starting values, not yet looked at.'
            }
            onSave={submit}
            onRevert={() => {
              setEdited(undefined);
              save.reset();
            }}
          />
        ) : (
          <>
            <LinkButton to={`/sites/${site.id}/outlook`}>On to Outlook</LinkButton>
            <span className="text-note text-ink-2">
              on cells of {formatNumber(cellSize)} m, {formatCounted(stepsPerYear, 'step')} a year
            </span>
          </>
        )
      }
    />
  );
}
