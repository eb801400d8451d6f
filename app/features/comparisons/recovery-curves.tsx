import { useState } from 'react';
import type { CurvePoint } from '#sim-core/index.ts';
import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import { useNarrow } from '#app/lib/use-media-query.ts';
import { LineKey } from './line-key.tsx';
import { dashOf, marksAt, widthOf } from './line-styles.ts';
import { EndLabels, OptionLine } from './option-line.tsx';
import { spreadLabels } from './spread-labels.ts';

const [left, top, plot, foot] = [52, 8, 176, 30];
/** height of a line of the numbers still open */
const openRow = 14;

export interface Curve {
  readonly name: string;
  readonly wait: boolean;
  /** share still open over years since the survey; empty before there are replicates */
  readonly curve: readonly CurvePoint[];
}

/**
 * Share of futures that have recovered by each year (one less Kaplan and Meier's), with 95 % bands, and below it how many
 * were still open.
 */
export function RecoveryCurves(props: {
  curves: readonly Curve[];
  surveyYear: number;
  years: number;
  /** place of the option that was decided for */
  chosen: number | undefined;
}) {
  const { curves, surveyYear, years } = props;
  const narrow = useNarrow();
  const width = narrow ? 400 : 600;
  const right = narrow ? 28 : 150;
  const [lit, setLit] = useState<number>();
  const height = top + plot + foot + openRow * curves.length;
  const x = (time: number) => left + ((width - left - right) * time) / years;
  const y = (share: number) => top + plot * (1 - share);
  const steps = (curve: readonly CurvePoint[], of: (point: CurvePoint) => number) => {
    let d = `M${x(0)} ${y(0)}`;
    for (const point of curve) d += `H${x(point.time).toFixed(1)}V${y(1 - of(point)).toFixed(1)}`;
    return `${d}H${x(years)}`;
  };
  /** the band's two edges as one outline */
  const band = (curve: readonly CurvePoint[]) => {
    const back = [...curve].reverse();
    let d = steps(curve, (p) => p.low);
    const lowest = curve.at(-1)?.high ?? 1;
    d += `L${x(years)} ${y(1 - lowest).toFixed(1)}`;
    for (const [i, point] of back.entries()) {
      const before = back[i + 1];
      d += `H${x(point.time).toFixed(1)}V${y(before ? 1 - before.high : 0).toFixed(1)}`;
    }
    return `${d}H${x(0)}Z`;
  };
  const openAt = (curve: readonly CurvePoint[], time: number) =>
    [...curve].reverse().find((point) => point.time <= time)?.open ?? 1;
  const ends = curves.map(({ curve }) => y(1 - openAt(curve, years)));
  const places = spreadLabels(ends, 14, top, top + plot - 4);
  const ticks = Array.from({ length: 5 }, (_, i) => Math.round((i * years) / 4));
  return (
    <figure>
      <figcaption className="flex flex-wrap justify-between gap-x-4">
        <b>Recovery</b>
        <span className="text-note text-ink-2">
          share of futures recovered by then; bands 95 %; below, how many are still open
        </span>
      </figcaption>
      <svg viewBox={`0 0 ${width} ${height}`} className="mt-1 block w-full" aria-hidden="true">
        {[0, 0.5, 1].map((share) => (
          <g key={share}>
            <path d={`M${left} ${y(share)}H${width - right}`} className="stroke-rule" />
            <text x={left - 6} y={y(share) + 4} textAnchor="end" className="fill-ink-2 text-axis">
              {Math.round(100 * share)} %
            </text>
          </g>
        ))}
        {curves.map(({ name, curve, wait }, i) => (
          <OptionLine
            key={name}
            place={i}
            {...{ wait, lit }}
            line={steps(curve, (p) => p.open)}
            band={curve.length > 0 ? band(curve) : undefined}
            marked={[0.3, 0.55, 0.8].map((share) => {
              const time = years * (share + (i / curves.length) * 0.2);
              return [x(time), y(1 - openAt(curve, time))] as const;
            })}
          />
        ))}
        {!narrow && (
          <EndLabels
            lit={lit}
            longest={20}
            labels={ends.map((at, i) => ({
              x: width - right + 24,
              y: places[i] + 4,
              text: `${curves[i].name}${props.chosen === i ? ', chosen' : ''}`,
              from: [width - right, at] as const,
            }))}
          />
        )}
        {ticks.map((time) => (
          <g key={time}>
            <path d={`M${x(time)} ${y(0)}v5`} className="stroke-ink" />
            <text
              x={x(time)}
              y={y(0) + 18}
              textAnchor="middle"
              className="fill-ink font-mono text-axis font-semibold"
            >
              {surveyYear + time}
            </text>
          </g>
        ))}
        {curves.map(({ name, curve, wait }, i) => {
          const at = y(0) + foot + openRow * (i + 0.7);
          return (
            <g key={name}>
              <path
                d={`M2 ${at - 4}H30`}
                className="stroke-ink"
                strokeWidth={widthOf(wait)}
                strokeDasharray={dashOf(i)}
              />
              <path
                d={marksAt(i, [[16, at - 4]])}
                className={wait ? 'fill-ground stroke-ink' : 'fill-ink stroke-ground'}
              />
              {ticks.map((time) => (
                <text key={time} x={x(time)} y={at} textAnchor="middle" className="fill-ink-2 text-axis">
                  {Math.round((curve[0]?.atRisk ?? 0) * openAt(curve, time))}
                </text>
              ))}
            </g>
          );
        })}
      </svg>
      <LineKey entries={curves} chosen={props.chosen} lit={lit} onLit={setLit} />
      <ReadAsTable
        caption="Share of futures recovered by the end of the year, with its 95 % band"
        heads={['Year', ...curves.map(({ name }) => name)]}
        rows={ticks.map((time) => [
          String(surveyYear + time),
          ...curves.map(({ curve }) => {
            const at = [...curve].reverse().find((point) => point.time <= time);
            return at
              ? `${formatNumber(100 * (1 - at.open), 0)} % (${formatNumber(100 * (1 - at.high), 0)} to ${formatNumber(100 * (1 - at.low), 0)})`
              : '0 %';
          }),
        ])}
      />
    </figure>
  );
}
