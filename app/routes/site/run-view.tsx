import { useQueries, useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { useNavigate, useSearchParams } from 'react-router-dom';
import type { Run } from '#contract/runs.ts';
import { useSearchPatch } from '#app/lib/use-search-patch.ts';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { optionsQuery } from '#app/features/options/list-options.ts';
import { countOf, worksByYear } from '#contract/works-words.ts';
import { closingQuery } from '#app/features/runs/closing-years.ts';
import { runQuery } from '#app/features/runs/get-run.ts';
import { runsQuery } from '#app/features/runs/list-runs.ts';
import { LiveProgress } from '#app/features/runs/live-progress.tsx';
import { isAtWork, type LiveRun } from '#app/features/runs/run-manager.ts';
import { driestByYear } from '#app/features/runs/run-series.ts';
import { recoveryYears } from '#app/features/runs/run-words.ts';
import { useFrame } from '#app/features/runs/use-frame.ts';
import { sameOutlook, waitRunsFor } from '#app/features/runs/wait-run.ts';
import { yearRecords } from '#app/yearline/year-records.ts';
import { Yearline } from '#app/yearline/Yearline.tsx';
import { YearlineTable } from '#app/yearline/YearlineTable.tsx';
import { RunAction } from './run-action.tsx';
import { RunDeed, type AskedDeed } from './run-deed.tsx';
import { RunMap } from './run-map.tsx';
import { RunMargin } from './run-margin.tsx';
import { SitePage } from './site-page.tsx';
import { tolerancesOf } from './tolerances.ts';
import { useSite } from './use-site.ts';
import { useYearParam } from './use-year-param.ts';

const noRows: readonly never[] = [];

/** The frames of a run over its yearline, with what it came to beside them. */
export function RunView({ run, live }: { run: Run; live: LiveRun | undefined }) {
  const { site } = useSite();
  const { spec, surveyYear } = run;
  const lastYear = surveyYear + run.years;
  const growing = isAtWork(live) && !live.repeat;
  const [search] = useSearchParams();
  const patchSearch = useSearchPatch();
  const [asTable, setAsTable] = useState(false);
  const [asked, setAsked] = useState<AskedDeed>();
  const [cell, setCell] = useState<{ column: number; row: number }>();
  const navigate = useNavigate();

  const rows = run.result?.series ?? (live && !live.repeat ? live.rows : noRows);
  const records = useMemo(() => yearRecords(rows), [rows]);
  const savedYears = live && !live.repeat ? live.savedYears : noRows;
  const storedYears = useMemo(
    () => [...new Set([...run.storedYears, ...savedYears])].sort((a, b) => a - b),
    [run.storedYears, savedYears],
  );
  const latest = Math.max(storedYears.at(-1) ?? surveyYear, growing ? (live.year ?? surveyYear) : surveyYear);
  const { year, chosen, setYear } = useYearParam(surveyYear, latest, latest);
  const frame = useFrame(run.id, year, storedYears);

  const compare = useWaitCompare(run);
  const show = search.get('show') === 'closing' && (run.hasClosing || live?.closing) ? 'closing' : 'cover';
  const fetchedClosing = useQuery({
    ...closingQuery(run.id),
    enabled: show === 'closing' && run.hasClosing && !live?.closing,
  });
  const closing = live?.closing ?? fetchedClosing.data;

  const droughtIndex = useMemo(() => driestByYear(spec), [spec]);
  const pins = useMemo(
    () =>
      worksByYear(spec.actions).map(({ year: y, kind, count }) => ({ year: y, label: countOf(kind, count) })),
    [spec.actions],
  );
  const marks = useMemo(
    () =>
      run.recoveredYear === null || run.status !== 'finished'
        ? []
        : [{ year: Math.ceil(run.recoveredYear), label: 'recovered' }],
    [run.recoveredYear, run.status],
  );
  const tolerances = tolerancesOf(spec.rates);
  const yearline = { surveyYear, lastYear, droughtIndex, tolerances, records, compare };
  return (
    <SitePage
      step="runs"
      title={run.name}
      tools={
        <div className="grid gap-y-1.5">
          <div className="flex flex-wrap items-center gap-x-5">
            <WordLink to={`/sites/${site.id}/runs`} plain>
              All runs
            </WordLink>
            <span aria-hidden="true" className="hidden h-5 border-l border-rule sm:block" />
            <WordChoice
              label="Map shows"
              showLabel
              options={[
                { key: 'cover', label: 'cover' },
                { key: 'closing', label: 'closing year', disabled: !run.hasClosing && !live?.closing },
              ]}
              value={show}
              onChange={(key) => patchSearch({ show: key === 'closing' ? key : undefined })}
            />
            {growing && chosen && year < latest && (
              <WordButton lined onClick={() => setYear(undefined)}>
                Follow the run
              </WordButton>
            )}
            <WordButton className="ml-auto" lined onClick={() => setAsTable(!asTable)}>
              {asTable ? 'Read as a map' : 'Read as a table'}
            </WordButton>
          </div>
          {isAtWork(live) && <LiveProgress live={live} onCancel={() => setAsked({ deed: 'stop', run })} />}
        </div>
      }
      map={
        asTable ? (
          <div className="relative size-full overflow-auto bg-ground px-4 py-3 lg:px-6">
            <YearlineTable
              {...yearline}
              notes={[...pins, ...marks]}
              caption={`${run.name}, year by year. Cover is the share of what the ground can carry; ever closed is what reached half of it at some time by then, so it never falls.`}
            />
          </div>
        ) : (
          <RunMap
            {...{ run, show, closing, frame }}
            closingError={fetchedClosing.error}
            year={year}
            record={records.find((record) => record.year === year)}
            onHover={setCell}
          />
        )
      }
      margin={
        <>
          <RunMargin
            {...{ run, live, year, records, rows, compare, cell }}
            stored={storedYears.length}
            frameYear={storedYears.includes(year) ? year : undefined}
            lastYear={lastYear}
            onDeed={(deed) => setAsked({ deed, run })}
          />
          {asked && (
            <RunDeed
              asked={asked}
              onClose={() => setAsked(undefined)}
              onDeleted={() => void navigate(`/sites/${site.id}/runs`)}
            />
          )}
        </>
      }
      yearline={
        <Yearline
          {...yearline}
          {...{ year, pins, marks }}
          onYear={setYear}
          availableUntil={latest}
          label={`Year of ${run.name}`}
        />
      }
      action={<RunAction run={run} live={live} />}
    />
  );
}

/** The cover of Wait under the same outlook and luck, where there is such a run. */
function useWaitCompare(run: Run) {
  const options = useQuery(optionsQuery(run.siteId)).data;
  const runs = useQuery(runsQuery(run.siteId)).data?.runs;
  const waitId = options?.find(({ wait }) => wait)?.id;
  const found = useQueries({
    queries: waitRunsFor(run, runs ?? [], waitId).map(({ id }) => runQuery(id)),
  });
  const wait = found.map(({ data }) => data).find((other) => other && sameOutlook(other.spec, run.spec));
  return useMemo(
    () =>
      wait?.result
        ? { label: 'Wait', records: yearRecords(wait.result.series), recovery: recoveryYears(wait) }
        : undefined,
    [wait],
  );
}
