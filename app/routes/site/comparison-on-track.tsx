import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { Link } from 'react-router-dom';
import type { Comparison } from '#contract/comparisons.ts';
import { resurveysOf } from '#contract/layer-sources.ts';
import { BlankSelect } from '#app/components/blank.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { Table } from '#app/components/table.tsx';
import { ensembleMapQuery } from '#app/features/comparisons/get-comparison.ts';
import { TrackFan, type SurveyOnTrack } from '#app/features/comparisons/track-fan.tsx';
import { formatArea, formatShare } from '#app/lib/formats.ts';
import type { MapClass, MapRaster } from '#app/map/map-raster.ts';
import { SiteMap } from '#app/map/SiteMap.tsx';
import type { KnownRecords } from '#sim-core/compare/known-records.ts';
import {
  aheadThere,
  asExpected,
  behindThere,
  notSurveyed,
  placesOffTrack,
  standingAmong,
} from '#sim-core/compare/on-track.ts';
import { standing, unknown } from '#sim-core/fit/map-agreement.ts';
import type { Resurvey } from '#sim-core/fit/resurvey.ts';
import { gridDifferences } from '#sim-core/grid/grid.ts';
import { useComparisonCapacity } from './comparison-ground.ts';
import { loadTarget } from './fit-ground.ts';
import { useSite } from './use-site.ts';

/** Beside the codes of `placesOffTrack`: what stands as foreseen, so that the map shows where plants are. */
const standsAsExpected = 4;
const classes: readonly MapClass[] = [
  { value: aheadThere, name: 'ahead: stands, hardly foreseen', colour: '#2f5d3a' },
  { value: behindThere, name: 'behind: bare, though foreseen', colour: '#b5331f' },
  { value: standsAsExpected, name: 'stands as foreseen', colour: '#8d9a7a' },
  { value: asExpected, name: 'bare as foreseen', colour: '#c9c4b2' },
  { value: notSurveyed, name: 'not compared', colour: '#9fb0b8' },
];
/** Share of the ground that may lack data before areas cannot be compared fairly (common practice, no source). */
const mostUnknown = 0.02;

/** What was surveyed since against the futures of an option: ahead, on track or behind, and where. */
export function OnTrack(props: {
  comparison: Comparison;
  outlook: number;
  known: KnownRecords;
  /** place of the option that was decided for */
  chosen: number | undefined;
}) {
  const { comparison, outlook, known } = props;
  const { site } = useSite();
  const queryClient = useQueryClient();
  const { plan, grid } = comparison;
  const { surveyYear, years } = plan.common;
  const [picked, setPicked] = useState<number>();
  const [askedYear, setYear] = useState<number>();
  const option = picked ?? props.chosen ?? plan.options.findIndex(({ wait }) => wait);
  const place = Math.max(0, option);
  const sameCells = gridDifferences(site.grid, grid).length === 0;
  const resurveys = resurveysOf(site).filter(({ year }) => year > surveyYear && year <= surveyYear + years);
  const capacity = useComparisonCapacity(comparison);
  const target = useQuery({
    queryKey: ['on-track', comparison.id, resurveys.map(({ hash, unit, year }) => [hash, unit, year])],
    queryFn: () =>
      loadTarget(
        queryClient,
        { siteId: site.id, grid, rasters: [...comparison.layers, ...resurveys] },
        plan.common.layers,
        {
          maps: resurveys.map(({ hash, unit, year }) => ({ layer: hash, unit, year, areaError: 0 })),
          areas: [],
          fronts: [],
        },
      ),
    enabled: sameCells && resurveys.length > 0,
    structuralSharing: false,
    staleTime: Infinity,
    gcTime: 60_000,
  });
  const surveys = target.data?.maps ?? [];
  const records = [...known[place][outlook].values()];
  if (resurveys.length === 0 || records.length === 0)
    return (
      <section aria-label="On track" className="border-t border-ink pt-3 pb-2">
        <h2 className="text-lead">On track?</h2>
        <p className="max-w-[68ch] text-ink-2">
          After works, <Link to={`/sites/${site.id}/ground`}>add a newer survey of the cover</Link> as part{' '}
          <b>resurvey</b>, of a year from {surveyYear + 1} to {surveyYear + years}: it is held against the
          futures here.
        </p>
      </section>
    );
  const onTrack = surveys.map((survey): SurveyOnTrack => ({
    year: survey.year,
    surveyed: survey.coveredArea,
    standing: standingAmong(
      survey.coveredArea,
      records.map(({ coveredArea }) => coveredArea[survey.year - surveyYear]),
    ),
  }));
  const shown = onTrack.find(({ year }) => year === askedYear) ?? onTrack.at(-1);
  const survey = surveys.find(({ year }) => year === shown?.year);
  return (
    <section aria-label="On track" className="border-t border-ink pt-3 pb-2">
      <h2 className="text-lead">On track?</h2>
      {!sameCells ? (
        <Notice>
          The site has other cells now than this comparison, so newer surveys cannot be held against it.
          Compare anew on the cells of today.
        </Notice>
      ) : target.error ? (
        <ProblemNotice error={target.error} title="The resurvey could not be fetched." />
      ) : !shown || !survey || !capacity ? (
        <p role="status" className="text-ink-2">
          Fetching the resurveys
        </p>
      ) : (
        <>
          <p className="mt-1 mb-2 max-w-[68ch] leading-8">
            Held against{' '}
            <BlankSelect
              label="Option that was carried out"
              value={String(place)}
              onChange={(event) => setPicked(Number(event.target.value))}
            >
              {plan.options.map(({ name }, i) => (
                <option key={name} value={i}>
                  {name}
                </option>
              ))}
            </BlankSelect>
            , the survey of{' '}
            <BlankSelect
              label="Survey"
              value={String(shown.year)}
              onChange={(event) => setYear(Number(event.target.value))}
            >
              {onTrack.map(({ year }) => (
                <option key={year} value={year}>
                  {year}
                </option>
              ))}
            </BlankSelect>{' '}
            is <b>{shown.standing.track}</b>: {formatArea(shown.surveyed)} are covered where nine tenths of{' '}
            {records.length} futures have {formatArea(shown.standing.low)} to{' '}
            {formatArea(shown.standing.high)}; {formatShare(shown.standing.shareBelow)} of them have less.
          </p>
          <UnknownGround survey={survey} capacity={capacity} />
          <div className="grid gap-x-8 gap-y-4 lg:grid-cols-2">
            <TrackFan
              surveyYear={surveyYear}
              futures={records.map(({ coveredArea }) => coveredArea)}
              surveys={onTrack}
              chosen={shown.year}
            />
            <PlacesOffTrack {...{ comparison, outlook, survey }} option={place} />
          </div>
        </>
      )}
    </section>
  );
}

function UnknownGround({ survey, capacity }: { survey: Resurvey; capacity: Uint8Array }) {
  const share = useMemo(() => {
    let held = 0;
    let lacking = 0;
    capacity.forEach((k, i) => {
      if (k === 0) return;
      held++;
      if (survey.cells[i] === unknown) lacking++;
    });
    return held > 0 ? lacking / held : 0;
  }, [survey, capacity]);
  if (share <= mostUnknown) return null;
  return (
    <Notice className="mb-3">
      The survey says nothing about {formatShare(share)} of the ground that can hold the plant, which the
      futures count: it may look behind for that alone.
    </Notice>
  );
}

/** Where the survey is ahead of the futures, and where behind. */
function PlacesOffTrack(props: {
  comparison: Comparison;
  option: number;
  outlook: number;
  survey: Resurvey;
}) {
  const { comparison, option, outlook, survey } = props;
  const { year } = survey;
  const chance = useQuery(ensembleMapQuery(comparison, option, outlook, `chance-${year}`));
  const map = chance.data instanceof Uint8Array ? chance.data : undefined;
  const places = useMemo(() => map && placesOffTrack(survey.cells, map), [survey, map]);
  const raster = useMemo((): MapRaster | undefined => {
    if (!places) return undefined;
    const values = places.cells.map((value, i) =>
      value === asExpected && survey.cells[i] === standing ? standsAsExpected : value,
    );
    return { kind: 'classes', values, classes };
  }, [places, survey]);
  if (!comparison.plan.mapYears.includes(year))
    return (
      <p className="text-ink-2">
        Where it is ahead or behind can be told for years of which maps were kept:{' '}
        {comparison.plan.mapYears.slice(1).join(', ')}.
      </p>
    );
  if (chance.error) return <ProblemNotice error={chance.error} title="The map could not be fetched." />;
  if (!places)
    return (
      <p role="status" className="text-ink-2">
        {chance.isFetching ? 'Fetching the map' : 'No map is stored yet: let the comparison come to its end.'}
      </p>
    );
  const area = (cells: number) => formatArea(cells * comparison.grid.cellSize ** 2);
  return (
    <div>
      <div className="relative h-[38dvh] min-h-[260px] border border-ink">
        <SiteMap
          className="size-full"
          grid={comparison.grid}
          raster={raster}
          label={`Survey of ${year}: where it is ahead and behind`}
          summary={`Ahead on ${area(places.ahead)}, behind on ${area(places.behind)}, as foreseen on ${area(places.expected)}.`}
        />
      </div>
      <Table
        className="mt-2"
        caption={`Where the survey of ${year} is off the futures`}
        rows={[
          [
            'Ahead',
            area(places.ahead),
            'stands, though at most one in twenty futures had closed there by then',
          ],
          [
            'Behind',
            area(places.behind),
            'is bare, though nineteen in twenty futures had closed there by then',
          ],
          ['As foreseen', area(places.expected), ''],
        ]}
        rowKey={([what]) => what}
        columns={[
          { key: 'what', head: 'the survey is', cell: ([what]) => what },
          { key: 'area', head: 'on', number: true, cell: ([, on]) => on },
          {
            key: 'means',
            head: 'which means',
            cell: ([, , means]) => <span className="text-ink-2">{means}</span>,
          },
        ]}
      />
    </div>
  );
}
