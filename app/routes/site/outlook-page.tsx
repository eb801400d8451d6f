import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useReducer, useState } from 'react';
import { LeaveGuard } from '#app/components/leave-guard.tsx';
import { LinkButton } from '#app/components/link-button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { SaveBar } from '#app/components/save-bar.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { DrawnWeatherSection } from '#app/features/outlook/drawn-weather.tsx';
import { DroughtChart } from '#app/features/outlook/drought-chart.tsx';
import {
  draftOutlook,
  indexOf,
  outlookDraft,
  simulatedYears,
  startDraft,
  type OutlookDraft,
  type OutlookEvent,
} from '#app/features/outlook/outlook-draft.ts';
import { OutlookSentence } from '#app/features/outlook/outlook-sentence.tsx';
import { outlookWords, type Tolerances } from '#app/features/outlook/outlook-words.ts';
import { SeriesDialog } from '#app/features/outlook/series-dialog.tsx';
import { setOutlookMutation } from '#app/features/outlook/set-outlook.ts';
import { YearTable } from '#app/features/outlook/year-table.tsx';
import { formatCounted, formatNumber } from '#app/lib/formats.ts';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

type Edited = OutlookDraft | undefined;
type EditEvent = { from: OutlookDraft; event: OutlookEvent } | 'revert';

/** Weather and losses to come: the drought record against what the plant bears. */
export function Page() {
  const { site, mayKeepGround } = useSite();
  const [edited, edit] = useReducer(
    (state: Edited, act: EditEvent): Edited =>
      act === 'revert' ? undefined : outlookDraft(state ?? act.from, act.event),
    undefined,
  );
  const draft = edited ?? startDraft(site.outlook);
  const tell = (event: OutlookEvent) => edit({ from: draft, event });
  const [pasting, setPasting] = useState(false);
  const [asked, setYear] = useState<number>();
  const save = useMutation(setOutlookMutation(useQueryClient(), site.id));

  const years = simulatedYears(draft);
  const series = years.map((year) => ({ year, index: indexOf(draft, year) }));
  const { tolerance, refugeShift } = site.plant.rates;
  const tolerances: Tolerances = { open: tolerance, mound: tolerance - refugeShift };
  const driest = series.reduce((least, each) => (each.index < least.index ? each : least));
  const year = asked !== undefined && years.includes(asked) ? asked : driest.year;
  const outlook = draftOutlook(draft);
  const change = mayKeepGround
    ? (of: number, value: number) => tell({ type: 'value', year: of, value })
    : undefined;
  const reading = { series, tolerances, year, onYear: setYear, onChange: change };

  return (
    <SitePage
      step="outlook"
      tools={
        <OutlookSentence
          draft={draft}
          tell={tell}
          editable={mayKeepGround}
          onSeries={() => setPasting(true)}
        />
      }
      map={<DroughtChart {...reading} />}
      margin={
        <>
          <h1 className="text-lead">Outlook</h1>
          <div className="mb-3 text-[13.5px]">
            {outlookWords(series, tolerances).map((sentence) => (
              <p key={sentence} className="mt-1">
                {sentence}
              </p>
            ))}
            <p className="mt-1.5 text-note text-ink-2">
              Dry enough to kill: below {formatNumber(tolerances.open)} on open marsh and{' '}
              {formatNumber(tolerances.mound)} on a full refuge, where more than half of the drought loss of{' '}
              {site.plant.name} acts. Full neighbours add {formatNumber(site.plant.rates.neighbourShift)}.
              {mayKeepGround
                ? ' Drag a bar, or type below.'
                : ' Modellers and admins of the team change the outlook.'}
            </p>
          </div>
          <DrawnWeatherSection
            draft={draft.drawn}
            onChange={(change) => tell({ type: 'drawn', change })}
            editable={mayKeepGround}
            outlook={outlook}
            tolerance={tolerance}
          />
          <YearTable {...reading} />
          {save.error && <ProblemNotice error={save.error} title="Not saved." className="mt-3" />}
          {pasting && (
            <SeriesDialog
              draft={draft}
              onOpenChange={setPasting}
              onLay={(values) => tell({ type: 'laid', values })}
            />
          )}
          <LeaveGuard when={mayKeepGround && edited !== undefined} what="The outlook" />
        </>
      }
      action={
        mayKeepGround && (edited !== undefined || !site.outlookSet) ? (
          <SaveBar
            label={edited === undefined ? 'Keep this outlook' : 'Save the outlook'}
            dirty={edited !== undefined}
            busy={save.isPending}
            words={
              outlook === undefined
                ? 'Mend the blanks that are marked first.'
                : edited !== undefined
                  ? 'Changed and not saved.'
                  : 'Starting values, not yet looked at.'
            }
            onSave={() => {
              if (!outlook) return;
              save.mutate(outlook, {
                onSuccess: () => {
                  edit('revert');
                  sayDone(`Outlook saved, ${formatCounted(outlook.years, 'year')}`);
                },
              });
            }}
            onRevert={() => {
              edit('revert');
              save.reset();
            }}
          />
        ) : (
          <LinkButton to={`/sites/${site.id}/options`}>On to Options</LinkButton>
        )
      }
    />
  );
}
