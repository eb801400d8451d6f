import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatArea, formatShare } from '#app/lib/formats.ts';
import { useNarrow } from '#app/lib/use-media-query.ts';
import type { Standing } from '#sim-core/compare/on-track.ts';
import { quantiles } from '#sim-core/ensemble/quantile.ts';

const height = 190;
const [left, right, top, bottom] = [64, 14, 10, 26];

/** A newer survey and where it lies among the futures of its year. */
export interface SurveyOnTrack {
  readonly year: number;
  /** m² */
  readonly surveyed: number;
  readonly standing: Standing;
}

/** Covered area of an option's futures, middle nine tenths and median, with what was surveyed since. */
export function TrackFan(props: {
  surveyYear: number;
  /** covered area of each future, year by year from the survey on, m² */
  futures: readonly (readonly number[])[];
  surveys: readonly SurveyOnTrack[];
  /** the survey that the sentence beside it is about */
  chosen: number;
}) {
  const { surveyYear, futures, surveys } = props;
  const width = useNarrow() ? 400 : 560;
  const years = futures[0].length;
  const fan = Array.from({ length: years }, (_, i) =>
    quantiles(
      futures.map((areas) => areas[i]),
      [0.05, 0.5, 0.95],
    ),
  );
  const most =
    Math.max(1, ...fan.map(([, , high]) => high), ...surveys.map(({ surveyed }) => surveyed)) * 1.05;
  const x = (year: number) => left + ((width - left - right) * (year - surveyYear)) / Math.max(1, years - 1);
  const y = (area: number) => top + (height - top - bottom) * (1 - area / most);
  const line = (of: number) => fan.map((at, i) => `${x(surveyYear + i).toFixed(1)} ${y(at[of]).toFixed(1)}`);
  return (
    <figure>
      <figcaption className="text-note text-ink-2">
        Covered area: nine tenths of the futures, their median, and what was surveyed (flags)
      </figcaption>
      <svg viewBox={`0 0 ${width} ${height}`} className="mt-1 block w-full" aria-hidden="true">
        <path d={`M${[...line(2), ...line(0).reverse()].join('L')}Z`} className="fill-cover-3" />
        <path d={`M${line(1).join('L')}`} fill="none" className="stroke-ink" strokeWidth={1.6} />
        <path d={`M${left} ${top}V${height - bottom}H${width - right}`} fill="none" className="stroke-ink" />
        {[0, most].map((area) => (
          <text
            key={area}
            x={left - 6}
            y={y(area) + (area === 0 ? 0 : 8)}
            textAnchor="end"
            className="fill-ink-2 text-axis"
          >
            {formatArea(area)}
          </text>
        ))}
        {[surveyYear, surveyYear + years - 1].map((year, i) => (
          <text
            key={year}
            x={x(year)}
            y={height - 8}
            textAnchor={i === 0 ? 'start' : 'end'}
            className="fill-ink-2 text-axis"
          >
            {year}
          </text>
        ))}
        {surveys.map(({ year, surveyed }) => (
          <circle
            key={year}
            cx={x(year)}
            cy={y(surveyed)}
            r={year === props.chosen ? 6 : 4}
            className="fill-flag stroke-ink"
            strokeWidth={1.5}
          />
        ))}
      </svg>
      <ReadAsTable
        caption="Surveyed cover against the futures of its year"
        heads={['Year', 'Surveyed', 'Nine tenths of the futures', 'Futures below it', 'It is']}
        rows={surveys.map(({ year, surveyed, standing }) => [
          String(year),
          formatArea(surveyed),
          `${formatArea(standing.low)} to ${formatArea(standing.high)}`,
          formatShare(standing.shareBelow),
          standing.track,
        ])}
      />
    </figure>
  );
}
