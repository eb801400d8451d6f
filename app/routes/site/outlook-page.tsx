import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useReducer, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { outlookWeather } from '#contract/outlooks.ts';
import { LeaveGuard } from '#app/components/leave-guard.tsx';
import { LinkButton } from '#app/components/link-button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { SaveBar } from '#app/components/save-bar.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { mainKey, outlookMutation, type OutlookKey } from '#app/features/outlook/change-outlook.ts';
import { ChangesSection } from '#app/features/outlook/changes-section.tsx';
import { DrawnWeatherSection } from '#app/features/outlook/drawn-weather.tsx';
import { DroughtChart } from '#app/features/outlook/drought-chart.tsx';
import { OutlookChoice } from '#app/features/outlook/outlook-choice.tsx';
import {
  actingIndex,
  draftOutlook,
  indexOf,
  outlookDraft,
  simulatedYears,
  startDraft,
  type OutlookDraft,
  type OutlookEvent,
} from '#app/features/outlook/outlook-draft.ts';
import { OutlookSentence } from '#app/features/outlook/outlook-sentence.tsx';
import { drawnOutlookWords, outlookWords, type Tolerances } from '#app/features/outlook/outlook-words.ts';
import { SeriesDialog } from '#app/features/outlook/series-dialog.tsx';
import { useWeatherWork } from '#app/features/outlook/use-weather-work.ts';
import { YearTable } from '#app/features/outlook/year-table.tsx';
import { formatCounted, formatNumber } from '#app/lib/formats.ts';
import { useSearchPatch } from '#app/lib/use-search-patch.ts';
import { OutlookRecord } from './outlook-record.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

type Edited = OutlookDraft | undefined;
type EditEvent = { from: OutlookDraft; event: OutlookEvent } | 'revert';

/** Weather and losses to come: the drought record against what the plant bears. */
export function Page() {
  const { site, mayKeepGround } = useSite();
  const [search] = useSearchParams();
  const patch = useSearchPatch();
  const other = site.otherOutlooks.find(({ id }) => id === search.get('outlook'));
  const shown: OutlookKey = other?.id ?? mainKey;
  const [edited, edit] = useReducer(
    (state: Edited, act: EditEvent): Edited =>
      act === 'revert' ? undefined : outlookDraft(state ?? act.from, act.event),
    undefined,
  );
  const draft = edited ?? startDraft(other ?? site.outlook);
  const tell = (event: OutlookEvent) => edit({ from: draft, event });
  const [pasting, setPasting] = useState(false);
  const [asked, setYear] = useState<number>();
  const change = useMutation(outlookMutation(useQueryClient(), site.id));

  const years = simulatedYears(draft);
  const series = years.map((year) => ({
    year,
    index: indexOf(draft, year),
    acting: actingIndex(draft, year),
  }));
  const acting = series.map(({ year, acting: index }) => ({ year, index }));
  const { tolerance, refugeShift } = site.plant.rates;
  const tolerances: Tolerances = { open: tolerance, mound: tolerance - refugeShift };
  const driest = series.reduce((least, each) => (each.acting < least.acting ? each : least));
  const year = asked !== undefined && years.includes(asked) ? asked : driest.year;
  const outlook = draftOutlook(draft);
  const weather = outlook?.drawn ? outlookWeather(outlook, 'ensemble') : undefined;
  const drawn = useWeatherWork(
    'drawnFutures',
    outlook &&
      weather && [
        {
          surveyYear: outlook.surveyYear,
          years: outlook.years,
          stepsPerYear: outlook.stepsPerYear,
          droughtIndex: weather.droughtIndex,
          trend: weather.trend,
        },
        [tolerances.open, tolerances.mound],
      ],
  );
  // Futures of another horizon would be drawn at the wrong years.
  const futures = drawn && drawn.answer.band.length === years.length ? drawn.answer : undefined;
  const changeValue = mayKeepGround
    ? (of: number, value: number) => tell({ type: 'value', year: of, value })
    : undefined;
  const reading = { series, tolerances, year, onYear: setYear, onChange: changeValue };
  const unsaved = edited !== undefined;

  return (
    <SitePage
      step="outlook"
      tools={
        <>
          <OutlookChoice
            site={site}
            shown={shown}
            name={draft.name}
            onShow={(key) => patch({ outlook: key === mainKey ? undefined : key })}
            editable={mayKeepGround}
            dirty={unsaved}
            busy={change.isPending}
            error={change.error}
            onRename={(name) => tell({ type: 'name', name })}
            onCopy={(name, done) =>
              outlook &&
              change.mutate(
                { do: 'add', outlook: { ...outlook, name } },
                {
                  onSuccess: ({ otherOutlooks }) => {
                    done();
                    patch({ outlook: otherOutlooks.at(-1)?.id });
                    sayDone(`“${name}” kept beside the others`);
                  },
                },
              )
            }
            onMakeMain={() =>
              change.mutate(
                { do: 'make main', key: shown },
                {
                  onSuccess: ({ outlook: { name } }) => {
                    patch({ outlook: undefined });
                    sayDone(`“${name}” is the main outlook now`);
                  },
                },
              )
            }
            onDelete={(done) =>
              change.mutate(
                { do: 'delete', key: shown },
                {
                  onSuccess: () => {
                    done();
                    patch({ outlook: undefined });
                  },
                },
              )
            }
          />
          <OutlookSentence
            draft={draft}
            tell={tell}
            editable={mayKeepGround}
            onSeries={() => setPasting(true)}
          />
          {site.otherOutlooks.length > 0 && mayKeepGround && (
            <p className="text-note text-ink-2">
              Survey, horizon, steps and edge hold for every outlook of the site.
            </p>
          )}
        </>
      }
      map={<DroughtChart {...reading} futures={futures} />}
      margin={
        <>
          <h1 className="text-lead">Outlook</h1>
          <div className="mb-3 text-[13.5px]">
            {(outlook?.drawn
              ? drawnOutlookWords(futures, acting, tolerances)
              : outlookWords(acting, tolerances)
            ).map((sentence) => (
              <p key={sentence} className="mt-1">
                {sentence}
              </p>
            ))}
            <p className="mt-1.5 text-note text-ink-2">
              Dry enough to kill: below {formatNumber(tolerances.open)} on open marsh and{' '}
              {formatNumber(tolerances.mound)} on a full refuge, where more than half of the drought loss of{' '}
              {site.plant.name} acts. A plant with full cover around it bears an index lower by{' '}
              {formatNumber(site.plant.rates.neighbourShift)}.
              {mayKeepGround
                ? ' Drag a bar, or type below.'
                : ' Modellers and admins of the team change the outlook.'}
            </p>
          </div>
          <OutlookRecord
            surveyYear={draft.span.surveyYear}
            onWeather={(part) => tell({ type: 'drawn', change: part })}
          />
          <DrawnWeatherSection
            draft={draft.drawn}
            onChange={(part) => tell({ type: 'drawn', change: part })}
            editable={mayKeepGround}
            outlook={outlook}
            futures={futures}
            tolerance={tolerance}
          />
          <ChangesSection
            draft={draft.changes}
            onChange={(part) => tell({ type: 'changes', change: part })}
            editable={mayKeepGround}
            renews={draft.drawn.kind === 'renewal'}
            firstYear={draft.span.surveyYear + 1}
            years={draft.span.years}
            plantGrazed={site.plant.processes?.grazers !== undefined}
          />
          <YearTable {...reading} />
          {change.error && unsaved ? (
            <ProblemNotice error={change.error} title="Not saved." className="mt-3" />
          ) : null}
          {pasting && (
            <SeriesDialog
              draft={draft}
              onOpenChange={setPasting}
              onLay={(values) => tell({ type: 'laid', values })}
            />
          )}
          <LeaveGuard when={mayKeepGround && unsaved} what="The outlook" />
        </>
      }
      action={
        mayKeepGround && (unsaved || !site.outlookSet) ? (
          <SaveBar
            label={unsaved ? 'Save the outlook' : 'Keep this outlook'}
            dirty={unsaved}
            busy={change.isPending}
            words={
              outlook === undefined
                ? 'Mend the blanks that are marked first.'
                : unsaved
                  ? 'Changed and not saved.'
                  : 'Starting values, not yet looked at.'
            }
            onSave={() => {
              if (!outlook) return;
              change.mutate(
                { do: 'save', key: shown, outlook },
                {
                  onSuccess: () => {
                    edit('revert');
                    sayDone(`Outlook saved, ${formatCounted(outlook.years, 'year')}`);
                  },
                },
              );
            }}
            onRevert={() => {
              edit('revert');
              change.reset();
            }}
          />
        ) : (
          <LinkButton to={`/sites/${site.id}/options`}>On to Options</LinkButton>
        )
      }
    />
  );
}
