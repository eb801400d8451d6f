import { useRef, type KeyboardEvent, type PointerEvent, type ReactNode } from 'react';
import { formatArea } from '#app/lib/formats.ts';
import { useWidth } from './use-width.ts';
import { usePlayback } from './use-playback.ts';
import { yearForKey } from './playback.ts';
import { sayYear } from './say-year.ts';
import { YearlinePlot, type Tolerances, type YearlineNote } from './YearlinePlot.tsx';
import type { YearRecord } from './year-records.ts';
import { yearlineScale } from './yearline-scale.ts';

export interface YearlineProps {
  readonly surveyYear: number;
  readonly lastYear: number;
  /** year that the map shows */
  readonly year: number;
  readonly onYear: (year: number) => void;
  /** one a year, from the year after the survey */
  readonly droughtIndex: readonly number[];
  readonly tolerances?: Tolerances;
  /** this run so far, survey first; empty where there is no run */
  readonly records?: readonly YearRecord[];
  /** a second line, dashed, such as Wait */
  readonly compare?: { readonly label: string; readonly records: readonly YearRecord[] };
  /** works, on the datum as pin flags */
  readonly pins?: readonly YearlineNote[];
  /** moments worth a word, such as `80 % closed` */
  readonly marks?: readonly YearlineNote[];
  /** last year that can be shown; where a run is still growing, its latest */
  readonly availableUntil?: number;
  readonly heading?: string;
  /** a line of words below the year */
  readonly reading?: ReactNode;
  readonly autoPlay?: boolean;
  /** name for those who hear it */
  readonly label?: string;
}

const none: readonly never[] = [];
const button =
  'grid size-[30px] place-items-center text-ink disabled:text-ink-3 touch:size-12 disabled:cursor-not-allowed';

/** The one way to move in time: drag, click, arrow keys, Home and End, page keys by five years, space to play. */
export function Yearline(props: YearlineProps) {
  const { surveyYear, lastYear, year, onYear, droughtIndex, tolerances, compare, autoPlay } = props;
  const { records = none, pins = none, marks = none, label = 'Year' } = props;
  const latest = records.at(-1)?.year ?? lastYear;
  const availableUntil = Math.min(lastYear, props.availableUntil ?? latest);
  const range = { first: surveyYear, last: availableUntil };
  const { playing, toggle, go } = usePlayback({ ...range, year, onYear, autoPlay });
  const box = useRef<HTMLDivElement>(null);
  const width = useWidth(box);
  const scale = yearlineScale({
    width,
    surveyYear,
    lastYear,
    indices: [...droughtIndex, ...(tolerances ? [tolerances.open, tolerances.nearMound ?? 0] : [])],
    highestShare: Math.max(1, ...records.map((r) => r.coverShare)),
  });
  const happenings = [...pins, ...marks].filter((n) => n.year === year).map((n) => n.label);
  const record = records.find((r) => r.year === year);
  const words = sayYear(year, record, droughtIndex[year - surveyYear - 1], happenings);

  const pointer = (event: PointerEvent<HTMLDivElement>) => {
    const { left } = event.currentTarget.getBoundingClientRect();
    const to = Math.min(availableUntil, scale.yearAt(event.clientX - left));
    if (to !== year || playing) go(to);
  };
  const press = (event: PointerEvent<HTMLDivElement>) => {
    if (event.button !== 0) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    pointer(event);
  };
  const drag = (event: PointerEvent<HTMLDivElement>) => {
    if (event.currentTarget.hasPointerCapture(event.pointerId)) pointer(event);
  };
  const key = (event: KeyboardEvent<HTMLDivElement>) => {
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    const to = yearForKey(event.key, year, range);
    if (to !== undefined) go(to);
    else if (event.key === ' ') toggle();
    else return;
    event.preventDefault();
  };

  const controls = (
    <div className={scale.compact ? 'ml-auto flex' : 'mt-0.5 flex'}>
      <button
        type="button"
        className={button}
        aria-label="Back one year"
        disabled={year <= surveyYear}
        onClick={() => {
          go(year - 1);
        }}
      >
        <Icon d="M11 1L4 7l7 6z" bar={2} />
      </button>
      <button
        type="button"
        className={button}
        aria-label={playing ? 'Pause' : 'Play'}
        disabled={availableUntil <= surveyYear}
        onClick={toggle}
      >
        <Icon d={playing ? 'M2 1h3.5v12H2zM8.500 1H12v12H8.500z' : 'M2 1l11 6-11 6z'} />
      </button>
      <button
        type="button"
        className={button}
        aria-label="On one year"
        disabled={year >= availableUntil}
        onClick={() => {
          go(year + 1);
        }}
      >
        <Icon d="M3 1l7 6-7 6z" bar={12} />
      </button>
    </div>
  );
  const nth = year === surveyYear ? 'survey' : `year ${year - surveyYear} of ${lastYear - surveyYear}`;
  const note = <span className="text-note text-ink-2">{props.reading ?? nth}</span>;
  const figure = 'font-light leading-none tracking-[-0.02em]';
  return (
    <section aria-label="Yearline" className="relative bg-ground select-none" data-year={year}>
      <div
        ref={box}
        role="slider"
        tabIndex={0}
        aria-label={label}
        aria-valuemin={surveyYear}
        aria-valuemax={availableUntil}
        aria-valuenow={year}
        aria-valuetext={words}
        className="cursor-ew-resize touch-pan-y outline-offset-[-3px]"
        onPointerDown={press}
        onPointerMove={drag}
        onKeyDown={key}
      >
        {width > 0 && (
          <YearlinePlot
            {...{ scale, surveyYear, lastYear, year, availableUntil, droughtIndex, tolerances }}
            {...{ records, compare, pins, marks }}
            heading={props.heading ?? headingOf(records, scale.compact)}
          />
        )}
      </div>
      {scale.compact ? (
        <div className="flex h-12 items-center gap-2.5 border-y border-y-rule px-3">
          <span className={`text-[28px] ${figure}`}>{year}</span>
          {note}
          {controls}
        </div>
      ) : (
        <div className="absolute top-2.5 left-5 w-[130px]">
          <div className={`ml-1 text-[34px] ${figure}`}>{year}</div>
          <div className="mt-0.5 ml-1 leading-tight">{note}</div>
          {controls}
        </div>
      )}
    </section>
  );
}

/** What is drawn, with the size of the tallest column, as columns have no scale of their own. */
function headingOf(records: readonly YearRecord[], compact: boolean): string {
  const most = Math.max(0, ...records.map((r) => r.closingArea));
  if (compact) return records.length > 0 ? 'Cover, and drought index below' : 'Drought index, down from 0';
  return most > 0 ? `Columns: area closing that year, ${formatArea(most)} at most, in the map’s colours` : '';
}

function Icon({ d, bar }: { d: string; bar?: number }) {
  return (
    <svg width={14} height={14} aria-hidden="true">
      <path d={d} fill="currentColor" />
      {bar !== undefined && <path d={`M${bar} 1v12`} stroke="currentColor" strokeWidth={2} />}
    </svg>
  );
}
