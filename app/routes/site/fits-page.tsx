import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { BlankSelect } from '#app/components/blank.tsx';
import { Button } from '#app/components/button.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { Table } from '#app/components/table.tsx';
import { WordLink } from '#app/components/word-button.tsx';
import { registerFit } from '#app/features/fits/change-fit.ts';
import {
  betweenSurveys,
  budgets,
  lastSurvey,
  recordCovers,
  startFitBody,
  type Budget,
  type FitChoices,
} from '#app/features/fits/compose-fit.ts';
import { standingWords } from '#app/features/fits/fit-words.ts';
import { fitsQuery, keepFit } from '#app/features/fits/get-fit.ts';
import { useLiveFits } from '#app/features/fits/live-fits.ts';
import { RateChoice, type RateDraft } from '#app/features/fits/rate-choice.tsx';
import { fittedRates, usualRates } from '#app/features/fits/rate-prior.ts';
import { readAreas, readFronts } from '#app/features/fits/read-surveys.ts';
import { noSurveys, SurveyChoice, type SurveyDraft } from '#app/features/fits/survey-choice.tsx';
import { siteOrigin, sourceBytesQuery } from '#app/features/layers/engine-ground.ts';
import { optionsQuery } from '#app/features/options/list-options.ts';
import { composeRunSpec } from '#app/features/runs/compose-run-spec.ts';
import { CompositionProblems } from '#app/features/runs/composition-problems.tsx';
import { randomSeed } from '#app/features/runs/random-seed.ts';
import { estimateSeconds } from '#app/features/runs/run-pace.ts';
import { formatCount, formatCounted, formatDateTime, formatDuration } from '#app/lib/formats.ts';
import { layerSources } from '#contract/layer-sources.ts';
import { observedFigures } from '#sim-core/fit/fit-target.ts';
import { allParameters } from '#sim-core/spec/all-parameters.ts';
import { loadTarget, useWorkOnFit } from './fit-ground.ts';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

const budgetWords: Record<Budget, string> = {
  quick: 'a quick look',
  usual: 'the usual',
  thorough: 'thoroughly',
};

/** Fits of the plant's rates to what was found later: start one, see how they stand, open one. */
export function Page() {
  const { site, mayKeepGround } = useSite();
  const { surveyYear, stepsPerYear } = site.outlook;
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const workOn = useWorkOnFit();
  const fits = useQuery(fitsQuery(site.id));
  const live = useLiveFits();
  const options = useQuery(optionsQuery(site.id)).data ?? [];
  const resurveys = site.layers
    .filter(({ part }) => part === 'resurvey')
    .toSorted((a, b) => a.year! - b.year!);
  const [surveys, setSurveys] = useState<SurveyDraft>(noSurveys);
  const [rates, setRates] = useState<RateDraft>(() => new Map(usualRates.map((name) => [name, undefined])));
  const [optionId, setOption] = useState<string>();
  const [weather, setWeather] = useState<FitChoices['weather']>();
  const [budget, setBudget] = useState<Budget>('usual');
  const [typedName, setName] = useState<string>();
  const [seed] = useState(randomSeed);

  const capacity = useQuery({
    ...sourceBytesQuery(siteOrigin(site), layerSources(site).capacity),
    enabled: surveys.areas.includes('%'),
  }).data;
  const holding = useMemo(
    () => (capacity ? capacity.reduce((sum, k) => sum + k / 255, 0) * site.grid.cellSize ** 2 : 0),
    [capacity, site.grid.cellSize],
  );
  const areas = readAreas(surveys.areas, holding);
  const fronts = readFronts(surveys.fronts);
  const maps = resurveys.filter(({ hash, year }) => !surveys.left.has(hash) && year! > surveyYear);
  const chosen = { resurveys: maps, areas: areas.rows, fronts: fronts.rows };
  const last = lastSurvey(surveyYear, chosen);
  const recorded = recordCovers(site, last);
  const option = options.find(({ id }) => id === optionId);
  const choices: FitChoices = {
    ...chosen,
    name: typedName?.trim() || `Fit ${(fits.data?.length ?? 0) + 1}`,
    seed,
    areaError: surveys.areaError / 100,
    rates: fittedRates(site.plant, rates),
    works: option?.works ?? [],
    weather: weather ?? (recorded ? 'record' : 'outlook'),
    budget,
  };
  const between = betweenSurveys(site, choices);
  const composed = composeRunSpec(between.site, { works: between.works }, { mode: 'counts', seed });
  const start = useMutation({
    mutationFn: async () => {
      const target = await loadTarget(queryClient, siteOrigin(site), composed.spec!.layers, {
        maps: maps.map(({ hash, unit, year }) => ({
          layer: hash,
          unit,
          year: year!,
          areaError: choices.areaError,
        })),
        areas: [...areas.rows],
        fronts: [...fronts.rows],
      });
      return registerFit(
        site.id,
        startFitBody(choices, composed.spec!, site.plant.beliefs, observedFigures(target)),
      );
    },
    onSuccess: (fit) => {
      keepFit(queryClient, fit);
      workOn(fit);
      void navigate(`/sites/${site.id}/fit/${fit.id}`);
    },
  });
  const seconds =
    (estimateSeconds(
      'counts',
      site.grid.width * site.grid.height,
      Math.max(1, last - surveyYear) * stepsPerYear,
    ) *
      budgets[budget].mostRuns) /
    Math.max(1, navigator.hardwareConcurrency || 2);
  const missing = [
    surveys.areas.includes('%') && !capacity && 'Reading the ground that per cent are of.',
    last === surveyYear && 'Choose or type at least one later survey.',
    choices.rates.length === 0 && 'Choose at least one rate.',
    choices.rates.some(({ belief }) => belief.law === 'uniform' && belief.low >= belief.high) &&
      'A range runs from low to high.',
    areas.problems.length + fronts.problems.length > 0 && 'Mend the lines of the series first.',
  ].filter((words) => words !== false);
  return (
    <SitePage step="plant" title="Fit to a resurvey">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 border-b border-ink pb-2">
        <div>
          <WordLink to={`/sites/${site.id}/plant`} plain>
            Plant
          </WordLink>
          <h1 className="text-title font-bold">Fit to a resurvey</h1>
        </div>
        <p className="max-w-[62ch] text-note text-ink-2">
          Many runs with rates drawn from what is believed; those that come near to what was found later are
          kept, and tell what the rates can be.
        </p>
      </div>
      {mayKeepGround ? (
        <form
          className="border-b border-ink py-4"
          onSubmit={(event) => {
            event.preventDefault();
            if (missing.length === 0 && composed.spec && !start.isPending) start.mutate();
          }}
        >
          <div className="grid gap-x-10 gap-y-6 lg:grid-cols-2">
            <SurveyChoice
              siteId={site.id}
              surveyYear={surveyYear}
              resurveys={resurveys}
              draft={surveys}
              areaProblems={areas.problems}
              frontProblems={fronts.problems}
              onChange={setSurveys}
            />
            <RateChoice plant={site.plant} draft={rates} onChange={setRates} />
          </div>
          <p className="mt-5 leading-8">
            Between {surveyYear} and {last === surveyYear ? 'the last survey' : last} the works of{' '}
            <BlankSelect
              label="Option whose works stood meanwhile"
              value={optionId ?? ''}
              onChange={(event) => setOption(event.target.value || undefined)}
            >
              <option value="">no option</option>
              {options
                .filter(({ archived, wait }) => !archived && !wait)
                .map(({ id, name }) => (
                  <option key={id} value={id}>
                    {name}
                  </option>
                ))}
            </BlankSelect>{' '}
            stood, under the weather of{' '}
            <BlankSelect
              label="Weather between the surveys"
              value={choices.weather}
              onChange={(event) => setWeather(event.target.value as FitChoices['weather'])}
            >
              <option value="record" disabled={site.droughtRecord === null}>
                the drought record
              </option>
              <option value="outlook">the outlook</option>
            </BlankSelect>
            {choices.weather === 'record' && !recorded && ' (years that it lacks as in the outlook)'}. Look{' '}
            <BlankSelect
              label="How much the fit takes"
              value={budget}
              onChange={(event) => setBudget(event.target.value as Budget)}
            >
              {(Object.keys(budgets) as Budget[]).map((key) => (
                <option key={key} value={key}>
                  {budgetWords[key]}: up to {formatCount(budgets[key].mostRuns)} runs
                </option>
              ))}
            </BlankSelect>
            .
          </p>
          {composed.problems && (
            <CompositionProblems problems={composed.problems} site={site} optionId={optionId ?? ''} />
          )}
          <div className="mt-3 flex flex-wrap items-end gap-x-5 gap-y-2">
            <TextField
              className="w-[260px]"
              label="Name of the fit"
              value={typedName ?? choices.name}
              maxLength={120}
              autoComplete="off"
              onChange={(event) => setName(event.target.value)}
            />
            <Button
              type="submit"
              kind="primary"
              busy={start.isPending}
              busyLabel="Reading the surveys"
              disabled={missing.length > 0 || composed.spec === undefined}
            >
              Start the fit
            </Button>
            <span className="text-note text-ink-2">
              {missing.length > 0
                ? missing.join(' ')
                : `At most about ${formatDuration(seconds)} on this machine.`}
            </span>
          </div>
          {start.error && <ProblemNotice error={start.error} title="Not started." className="mt-3" />}
        </form>
      ) : (
        <p className="border-b border-ink py-4 text-ink-2">
          Modellers and admins fit rates; you can open each fit below.
        </p>
      )}
      <section aria-label="Fits so far" className="pt-4">
        {fits.error ? (
          <ProblemNotice error={fits.error} title="The fits could not be fetched." />
        ) : fits.data?.length === 0 ? (
          <Notice>
            No fit yet. A fit needs a survey of a later year than the cover that runs start from.
          </Notice>
        ) : fits.data ? (
          <Table
            caption="Fits of this site, newest first"
            rows={fits.data}
            rowKey={({ id }) => id}
            columns={[
              {
                key: 'name',
                head: 'fit',
                cell: ({ id, name, startedAt, startedBy, rates: fitted }) => (
                  <>
                    <Link
                      to={`/sites/${site.id}/fit/${id}`}
                      className="inline-block min-h-6 touch:min-h-11 text-body font-bold"
                    >
                      {name}
                    </Link>
                    <span className="block text-note text-ink-2">
                      {fitted.map((rate) => allParameters[rate].label.toLowerCase()).join(', ')}; started{' '}
                      {formatDateTime(startedAt)} by {startedBy}
                    </span>
                  </>
                ),
              },
              {
                key: 'stands',
                head: 'how it stands',
                cell: (fit) => standingWords(fit, live.find(({ fitId }) => fitId === fit.id)?.phase),
              },
              {
                key: 'years',
                head: 'surveys',
                wide: true,
                cell: ({ years }) => `${formatCounted(years.length, 'year')}: ${years.join(', ')}`,
              },
            ]}
          />
        ) : null}
      </section>
    </SitePage>
  );
}
