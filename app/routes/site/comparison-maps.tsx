import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import type { Comparison } from '#contract/comparisons.ts';
import { worksOf } from '#contract/works.ts';
import { BlankSelect } from '#app/components/blank.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import type { OutlookFigures } from '#sim-core/compare/comparison-figures.ts';
import { Chosen } from '#app/features/comparisons/chosen.tsx';
import { CoverLines } from '#app/features/comparisons/cover-lines.tsx';
import { ensembleMapQuery } from '#app/features/comparisons/get-comparison.ts';
import { comparisonManager } from '#app/features/comparisons/live-comparisons.ts';
import { worksOnMap } from '#app/features/options/board/works-on-map.ts';
import { useSearchPatch } from '#app/lib/use-search-patch.ts';
import { useNarrow } from '#app/lib/use-media-query.ts';
import { useThrottled } from '#app/lib/use-throttled.ts';
import type { MapRaster } from '#app/map/map-raster.ts';
import type { MapClear, MapView } from '#app/map/map-view.ts';
import { SiteMap } from '#app/map/SiteMap.tsx';
import { useSearchParams } from 'react-router-dom';
import { useComparisonCapacity } from './comparison-ground.ts';

const shows = {
  cover: 'mean cover',
  chance: 'chance to have closed',
  closing: 'median closing year',
  difference: 'cover against Wait',
} as const;
type Show = keyof typeof shows;

/** Two to four maps that move together in place and time, with the lines of all options below them. */
export function ComparisonMaps(props: {
  comparison: Comparison;
  /** this tab works on it, so its maps are at hand as they grow */
  live: boolean;
  /** rises as records come */
  version: number;
  outlook: number;
  figures: OutlookFigures | undefined;
  /** place of the option that was decided for */
  chosen: number | undefined;
}) {
  const { comparison, live, version, outlook, figures } = props;
  const { plan } = comparison;
  const [search] = useSearchParams();
  const patchSearch = useSearchPatch();
  const wait = plan.options.findIndex((option) => option.wait);
  const asked = search.get('show') as Show | null;
  const show: Show = asked && asked in shows && (asked !== 'difference' || wait >= 0) ? asked : 'cover';
  const years = plan.mapYears;
  const middle = years[Math.floor(years.length / 2)];
  const askedYear = Number(search.get('year') ?? middle);
  const year = years.reduce(
    (best, each) => (Math.abs(each - askedYear) < Math.abs(best - askedYear) ? each : best),
    middle,
  );
  const [view, setView] = useState<MapView>();
  // The first map has the legend; all keep clear of it, so that the ground lies alike in each.
  const [clear, setClear] = useState<MapClear>();
  const narrow = useNarrow();
  const [picked, setPicked] = useState<readonly number[]>(() => plan.options.map((_, i) => i).slice(0, 4));
  const [swipe, setSwipe] = useState<number>();
  const capacity = useComparisonCapacity(comparison);
  // Wait against itself would show nothing.
  const able = picked.filter((option) => show !== 'difference' || option !== wait);
  const panels = able.length > 0 ? able : [show === 'difference' && wait === 0 ? 1 : 0];
  const swiped = swipe !== undefined && panels.length > 1;
  const map = (option: number, small: boolean) => (
    <EnsembleMap
      key={option}
      {...{ comparison, live, version, option, outlook, show, year, wait, capacity, view, small, clear }}
      onView={setView}
      onClear={setClear}
    />
  );
  const choices = (Object.keys(shows) as Show[]).map((key) => ({
    key,
    label: shows[key],
    disabled: key === 'difference' && wait < 0,
  }));
  const onShow = (key: Show) => patchSearch({ show: key === 'cover' ? undefined : key });
  const nameOf = (option: number) => plan.options[option].name;
  const arrangement = (
    <>
      {panels.length > 1 && (
        <WordButton lined onClick={() => setSwipe(swiped ? undefined : 50)}>
          {swiped ? 'Side by side' : `Swipe ${nameOf(panels[0])} and ${nameOf(panels[1])}`}
        </WordButton>
      )}
      {plan.options.length > 2 && (
        <fieldset className="flex flex-wrap gap-x-4">
          <legend className="sr-only">Options on maps, four at most</legend>
          {plan.options.map(({ name }, i) => (
            <label
              key={name}
              className="inline-flex min-h-7 cursor-pointer items-center gap-1.5 text-[13px] has-disabled:cursor-not-allowed has-disabled:text-ink-3 touch:min-h-11"
            >
              <input
                type="checkbox"
                className="size-4 accent-ink"
                checked={panels.includes(i)}
                disabled={
                  (show === 'difference' && i === wait) ||
                  (!picked.includes(i) && picked.length >= 4) ||
                  (panels.length === 1 && panels[0] === i)
                }
                onChange={() =>
                  setPicked(
                    picked.includes(i)
                      ? picked.filter((each) => each !== i)
                      : [...picked, i].sort((a, b) => a - b),
                  )
                }
              />
              {name}
            </label>
          ))}
        </fieldset>
      )}
    </>
  );
  return (
    <section aria-label="Maps" className="border-b border-ink pt-3 pb-2">
      <div className="flex flex-wrap items-center gap-x-6 gap-y-1 pb-2">
        {narrow ? (
          <p className="flex items-baseline gap-x-1.5 text-[14.5px]">
            <span>Maps show</span>
            <BlankSelect
              label="Maps show"
              value={show}
              onChange={(event) => onShow(event.target.value as Show)}
            >
              {choices.map(({ key, label, disabled }) => (
                <option key={key} value={key} disabled={disabled}>
                  {label}
                </option>
              ))}
            </BlankSelect>
          </p>
        ) : (
          <WordChoice label="Maps show" showLabel options={choices} value={show} onChange={onShow} />
        )}
        {narrow ? (
          <details className="w-full text-note">
            <summary className="inline-block min-h-7 border-b-2 border-rule leading-7 touch:min-h-11 touch:leading-[44px]">
              Which options, and how they stand
            </summary>
            <div className="flex flex-wrap items-center gap-x-5">{arrangement}</div>
          </details>
        ) : (
          arrangement
        )}
      </div>
      {swiped ? (
        <div>
          <p className="flex justify-between gap-4 pb-1 text-[13px] font-semibold">
            <span>{nameOf(panels[0])}</span>
            <span className="text-right">{nameOf(panels[1])}</span>
          </p>
          <div className="relative h-[44dvh] min-h-[280px] overflow-hidden">
            <div className="absolute inset-0">{map(panels[0], false)}</div>
            <div className="absolute inset-0" style={{ clipPath: `inset(0 0 0 ${swipe}%)` }}>
              {map(panels[1], true)}
            </div>
            <div
              className="pointer-events-none absolute inset-y-0 border-l-2 border-ink"
              style={{ left: `${swipe}%` }}
            />
          </div>
          <input
            type="range"
            min={0}
            max={100}
            value={swipe}
            aria-label={`Share of the map that shows ${nameOf(panels[0])}; the rest shows ${nameOf(panels[1])}`}
            className="h-7 w-full accent-ink touch:h-11"
            onChange={(event) => setSwipe(Number(event.target.value))}
          />
        </div>
      ) : (
        <div
          className={`grid gap-px bg-ink ${panels.length === 1 ? '' : panels.length === 3 ? 'md:grid-cols-3' : 'md:grid-cols-2'}`}
        >
          {panels.map((option, i) => (
            <div key={option} className="bg-ground">
              <div className="relative h-[38dvh] min-h-[240px]">{map(option, i > 0)}</div>
              <p className="border-t border-ink px-3 py-1 text-[13px] font-semibold">
                {nameOf(option)}
                {option === props.chosen && <Chosen />}
              </p>
            </div>
          ))}
        </div>
      )}
      <CoverLines
        {...{ plan, figures, year }}
        chosen={props.chosen}
        onYear={(to) => patchSearch({ year: String(to) })}
        closing={show === 'closing'}
      />
    </section>
  );
}

function EnsembleMap(props: {
  comparison: Comparison;
  live: boolean;
  version: number;
  option: number;
  outlook: number;
  show: Show;
  year: number;
  wait: number;
  capacity: Uint8Array | undefined;
  view: MapView | undefined;
  onView: (view: MapView) => void;
  small: boolean;
  clear: MapClear | undefined;
  onClear: (clear: MapClear) => void;
}) {
  const { comparison, live, version, option, outlook, show, year, wait, small } = props;
  const { plan, grid } = comparison;
  const { surveyYear, years } = plan.common;
  const name = show === 'closing' ? 'closing' : `${show === 'chance' ? 'chance' : 'cover'}-${year}`;
  const own = useEnsembleMap(comparison, live, version, option, outlook, name);
  const ofWait = useEnsembleMap(comparison, live, version, Math.max(0, wait), outlook, name);
  const raster = useMemo((): MapRaster | undefined => {
    if (!own) return undefined;
    if (show === 'closing')
      return own instanceof Int16Array
        ? { kind: 'closing', values: own, surveyYear, lastYear: surveyYear + years }
        : undefined;
    if (!(own instanceof Uint8Array)) return undefined;
    if (show === 'cover') return { kind: 'cover', values: own };
    if (show === 'chance') return { kind: 'share', values: own, name: `chance to have closed by ${year}` };
    if (!(ofWait instanceof Uint8Array)) return undefined;
    const values = own.map((c, i) => 128 + Math.round((c - ofWait[i]) * (127 / 255)));
    return { kind: 'difference', values, name: `cover in ${year} against Wait` };
  }, [own, ofWait, show, surveyYear, years, year]);
  const works = useMemo(() => worksOf(plan.options[option].actions), [plan.options, option]);
  const shownYear = show === 'closing' ? surveyYear + years : year;
  const { footholds, areas } = useMemo(() => worksOnMap(works, shownYear), [works, shownYear]);
  const title =
    show === 'closing'
      ? 'Year half of the futures have closed'
      : show === 'cover'
        ? `Mean cover in ${year}`
        : undefined;
  return (
    <>
      <SiteMap
        className="size-full"
        grid={grid}
        raster={raster}
        ground={props.capacity}
        footholds={footholds}
        areas={areas}
        view={props.view}
        onView={props.onView}
        furniture={!small}
        clear={small ? props.clear : undefined}
        onClear={small ? undefined : props.onClear}
        legendTitle={title}
        label={`${plan.options[option].name}: ${shows[show]}${show === 'closing' ? '' : ` in ${year}`}`}
        summary={`${plan.options[option].name}, ${shows[show]} over all futures. All maps move together.`}
      />
      {!own && (
        <p role="status" className="absolute top-2 left-3 bg-ground px-2 py-1 text-note">
          {live ? 'Shows when the first futures are in' : 'No map is stored yet'}
        </p>
      )}
    </>
  );
}

/** A map as this tab has it while it works, else as it is stored. */
function useEnsembleMap(
  comparison: Comparison,
  live: boolean,
  upTo: number,
  option: number,
  outlook: number,
  name: string,
): Uint8Array | Int16Array | undefined {
  const version = useThrottled(live ? upTo : 0, 10_000);
  const fromTab = useQuery({
    queryKey: ['live-map', comparison.id, option, outlook, name, version],
    queryFn: async () => (await comparisonManager.map(comparison.id, option, outlook, name)) ?? null,
    enabled: live && version > 0,
    placeholderData: (before, query) =>
      query?.queryKey[4] === name && query.queryKey[2] === option ? before : undefined,
    structuralSharing: false,
    gcTime: 5000,
    retry: false,
  });
  const stored = useQuery(ensembleMapQuery(comparison, option, outlook, name));
  return live ? (fromTab.data ?? stored.data) : stored.data;
}
