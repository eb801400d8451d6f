import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useDeferredValue, useMemo, useState } from 'react';
import { TextField } from '#app/components/inputs.tsx';
import { LeaveGuard } from '#app/components/leave-guard.tsx';
import { LinkButton } from '#app/components/link-button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { SaveBar } from '#app/components/save-bar.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { implications } from '#app/features/plant/implied.ts';
import {
  plantErrors,
  rateGroups,
  startPlant,
  typeRate,
  type PlantDraft,
} from '#app/features/plant/plant-draft.ts';
import { RateRow } from '#app/features/plant/rate-row.tsx';
import { setPlantMutation } from '#app/features/plant/set-plant.ts';
import { formatCounted, formatNumber } from '#app/lib/formats.ts';
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
  const rates = useDeferredValue(draft.rates);
  const implied = useMemo(() => implications(rates, cellSize, stepsPerYear), [rates, cellSize, stepsPerYear]);
  const errors = plantErrors(draft, implied.problems);
  const wrong = Object.keys(errors).length;

  const submit = () => {
    if (wrong > 0) {
      document.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus();
      return;
    }
    save.mutate(
      { name: draft.name.trim(), rates: draft.rates },
      {
        onSuccess: () => {
          setEdited(undefined);
          sayDone('Plant saved');
        },
      },
    );
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
            <section key={group.title} className="border-t border-ink pt-2.5 pb-6">
              <div className="mb-1.5 flex flex-wrap items-baseline justify-between gap-x-6">
                <h2 className="text-lead">{group.title}</h2>
                <p className="text-note text-ink-2">{group.note}</p>
              </div>
              {group.names.map((rate) => (
                <RateRow
                  key={rate}
                  rate={rate}
                  typed={draft.typed[rate]}
                  value={draft.rates[rate]}
                  error={errors[rate]}
                  editable={mayKeepGround}
                  onChange={(text) => setEdited(typeRate(draft, rate, text))}
                />
              ))}
            </section>
          ))}
        </div>
      }
      margin={
        <>
          <PlantMargin implied={implied} rates={rates} />
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
