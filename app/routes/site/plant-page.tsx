import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useDeferredValue, useMemo, useState } from 'react';
import { TextField } from '#app/components/inputs.tsx';
import { LeaveGuard } from '#app/components/leave-guard.tsx';
import { LinkButton } from '#app/components/link-button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { SaveBar } from '#app/components/save-bar.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { implications } from '#app/features/plant/implied.ts';
import { GrazersInWords } from '#app/features/plant/grazers-in-words.tsx';
import {
  plantErrors,
  plantOf,
  rateGroups,
  startPlant,
  wrongFields,
  type PlantDraft,
} from '#app/features/plant/plant-draft.ts';
import { ProcessSection } from '#app/features/plant/process-section.tsx';
import { RateRows } from '#app/features/plant/rate-row.tsx';
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
  const draft = edited ?? startPlant(site.plant);
  const save = useMutation(setPlantMutation(useQueryClient(), site.id));
  const rates = useDeferredValue(draft.rates.values);
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
    save.mutate(plantOf(draft), {
      onSuccess: () => {
        setEdited(undefined);
        sayDone('Plant saved');
      },
    });
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
            saved={site.plant.processes?.fragments !== undefined}
            onChange={(fragments) => setEdited({ ...draft, fragments })}
          />
        </div>
      }
      margin={
        <>
          <PlantMargin
            implied={implied}
            rates={rates}
            grazing={draft.grazers.on}
            fragments={draft.fragments.on}
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
