import { useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';
import type { ComparisonPlan } from '#contract/comparisons.ts';
import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatArea } from '#app/lib/formats.ts';
import { useNarrow } from '#app/lib/use-media-query.ts';
import type { OutlookFigures } from '#sim-core/compare/comparison-figures.ts';
import { LineKey } from './line-key.tsx';
import { EndLabels, OptionLine } from './option-line.tsx';
import { spreadLabels } from './spread-labels.ts';

const height = 170;
const [left, top, bottom] = [64, 22, 26];
/** years between the marks of a line; those of the next option stand a little later */
const marksEvery = 8;

/**
 * The yearline of a comparison: median cover of every option over the years, with the band of the middle half of its
 * futures, and the playhead that all maps follow.
 */
export function CoverLines(props: {
  plan: ComparisonPlan;
  figures: OutlookFigures | undefined;
  /** year that the maps show, one of the kept ones */
  year: number;
  onYear: (year: number) => void;
  /** the maps show closing years, so the playhead moves nothing */
  closing: boolean;
  /** place of the option that was decided for */
  chosen?: number | undefined;
}) {
  const { plan, figures, year, onYear } = props;
  const { surveyYear, years } = plan.common;
  const kept = plan.mapYears;
  const narrow = useNarrow();
  const width = narrow ? 420 : 1120;
  const right = narrow ? 24 : 176;
  const [lit, setLit] = useState<number>();
  const box = useRef<SVGSVGElement>(null);
  const options = figures?.options ?? [];
  const most = Math.max(1, ...options.flatMap(({ summary }) => [...(summary.fan[4] ?? [])]));
  const x = (at: number) => left + ((width - left - right) * (at - surveyYear)) / years;
  const y = (area: number) => top + (height - top - bottom) * (1 - area / most);
  const line = (values: Float64Array) =>
    `M${Array.from(values, (v, i) => `${x(surveyYear + i).toFixed(1)} ${y(v).toFixed(1)}`).join('L')}`;
  const near = (to: number) =>
    kept.reduce((best, each) => (Math.abs(each - to) < Math.abs(best - to) ? each : best), kept[0]);
  const point = (event: PointerEvent<HTMLDivElement>) => {
    const rect = box.current?.getBoundingClientRect();
    if (!rect) return;
    const at = ((event.clientX - rect.left) / rect.width) * width;
    onYear(near(surveyYear + ((at - left) / (width - left - right)) * years));
  };
  const key = (event: KeyboardEvent<HTMLDivElement>) => {
    const place = kept.indexOf(year);
    const moves: Record<string, number> = {
      ArrowLeft: place - 1,
      ArrowRight: place + 1,
      PageDown: place - 5,
      PageUp: place + 5,
      Home: 0,
      End: kept.length - 1,
    };
    if (!(event.key in moves)) return;
    onYear(kept[Math.min(kept.length - 1, Math.max(0, moves[event.key]))]);
    event.preventDefault();
  };
  const ends = options.map(({ summary: { fan } }) => y(fan[2]?.[years] ?? 0));
  const places = spreadLabels(ends, 14, top, height - bottom - 4);
  const pins = [...new Set(plan.options.flatMap(({ actions }) => actions.map((action) => action.year)))];
  const between = narrow ? 3 : 6;
  const ticks = Array.from({ length: between + 1 }, (_, i) => surveyYear + Math.round((i * years) / between));
  return (
    <figure className="pt-2">
      <div
        role="slider"
        tabIndex={0}
        aria-label="Year that the maps show"
        aria-valuemin={kept[0]}
        aria-valuemax={kept[kept.length - 1]}
        aria-valuenow={year}
        aria-valuetext={`${year}${options.map(({ name, summary }) => `; ${name} ${formatArea(summary.fan[2]?.[year - surveyYear] ?? 0)}`).join('')}`}
        className="cursor-ew-resize touch-pan-y outline-offset-2 select-none"
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId);
          point(event);
        }}
        onPointerMove={(event) => {
          if (event.currentTarget.hasPointerCapture(event.pointerId)) point(event);
        }}
        onKeyDown={key}
      >
        <svg ref={box} viewBox={`0 0 ${width} ${height}`} className="block w-full" aria-hidden="true">
          <path d={`M${left} ${y(0)}H${width - right}`} className="stroke-ink" />
          <text x={left - 8} y={y(most) + 10} textAnchor="end" className="fill-ink-2 text-axis">
            {formatArea(most)}
          </text>
          <text x={left - 8} y={y(0)} textAnchor="end" className="fill-ink-2 text-axis">
            0
          </text>
          {options.map(({ name, wait, summary: { fan } }, i) =>
            fan.length === 5 ? (
              <OptionLine
                key={name}
                place={i}
                {...{ wait, lit }}
                line={line(fan[2])}
                band={`${line(fan[3])}L${[...fan[1]]
                  .map((v, at) => `${x(surveyYear + at).toFixed(1)} ${y(v).toFixed(1)}`)
                  .reverse()
                  .join('L')}Z`}
                marked={markedYears(years, i, options.length).map(
                  (at) => [x(surveyYear + at), y(fan[2][at])] as const,
                )}
              />
            ) : null,
          )}
          {!narrow && (
            <EndLabels
              lit={lit}
              longest={24}
              labels={ends.map((at, i) => ({
                x: width - right + 26,
                y: places[i] + 4,
                text: `${options[i].name}${props.chosen === i ? ', chosen' : ''}`,
                from: [width - right, at] as const,
              }))}
            />
          )}
          {pins.map((at) => (
            <g key={at}>
              <path d={`M${x(at)} ${y(0)}v-40`} className="stroke-ink" strokeWidth={1.5} />
              <path d={`M${x(at)} ${y(0) - 40}h10v8h-10z`} className="fill-flag" />
            </g>
          ))}
          {ticks.map((at) => (
            <g key={at}>
              <path d={`M${x(at)} ${y(0)}v5`} className="stroke-ink" />
              <text
                x={x(at)}
                y={height - 6}
                textAnchor="middle"
                className="fill-ink font-mono text-axis font-semibold"
              >
                {at}
              </text>
            </g>
          ))}
          {!props.closing && (
            <>
              <path d={`M${x(year)} 8V${y(0) + 4}`} className="stroke-ink" strokeWidth={1.6} />
              <path d={`M${x(year) - 7} 3h14v7l-7 7-7-7z`} className="fill-ink" />
              <text
                x={x(year) + (x(year) > width - 60 ? -11 : 11)}
                y={13}
                textAnchor={x(year) > width - 60 ? 'end' : 'start'}
                className="fill-ink text-axis font-semibold"
              >
                {year}
              </text>
            </>
          )}
        </svg>
      </div>
      <figcaption className="flex flex-wrap items-center gap-x-6 text-note text-ink-2">
        <span>
          Covered area: median of the futures; bands hold the middle half. Maps are kept of{' '}
          {kept.length > years ? 'every year' : `${kept.length} of ${years + 1} years`}.
        </span>
        <LineKey entries={options} chosen={props.chosen} lit={lit} onLit={setLit} />
      </figcaption>
      {options.length > 0 && (
        <ReadAsTable
          caption="Covered area by year: median of the futures, and the middle half"
          heads={['Year', ...options.map(({ name }) => name)]}
          rows={ticks.map((at) => [
            String(at),
            ...options.map(({ summary: { fan } }) =>
              fan.length === 5
                ? `${formatArea(fan[2][at - surveyYear])} (${formatArea(fan[1][at - surveyYear])} to ${formatArea(fan[3][at - surveyYear])})`
                : '–',
            ),
          ])}
        />
      )}
    </figure>
  );
}

/** Years after the survey in which an option's line carries its mark, apart from those of the others. */
const markedYears = (years: number, place: number, of: number): number[] =>
  Array.from({ length: Math.ceil(years / marksEvery) }, (_, i) =>
    Math.round(marksEvery * (i + (place + 0.5) / of)),
  ).filter((at) => at < years);
