import type { CurvePoint } from '#sim-core/index.ts';
import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import { useNarrow } from '#app/lib/use-media-query.ts';
import { dashOf, widthOf } from './line-styles.ts';

const [left, right, top, plot, foot] = [52, 26, 8, 176, 30];
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
export function RecoveryCurves(props: { curves: readonly Curve[]; surveyYear: number; years: number }) {
  const { curves, surveyYear, years } = props;
  const width = useNarrow() ? 400 : 560;
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
        {curves.map(({ name, curve }) =>
          curve.length > 0 ? <path key={name} d={band(curve)} className="fill-shore" opacity={0.22} /> : null,
        )}
        {curves.map(({ name, curve, wait }, i) => (
          <path
            key={name}
            d={steps(curve, (p) => p.open)}
            fill="none"
            className="stroke-ink"
            strokeWidth={widthOf(wait)}
            strokeDasharray={dashOf(i)}
          />
        ))}
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
                d={`M4 ${at - 4}H34`}
                className="stroke-ink"
                strokeWidth={widthOf(wait)}
                strokeDasharray={dashOf(i)}
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
      <Key entries={curves} />
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

/** Which line is whose. */
export function Key({ entries }: { entries: readonly { name: string; wait: boolean }[] }) {
  return (
    <ul className="flex flex-wrap gap-x-5 text-note">
      {entries.map(({ name, wait }, i) => (
        <li key={name} className="flex items-center gap-2">
          <svg width={34} height={8} aria-hidden="true">
            <path
              d="M0 4H34"
              className="stroke-ink"
              strokeWidth={widthOf(wait)}
              strokeDasharray={dashOf(i)}
            />
          </svg>
          {name}
        </li>
      ))}
    </ul>
  );
}
