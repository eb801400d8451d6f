import { Fragment, type ReactNode } from 'react';
import { formatNumber } from '#app/lib/formats.ts';
import { closingColour } from './closing-colour.ts';
import type { YearRecord } from './year-records.ts';
import { labelledYears, labelsThatFit, type YearlineScale } from './yearline-scale.ts';

/** Something dated that stands on the yearline. */
export interface YearlineNote {
  readonly year: number;
  readonly label: string;
}
/** Drought indices at which half of the drought loss acts, with neither neighbours nor exposure. */
export interface Tolerances {
  readonly open: number;
  readonly nearMound?: number;
}

export interface YearlinePlotProps {
  readonly scale: YearlineScale;
  readonly surveyYear: number;
  readonly lastYear: number;
  readonly year: number;
  readonly availableUntil: number;
  readonly droughtIndex: readonly number[];
  readonly tolerances?: Tolerances;
  readonly records: readonly YearRecord[];
  readonly compare?: { readonly label: string; readonly records: readonly YearRecord[] };
  readonly pins: readonly YearlineNote[];
  readonly marks: readonly YearlineNote[];
  readonly heading: string;
}

const ink = 'var(--color-ink)';
const ground = 'var(--color-ground)';
const halo = { paintOrder: 'stroke', stroke: ground, strokeWidth: 4, strokeLinejoin: 'round' } as const;
const note = 'fill-ink-2 text-note';
const strong = 'fill-ink text-note font-semibold';

/** The tide record: drought hangs below the datum, cover rises above, columns say what closes in each year. */
export function YearlinePlot(props: YearlinePlotProps) {
  const { scale, surveyYear, year, records, compare, availableUntil } = props;
  return (
    <svg width={scale.width} height={scale.height} className="block overflow-visible" aria-hidden="true">
      <DroughtBars {...props} />
      <Axes scale={scale} />
      <ClosingColumns {...props} />
      {compare && <CoverLine scale={scale} records={compare.records} dashed />}
      <CoverLine scale={scale} records={records} />
      {compare && <CompareLabel scale={scale} compare={compare} records={records} />}
      <path d={`M0 ${scale.datum + 0.5}H${scale.width}`} stroke={ink} strokeWidth={1.5} />
      <YearTicks {...props} />
      <Notes {...props} />
      <Playhead scale={scale} year={year} />
      {availableUntil < props.lastYear && availableUntil >= surveyYear && (
        <path d={`M${scale.x(availableUntil)} ${scale.datum - 6}v12`} stroke={ink} strokeWidth={3} />
      )}
    </svg>
  );
}

function DroughtBars({ scale, surveyYear, droughtIndex, tolerances, availableUntil }: YearlinePlotProps) {
  const { datum, barWidth, left, right, compact } = scale;
  const tolerance = (index: number, dashes: string, words: string, row: number): ReactNode => {
    const y = datum + scale.length(index) + 0.5;
    const written = datum + 13 * (row + 1);
    return (
      <>
        <path d={`M${left} ${y}H${right}`} stroke={ink} strokeDasharray={dashes} strokeOpacity={0.85} />
        {!compact && (
          <>
            <path d={`M${right + 12} ${written - 4}h10`} stroke={ink} strokeDasharray={dashes} />
            <text x={right + 26} y={written} className={note}>
              {words}
            </text>
          </>
        )}
      </>
    );
  };
  const near = tolerances?.nearMound;
  return (
    <>
      {droughtIndex.map((index, i) => {
        const year = surveyYear + 1 + i;
        const dry = tolerances !== undefined && index < tolerances.open;
        if (scale.length(index) === 0) return null;
        return (
          <rect
            key={year}
            x={scale.x(year) - barWidth * 0.26}
            y={datum + 1}
            width={barWidth * 0.52}
            height={scale.length(index)}
            fill={dry ? ink : 'var(--color-shore)'}
            fillOpacity={(dry ? 1 : 0.62) * (year > availableUntil ? 0.45 : 1)}
          />
        );
      })}
      {tolerances && tolerance(tolerances.open, '1 3', 'open ground', 1)}
      {near !== undefined && tolerance(near, '4 2', 'near a mound', 2)}
      {tolerances && !compact && (
        <text x={right + 12} y={datum + 13} className={note}>
          dies beyond:
        </text>
      )}
    </>
  );
}

/** Cover in per cent up from the datum, the drought index down from it. */
function Axes({ scale }: { scale: YearlineScale }) {
  const { left, right, datum, compact } = scale;
  const axis = 'fill-ink-2 font-mono text-axis';
  const edge = left - (compact ? 6 : 8);
  return (
    <>
      {[0.5, 1].map((v) => (
        <path key={v} d={`M${left} ${scale.y(v)}H${right}`} stroke="var(--color-rule)" />
      ))}
      {scale.indexTicks.map((index) => (
        <path key={index} d={`M${left - 4} ${datum + scale.length(index) + 0.5}h4`} stroke={ink} />
      ))}
      <g textAnchor="end" className={axis}>
        <text x={edge} y={scale.y(1) + 4}>
          100 %
        </text>
        <text x={edge} y={scale.y(0.5) + 4}>
          50
        </text>
        {scale.indexTicks.map((index) => (
          <text key={index} x={edge} y={datum + scale.length(index) + (index === 0 ? -3 : 4)}>
            {formatNumber(index)}
          </text>
        ))}
      </g>
      {!compact && (
        <g textAnchor="end">
          <text x={edge - 28} y={datum - 4} className={strong}>
            cover
          </text>
          <text x={edge - 28} y={datum + 15} className={strong}>
            drought
          </text>
          <text x={edge - 28} y={datum + 29} className={strong}>
            index
          </text>
        </g>
      )}
    </>
  );
}

function ClosingColumns({ scale, records, surveyYear, lastYear }: YearlinePlotProps) {
  const { datum, top, barWidth } = scale;
  const columns = records.filter((r) => r.year > surveyYear && r.closingArea > 0);
  const most = Math.max(...columns.map((r) => r.closingArea));
  return columns.map((r) => {
    const height = Math.max(1, (r.closingArea / most) * (datum - top) * 0.66);
    return (
      <rect
        key={r.year}
        x={scale.x(r.year) - barWidth * 0.44}
        y={datum - height}
        width={barWidth * 0.88}
        height={height}
        style={{ fill: closingColour(r.year, surveyYear, lastYear) }}
      />
    );
  });
}

function CoverLine(props: { scale: YearlineScale; records: readonly YearRecord[]; dashed?: boolean }) {
  const { scale, records, dashed = false } = props;
  if (records.length === 0) return null;
  const points = records.map((r) => `${scale.x(r.year).toFixed(1)} ${scale.y(r.coverShare).toFixed(1)}`);
  const d = `M${points.join('L')}`;
  const width = dashed ? 1.3 : 2.2;
  return (
    <>
      <path d={d} fill="none" stroke={ground} strokeWidth={width + 2.6} strokeLinejoin="round" />
      <path
        d={d}
        fill="none"
        stroke={ink}
        strokeWidth={width}
        strokeDasharray={dashed ? '3 3' : undefined}
        strokeLinejoin="round"
      />
    </>
  );
}

/** The name of the dashed line, where the two lines stand furthest apart. */
function CompareLabel({
  scale,
  compare,
  records,
}: Pick<YearlinePlotProps, 'scale' | 'records'> & { compare: NonNullable<YearlinePlotProps['compare']> }) {
  const own = new Map(records.map((r) => [r.year, r.coverShare]));
  let widest: YearRecord | undefined;
  let gap = 0.01;
  for (const r of compare.records) {
    const apart = Math.abs((own.get(r.year) ?? r.coverShare) - r.coverShare);
    if (apart > gap) {
      gap = apart;
      widest = r;
    }
  }
  const at = widest ?? compare.records[Math.floor(compare.records.length / 2)];
  if (scale.compact || !at) return null;
  const x = Math.min(scale.x(at.year), scale.right - 50);
  return (
    <text x={x} y={scale.y(at.coverShare) + 16} textAnchor="middle" className={note} style={halo}>
      {compare.label}
    </text>
  );
}

function YearTicks({ scale, surveyYear, lastYear, availableUntil }: YearlinePlotProps) {
  const labelled = new Set(labelledYears(surveyYear, lastYear, scale.yearWidth, 46));
  const years = Array.from({ length: lastYear - surveyYear + 1 }, (_, i) => surveyYear + i);
  return years
    .filter((y) => labelled.has(y) || scale.yearWidth >= 4)
    .map((y) => (
      <Fragment key={y}>
        <path d={`M${scale.x(y) + 0.5} ${scale.datum}v${labelled.has(y) ? 5 : 0}`} stroke={ink} />
        {labelled.has(y) && (
          <text
            x={scale.x(y)}
            y={scale.labels}
            textAnchor="middle"
            className={`font-mono text-axis ${y === surveyYear ? 'fill-ink-2' : 'fill-ink font-semibold'}`}
            opacity={y > availableUntil ? 0.75 : 1}
          >
            {y}
          </text>
        )}
      </Fragment>
    ));
}

function Notes({ scale, pins, marks, heading, year: shown }: YearlinePlotProps) {
  const { datum, compact, left, right, top } = scale;
  const pinHeight = compact ? 44 : 64;
  const flag = compact ? 7 : 12;
  const words = new Map<number, string>();
  for (const p of pins) words.set(p.year, [words.get(p.year), p.label].filter(Boolean).join(', '));
  const flags = [...words].map(([year, label]) => ({ year, label, x: scale.x(year) + flag + 5 }));
  // The playhead needs room for its head beside the word of its own year.
  const ticks = marks.map((m) => ({ ...m, x: scale.x(m.year) + (m.year === shown ? 11 : 5) }));
  // A label must stand clear of the flags after it, then of the labels before it.
  const clear = flags.filter((p) => !flags.some((f) => f.x > p.x && f.x - p.x < p.label.length * 6.6));
  const pinWords = compact ? [] : labelsThatFit(clear, 0, right);
  // The heading makes way for the playhead; marks matter more than it, as the legend says it too.
  const long = heading.length * 6.2;
  const behind = scale.x(shown) < left + long + 8;
  // A playhead in the middle of a narrow yearline leaves room before it only.
  const before = behind && scale.x(shown) + 14 + long > scale.width;
  const begins = before ? 2 : behind ? scale.x(shown) + 14 : left;
  const crowded = ticks.some((t) => t.x < begins + long);
  return (
    <>
      {(compact || !crowded) && (
        <text x={begins} y={top - (compact ? 8 : 6)} className={note} style={compact ? halo : undefined}>
          {heading}
        </text>
      )}
      {ticks.map((m) => (
        <path key={`${m.year} ${m.label}`} d={`M${scale.x(m.year)} ${top - 8}V${scale.y(1)}`} stroke={ink} />
      ))}
      {labelsThatFit(compact ? [] : ticks, 0, scale.width).map((m) => (
        <text
          key={`${m.year} ${m.label}`}
          x={m.x}
          y={top - 6}
          className={m.year === shown ? strong : note}
          style={halo}
        >
          {m.label}
        </text>
      ))}
      {flags.map(({ year }) => {
        const x = scale.x(year);
        return (
          <Fragment key={year}>
            <path d={`M${x} ${datum}V${datum - pinHeight}`} stroke={ground} strokeWidth={4} />
            <path d={`M${x} ${datum}V${datum - pinHeight}`} stroke={ink} strokeWidth={1.6} />
            <path d={`M${x} ${datum - pinHeight}h${flag}v9h-${flag}z`} fill="var(--color-flag)" />
          </Fragment>
        );
      })}
      {pinWords.map((p) => (
        <text key={p.year} x={p.x} y={datum - pinHeight + 8.5} className={strong} style={halo}>
          {p.label}
        </text>
      ))}
    </>
  );
}

function Playhead({ scale, year }: { scale: YearlineScale; year: number }) {
  const x = scale.x(year);
  const head = scale.compact ? 8 : 14;
  const line = `M${x} ${head}V${scale.datum + scale.hang + 4}`;
  return (
    <>
      <path d={line} stroke={ground} strokeWidth={4} />
      <path d={line} stroke={ink} strokeWidth={1.6} />
      <path
        d={`M${x - 7} ${head - 3}h14v7l-7 7-7-7z`}
        fill={ink}
        stroke={ground}
        strokeWidth={1.5}
        strokeLinejoin="round"
      />
    </>
  );
}
