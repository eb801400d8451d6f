import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import { allParameters } from '#sim-core/spec/all-parameters.ts';
import { factorLabel } from '#sim-core/matters/matters-words.ts';
import { triedShares, type StudyFactor } from '#sim-core/matters/study-design.ts';
import type { RateCurve, StudyFigures } from '#sim-core/matters/study-figures.ts';
import { swingOf } from '#sim-core/matters/weights.ts';
import { FactorBars } from './factor-bars.tsx';

type OneAtATime = Extract<StudyFigures, { method: 'one-at-a-time' }>;
interface ChartProps {
  readonly figures: OneAtATime;
  readonly unit: string;
  readonly digits: number;
}
const unitOf = (factor: StudyFactor) =>
  factor === 'luck' ? '' : allParameters[factor].unit.replace(/^–$/, '');
const valueOf = (value: number) => formatNumber(value, Math.abs(value) < 0.1 ? 4 : 2);

/** What is measured with each rate at its 5 % and its 95 % value, the others at their medians. */
export function Tornado({ figures, unit, digits }: ChartProps) {
  const curves = figures.curves.toSorted((a, b) => swingOf(b) - swingOf(a));
  const rows = [
    ...curves.map((curve) => ({
      label: factorLabel(curve.factor),
      ends: [valueOf(curve.values[0]), `${valueOf(curve.values[4])} ${unitOf(curve.factor)}`.trim()] as const,
      low: curve.outputs[0],
      high: curve.outputs[4],
    })),
    ...(figures.luck
      ? [{ label: factorLabel('luck'), ends: undefined, low: figures.luck[0], high: figures.luck[1] }]
      : []),
  ];
  const values = rows.flatMap(({ low, high }) => [low, high, figures.middle]);
  const [least, most] = [Math.min(...values), Math.max(...values)];
  const room = (most - least) * 0.06;
  return (
    <figure className="max-w-[760px]">
      <figcaption className="flex flex-wrap justify-between gap-x-4">
        <b>One rate at a time</b>
        <span className="text-note text-ink-2">
          {unit} from the rate’s 5 % value (open) to its 95 % value (filled); others at their medians
        </span>
      </figcaption>
      <FactorBars
        domain={[least - room, most + room]}
        base={figures.middle}
        digits={digits}
        rows={rows.map(({ label, low, high, ends }) => ({
          label,
          bars: ends
            ? [
                { from: figures.middle, to: low, tone: 'open' },
                { from: figures.middle, to: high, tone: 'full' },
              ]
            : [{ from: low, to: high, tone: 'open' }],
        }))}
      />
      <ReadAsTable
        caption={`What is measured at the ends of each rate, ${unit}; ${formatNumber(figures.middle, digits)} at the medians`}
        heads={['Rate', 'From', 'To', 'At 5 %', 'At 95 %']}
        rows={rows.map(({ label, ends, low, high }) => [
          label,
          ...(ends ?? ['futures’ 5 %', 'futures’ 95 %']),
          formatNumber(low, digits),
          formatNumber(high, digits),
        ])}
      />
    </figure>
  );
}

const [width, height, left, right, top, bottom] = [260, 150, 44, 10, 10, 34];

/** The curve of each rate, all on one scale of what is measured. */
export function RateCurves({ figures, unit, digits }: ChartProps) {
  const all = figures.curves.flatMap(({ outputs }) => outputs);
  const [least, most] = [Math.min(...all), Math.max(...all)];
  return (
    <figure className="max-w-[760px]">
      <figcaption className="flex flex-wrap justify-between gap-x-4">
        <b>Curves</b>
        <span className="text-note text-ink-2">{unit} along each rate, all on one scale</span>
      </figcaption>
      <div className="mt-1 grid grid-cols-[repeat(auto-fill,minmax(210px,1fr))] gap-x-6 gap-y-3">
        {figures.curves.map((curve) => (
          <Curve key={curve.factor} curve={curve} least={least} most={most} digits={digits} />
        ))}
      </div>
      <ReadAsTable
        caption={`What is measured along each rate, ${unit}`}
        heads={['Rate', ...triedShares.map((share) => `${100 * share} %`)]}
        rows={figures.curves.map(({ factor, values, outputs }) => [
          factorLabel(factor),
          ...outputs.map((output, i) => `${formatNumber(output, digits)} at ${valueOf(values[i])}`),
        ])}
      />
    </figure>
  );
}

function Curve(props: { curve: RateCurve; least: number; most: number; digits: number }) {
  const { curve, least, most, digits } = props;
  const { values, outputs, factor } = curve;
  const span = values[4] - values[0] || 1;
  const x = (value: number) => left + ((width - left - right) * (value - values[0])) / span;
  const y = (output: number) =>
    top + (height - top - bottom) * (most > least ? (most - output) / (most - least) : 0.5);
  return (
    <div>
      <p className="text-[13px]">
        {factorLabel(factor)}
        {unitOf(factor) && <span className="text-ink-2">, {unitOf(factor)}</span>}
      </p>
      <svg viewBox={`0 0 ${width} ${height}`} className="block w-full" aria-hidden="true">
        <path d={`M${left} ${top}V${height - bottom}H${width - right}`} className="stroke-rule" fill="none" />
        {(most > least ? [least, most] : [least]).map((output) => (
          <text
            key={output}
            x={left - 5}
            y={y(output) + 4}
            textAnchor="end"
            className="fill-ink-2 font-mono text-axis"
          >
            {formatNumber(output, digits)}
          </text>
        ))}
        {[0, 4].map((i) => (
          <text
            key={i}
            x={x(values[i])}
            y={height - bottom + 16}
            textAnchor={i === 0 ? 'start' : 'end'}
            className="fill-ink-2 font-mono text-axis"
          >
            {valueOf(values[i])}
          </text>
        ))}
        <path
          d={`M${values.map((value, i) => `${x(value).toFixed(1)} ${y(outputs[i]).toFixed(1)}`).join('L')}`}
          className="stroke-ink"
          strokeWidth={2}
          fill="none"
        />
        {values.map((value, i) => (
          <circle key={i} cx={x(value)} cy={y(outputs[i])} r={3} className="fill-ink" />
        ))}
      </svg>
    </div>
  );
}
