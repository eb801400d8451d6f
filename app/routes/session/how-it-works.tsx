import { useMemo, useRef } from 'react';
import { toFrame } from '#sim-core/index.ts';
import { YearlinePlot } from '#app/yearline/YearlinePlot.tsx';
import { useWidth } from '#app/yearline/use-width.ts';
import { yearlineScale } from '#app/yearline/yearline-scale.ts';
import type { YearRecord } from '#app/yearline/year-records.ts';
import { Moment } from './moment.tsx';
import { pictureGround, pictureSpec, nearest, pictureYears, planned, survivors } from './picture-ground.ts';
import { PictureLabel } from './picture-label.tsx';
import { usePictureRun } from './use-picture-run.ts';

const { survey, last, shown } = pictureYears;

const yearsOn = (years: number) =>
  years === 0 ? 'after the drought' : years === 1 ? '1 year on' : `${years} years on`;

/** What the product does, shown and not told: invented ground, and one future of it made by the engine on the spot. */
export function HowItWorks() {
  const { frames, records, failed } = usePictureRun();
  const reached = Math.max(survey, ...frames.keys());
  // The survey is known before the engine has been fetched, so the picture is never empty.
  const surveyed = useMemo(() => toFrame(pictureGround().cover), []);
  return (
    <section
      aria-label="How it works: one future of an invented marsh"
      className="flex min-w-0 flex-col border-t border-ink max-lg:h-[420px] lg:flex-1 lg:border-t-0"
    >
      <p className="sr-only">
        Three moments of the same ground. In {shown[0]} the drought has left bare mud between stands and a few
        survivors on old mounds, and people plan mounds of their own. In {shown[1]} and {shown[2]} plants have
        spread sideways from all of them. Below, a line of cover from {survey} to {last} falls in the drought
        of 2049 and 2050 and rises again.
      </p>
      <div className="flex min-h-0 flex-1">
        {shown.map((moment, i) => {
          const year = Math.min(moment, reached);
          return (
            <Moment
              key={moment}
              year={year}
              words={yearsOn(year - survey)}
              frame={frames.get(year) ?? surveyed}
              growing={!failed && year < moment}
            >
              {i === 0 && (
                <>
                  <PictureLabel
                    at={nearest(planned, { column: 40, row: 112 })}
                    lines={['a foothold people add:', 'planted mounds fly a flag']}
                  />
                  <PictureLabel
                    at={nearest(survivors, { column: 70, row: 236 })}
                    lines={['a foothold that survived', 'on an old mound']}
                  />
                </>
              )}
            </Moment>
          );
        })}
      </div>
      <PictureYearline {...{ records, failed }} year={Math.min(shown[2], reached)} />
    </section>
  );
}

const spec = pictureSpec();

function PictureYearline(props: { records: readonly YearRecord[]; year: number; failed: boolean }) {
  const { records, year, failed } = props;
  const box = useRef<HTMLDivElement>(null);
  const width = useWidth(box);
  const drought = spec.droughtIndex as number[];
  const tolerances = {
    open: spec.rates.tolerance,
    nearMound: spec.rates.tolerance - spec.rates.refugeShift,
  };
  const scale = yearlineScale({
    width,
    surveyYear: survey,
    lastYear: last,
    indices: [...drought, tolerances.nearMound],
    highestShare: 1,
  });
  const soFar = records.at(-1)?.year ?? survey;
  return (
    <div ref={box} className="relative overflow-hidden border-t border-ink">
      {width > 0 && (
        <YearlinePlot
          {...{ scale, surveyYear: survey, lastYear: last, records, tolerances }}
          year={year}
          availableUntil={soFar}
          droughtIndex={drought}
          pins={[
            { year: survey + 1, label: '' },
            { year: survey + 2, label: 'mounds' },
          ]}
          marks={[{ year: 2049, label: 'the next drought' }]}
          heading=""
        />
      )}
      {!scale.compact && (
        <p className="absolute top-3 left-6 w-[108px] text-note text-ink-2">
          {failed
            ? 'Invented ground. This browser could not run its future.'
            : 'Invented ground; one future, run by the engine as you look.'}
        </p>
      )}
    </div>
  );
}
