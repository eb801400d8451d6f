import { useQueries, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useRef } from 'react';
import { replicateSpec, type Comparison } from '#contract/comparisons.ts';
import { Button } from '#app/components/button.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { studyManager, useLiveStudy } from '#app/features/matters/live-studies.ts';
import { studyCsv } from '#app/features/matters/matters-files.ts';
import { StudyCharts } from '#app/features/matters/study-charts.tsx';
import { StudyForm } from '#app/features/matters/study-form.tsx';
import { isStudying, type StudyTask } from '#app/features/matters/study-manager.ts';
import { StudyProgress } from '#app/features/matters/study-progress.tsx';
import { studyRunsQuery, type StudiedEnsemble } from '#app/features/matters/study-server.ts';
import {
  measuredWords,
  measureUnit,
  studySizes,
  type StudySettings,
} from '#app/features/matters/study-settings.ts';
import { formatCount, formatCounted } from '#app/lib/formats.ts';
import { saveFile } from '#app/lib/save-file.ts';
import { useThrottled } from '#app/lib/use-throttled.ts';
import { mattersWords } from '#sim-core/matters/matters-words.ts';
import { studyDesign } from '#sim-core/matters/study-design.ts';
import { leastGroups, studyFigures } from '#sim-core/matters/study-figures.ts';
import { measureOf } from '#sim-core/matters/study-measure.ts';
import { specAtRates, studyKeys } from '#sim-core/matters/study-run.ts';
import { weightsOf } from '#sim-core/matters/weights.ts';
import type { Beliefs } from '#sim-core/spec/uncertain.ts';
import { forgetStudy, rememberStudy, studyGround, wasStudying } from './matters-ground.ts';
import { useSite } from './use-site.ts';

/** A study of its own: chosen, run in this tab, and what comes of it. Runs that any study made are not made again. */
export function MattersStudy(props: {
  comparison: Comparison;
  settings: StudySettings;
  rates: Beliefs;
  /** whether the comparison's futures drew from these beliefs, too */
  asDrawn: boolean;
  onChange: (changes: Record<string, string | undefined>) => void;
}) {
  const { comparison, settings, rates } = props;
  const { mayDraw } = useSite();
  const { plan, id: comparisonId, siteId } = comparison;
  const { option, than, outlook, measure, method, size, luck } = settings;
  const queryClient = useQueryClient();
  const live = useLiveStudy(comparisonId);
  const loadLayers = studyGround(comparison);
  const working = isStudying(live?.phase);
  const version = useThrottled(live?.version ?? 0, 1500);

  const seed = `${plan.common.seed}/matters`;
  // By value: a setting read anew from the address must not make the design anew.
  const believed = JSON.stringify(rates);
  const design = useMemo(
    () => studyDesign({ method, size, seed, rates: JSON.parse(believed) as Beliefs, luck }),
    [method, size, seed, believed, luck],
  );
  const studied = useMemo(
    () =>
      [option, than]
        .filter((place) => place !== undefined)
        .map((place) => {
          const ensemble: StudiedEnsemble = { siteId, comparisonId, option: place, outlook };
          const base = replicateSpec(plan, place, outlook, 0);
          const keyOf = studyKeys(base);
          return { ensemble, base, keys: design.points.map((p) => keyOf(p.replicate, p.rates)) };
        }),
    [siteId, comparisonId, plan, option, than, outlook, design],
  );
  const stored = useQueries({ queries: studied.map(({ ensemble }) => studyRunsQuery(ensemble)) });
  const ready = stored.every(({ data }) => data !== undefined);
  const error = stored.find((query) => query.error)?.error;
  const runOf = (which: number, point: number) => {
    const { ensemble, keys } = studied[which];
    return stored[which].data?.get(keys[point]) ?? studyManager.madeRun(ensemble, keys[point]);
  };
  const dataOf = stored.map(({ dataUpdatedAt }) => dataUpdatedAt).join();
  const { kind } = measure;
  const year = measure.kind === 'recovery' ? undefined : measure.year;
  const found = useMemo(() => {
    let made = 0;
    const outputs = design.points.map((_, point) => {
      const values = studied.map((__, which) => {
        const run = runOf(which, point);
        if (run) made++;
        return run && measureOf(run, measure, plan.common);
      });
      return values.some((value) => value === undefined) ? undefined : values[0]! - (values[1] ?? 0);
    });
    return { made, figures: ready ? studyFigures(design, (i) => outputs[i], seed) : undefined };
    // What is stored and made is filled in place: its version stands for it, and kind and year for the measure.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [design, studied, ready, dataOf, version, live?.phase, kind, year, seed]);
  const { figures, made } = found;
  const runs = design.points.length * studied.length;

  const start = () => {
    const tasks = design.points.flatMap((point, i) =>
      studied.flatMap(({ ensemble, base, keys }, which): StudyTask[] =>
        runOf(which, i)
          ? []
          : [
              {
                ensemble,
                key: keys[i],
                rates: point.rates,
                spec: specAtRates(base, point.replicate, point.rates),
              },
            ],
      ),
    );
    rememberStudy(comparisonId);
    studyManager.start({
      comparisonId,
      grid: comparison.grid,
      tasks,
      loadLayers,
      onStill: () => {
        forgetStudy(comparisonId);
        void queryClient.invalidateQueries({
          queryKey: studyRunsQuery(studied[0].ensemble).queryKey.slice(0, -2),
        });
      },
    });
  };
  // A tab that was at work when it was loaded anew goes on by itself, once.
  const tried = useRef(false);
  useEffect(() => {
    if (tried.current || !ready || live || !mayDraw) return;
    tried.current = true;
    if (wasStudying(comparisonId) && made < runs) start();
  });

  const words = measuredWords(settings, plan);
  const { unit } = studySizes[method];
  const digits = kind === 'covered' ? 0 : kind === 'closed' ? 3 : 1;
  return (
    <section aria-labelledby="matters-study" className="border-t border-ink pt-3 pb-6">
      <h2 id="matters-study" className="text-lead font-bold">
        A study
      </h2>
      {!props.asDrawn && (
        <p className="max-w-[72ch] text-note text-ink-2">With what is believed of the plant now.</p>
      )}
      <div className="pt-1">
        <StudyForm key={method} {...{ settings }} disabled={working} onChange={props.onChange} />
      </div>
      {error ? (
        <ProblemNotice error={error} title="The runs of studies could not be fetched.">
          <WordButton lined onClick={() => stored.forEach((query) => void query.refetch())}>
            Try again
          </WordButton>
        </ProblemNotice>
      ) : !ready ? (
        <LoadingLines label="Fetching the runs of studies" lines={2} />
      ) : (
        <div className="flex flex-wrap items-center gap-x-5 gap-y-2 pt-2 pb-3">
          {mayDraw && !working && made < runs && (
            <Button kind="primary" onClick={start}>
              {made === 0 ? 'Start the study' : 'Run what is missing'}
            </Button>
          )}
          <p className="text-note text-ink-2">
            {formatCounted(runs, 'run')}
            {made === 0
              ? ', none of them made yet'
              : made === runs
                ? ', all made'
                : `, ${formatCount(made)} of them made`}
          </p>
        </div>
      )}
      {live && (
        <StudyProgress
          live={live}
          onPause={() => {
            forgetStudy(comparisonId);
            studyManager.pause(comparisonId);
          }}
        />
      )}
      {figures ? (
        <>
          <p className="max-w-[72ch] pt-1 text-[15px]">{mattersWords(weightsOf(figures), words)}</p>
          <p className="max-w-[72ch] pt-1 pb-3 text-note text-ink-2">
            From {formatCount(figures.groups)} of {formatCount(size)} {unit}.
            {figures.method === 'indices' &&
              figures.groups < 64 &&
              ' Fewer than 64 rows leave the intervals wide (common practice, no source).'}
            {figures.method === 'one-at-a-time' && ' What rates do together does not show here.'}
            {kind === 'recovery' &&
              ` A run that has not recovered by ${plan.common.surveyYear + plan.common.years} counts as recovering then.`}
          </p>
          <StudyCharts {...{ figures, digits }} unit={measureUnit(measure)} />
          <WordButton
            lined
            className="mt-1"
            onClick={() =>
              saveFile(
                `what-matters-${method}.csv`,
                new Blob([studyCsv(figures, measureUnit(measure))], { type: 'text/csv;charset=utf-8' }),
              )
            }
          >
            Save as CSV
          </WordButton>
        </>
      ) : (
        ready &&
        made > 0 && (
          <p className="text-ink-2" role="status">
            The first figures show with {formatCounted(leastGroups[method], unit.slice(0, -1))}.
          </p>
        )
      )}
    </section>
  );
}
