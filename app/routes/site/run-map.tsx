import { useMemo } from 'react';
import type { Run } from '#contract/runs.ts';
import { worksOf } from '#contract/works.ts';
import { ProblemNotice } from '#app/components/notice.tsx';
import { FlagSymbol, SurvivorSymbol } from '#app/components/symbols.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { worksOnMap } from '#app/features/options/board/works-on-map.ts';
import { surveyedOnMap } from '#app/features/runs/surveyed-places.ts';
import type { useFrame } from '#app/features/runs/use-frame.ts';
import { formatArea, formatShare } from '#app/lib/formats.ts';
import type { MapRaster } from '#app/map/map-raster.ts';
import { SiteMap } from '#app/map/SiteMap.tsx';
import type { YearRecord } from '#app/yearline/year-records.ts';
import { useRunCapacity } from './run-ground.ts';

/** A frame of a run, or its closing years, on the ground. */
export function RunMap(props: {
  run: Run;
  show: 'cover' | 'closing';
  closing: Int16Array | undefined;
  closingError: unknown;
  frame: ReturnType<typeof useFrame>;
  year: number;
  record: YearRecord | undefined;
  onHover: (cell: { column: number; row: number } | undefined) => void;
}) {
  const { run, show, closing, frame, year, record } = props;
  const { surveyYear, years } = run;
  const capacity = useRunCapacity(run);
  const cover = frame.frame;
  const raster = useMemo((): MapRaster | undefined => {
    if (show === 'closing')
      return closing && { kind: 'closing', values: closing, surveyYear, lastYear: surveyYear + years };
    return cover && { kind: 'cover', values: cover };
  }, [show, closing, cover, surveyYear, years]);
  const works = useMemo(() => worksOf(run.spec.actions), [run.spec.actions]);
  const shownYear = show === 'cover' ? year : surveyYear + years;
  const surveyed = useMemo(() => surveyedOnMap(run.spec.layers), [run.spec.layers]);
  const { footholds, areas } = useMemo(() => {
    const drawn = worksOnMap(works, shownYear);
    return {
      footholds: [...surveyed.footholds, ...drawn.footholds],
      areas: [...surveyed.areas, ...drawn.areas],
    };
  }, [works, shownYear, surveyed]);
  const anySurveyed = surveyed.footholds.length + surveyed.areas.length > 0;
  const error = show === 'closing' ? props.closingError : frame.error;
  const waiting = show === 'cover' ? frame.year !== year : !closing;
  return (
    <>
      <SiteMap
        className="size-full"
        grid={run.grid}
        raster={raster}
        ground={capacity}
        footholds={footholds}
        areas={areas}
        onHover={props.onHover}
        label={show === 'cover' ? `${run.name}, cover in ${year}` : `${run.name}, closing years`}
        summary={
          record &&
          `In ${year} ${formatShare(record.coverShare)} of what the ground can carry is covered; ${formatArea(record.closedArea)} had reached half of it at some time by then.`
        }
        legendTitle={show === 'cover' ? `Cover in ${frame.year ?? year}` : undefined}
        legend={
          works.length > 0 || anySurveyed ? (
            <>
              {works.length > 0 && (
                <span className="flex items-center gap-1.5">
                  <FlagSymbol /> works
                </span>
              )}
              {anySurveyed && (
                <span className="flex items-center gap-1.5">
                  <SurvivorSymbol /> surveyed
                </span>
              )}
            </>
          ) : undefined
        }
      />
      {error ? (
        <div className="absolute top-10 left-4 max-w-[420px] bg-ground lg:left-6">
          <ProblemNotice error={error} title="This map could not be fetched.">
            {show === 'cover' && (
              <WordButton lined onClick={frame.again}>
                Try again
              </WordButton>
            )}
          </ProblemNotice>
        </div>
      ) : (
        waiting && (
          <p
            role="status"
            className="busy-ticks absolute top-10 left-4 bg-ground px-3 py-1.5 text-note lg:left-6"
          >
            Fetching {show === 'cover' ? year : 'the closing years'}
          </p>
        )
      )}
    </>
  );
}
