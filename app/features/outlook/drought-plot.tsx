import type { DrawnFutures } from '#sim-core/weather/drawn-futures.ts';
import { formatNumber } from '#app/lib/formats.ts';
import type { MapSize } from '#app/map/map-view.ts';
import { labelledYears } from '#app/yearline/yearline-scale.ts';
import type { ChartScale } from './chart-scale.ts';
import type { ListedYear, Tolerances } from './outlook-words.ts';
import { palmerClasses } from '#sim-core/weather/palmer-classes.ts';

interface PlotProps {
  series: readonly ListedYear[];
  tolerances: Tolerances;
  year: number;
  scale: ChartScale;
  size: MapSize;
  compact: boolean;
  first: number;
  last: number;
  /** of weather that is drawn: what many futures come to */
  futures: DrawnFutures | undefined;
}

/** Drought hangs below the datum, further when drier, and turns to ink past what open marsh bears. */
export function DroughtPlot(props: PlotProps) {
  const { series, tolerances, year, scale, size } = props;
  const datum = scale.y(0);
  return (
    <svg width={size.width} height={size.height} aria-hidden="true" className="block">
      <Bands {...props} />
      <FuturesBand {...props} />
      <rect
        x={scale.x(year) - Math.max(2, scale.yearWidth / 2)}
        y={scale.top}
        width={Math.max(4, scale.yearWidth)}
        height={scale.bottom - scale.top}
        className="fill-ink/10"
      />
      {series.map(({ year: each, index, acting }) => (
        <rect
          key={each}
          x={scale.x(each) - scale.yearWidth * 0.41}
          y={Math.min(datum, scale.y(index))}
          width={scale.yearWidth * 0.82}
          height={Math.max(index === 0 ? 0 : 1, Math.abs(scale.y(index) - datum))}
          className={acting < tolerances.open ? 'fill-ink' : index < 0 ? 'fill-shore' : 'fill-shore/60'}
        />
      ))}
      {series.map(
        ({ year: each, index, acting }) =>
          acting !== index && (
            <path
              key={each}
              d={`M${scale.x(each) - scale.yearWidth * 0.41} ${scale.y(acting)}h${scale.yearWidth * 0.82}`}
              strokeWidth={2}
              className="stroke-ink"
            />
          ),
      )}
      <path d={`M0 ${datum}H${size.width}`} strokeWidth={1.5} className="stroke-ink" />
      <ToleranceLines {...props} />
      <ChanceStrip {...props} />
      <Years {...props} />
    </svg>
  );
}

/** Where nine of ten futures run, and their median. */
function FuturesBand({ futures, scale, first }: PlotProps) {
  if (!futures) return null;
  const at = (y: number, quantile: number) =>
    `${scale.x(first + y)} ${scale.y(clamped(futures.band[y][quantile], scale))}`;
  const years = futures.band.map((_, y) => y);
  const line = (quantile: number, some: readonly number[]) => some.map((y) => at(y, quantile)).join('L');
  return (
    <g>
      <path
        d={`M${line(4, years)}L${line(0, years.toReversed())}Z`}
        className="fill-water"
        fillOpacity={0.28}
      />
      <path
        d={`M${line(2, years)}`}
        fill="none"
        strokeWidth={1.5}
        strokeDasharray="2 3"
        className="stroke-ink-2"
      />
    </g>
  );
}

const clamped = (index: number, { driest, wettest }: ChartScale) =>
  Math.min(wettest, Math.max(driest, index));

/** Room for the strip of chances, px. */
export const stripHeight = 54;

/** Under the bars: chance of a year that kills open marsh, and in ink of one that kills near a mound too. */
function ChanceStrip({ futures, scale, first, compact, size }: PlotProps) {
  if (!futures) return null;
  const [open, mound] = futures.lines;
  const top = scale.bottom + 18;
  const room = stripHeight - 20;
  const most = Math.max(0.05, ...open.inYear);
  return (
    <g>
      <path d={`M0 ${scale.bottom + 0.5}H${size.width}`} className="stroke-rule" />
      <text x={compact ? scale.left : 24} y={scale.bottom + 14} className="fill-ink-2 text-note">
        {compact ? 'chance to kill' : 'chance that the year kills open marsh; in ink, near a mound too'}: up
        to {Math.round(100 * most)} %
      </text>
      {open.inYear.map((share, y) =>
        [share, mound.inYear[y]].map((part, i) => (
          <rect
            key={`${y} ${i}`}
            x={scale.x(first + y) - scale.yearWidth * 0.41}
            y={top + room * (1 - part / most)}
            width={scale.yearWidth * 0.82}
            height={(room * part) / most}
            className={i === 0 ? 'fill-shore' : 'fill-ink'}
          />
        )),
      )}
    </g>
  );
}

/** The classes of the Palmer scale as faint bands, the drier and the wetter the stronger. */
function Bands({ scale, size, compact }: PlotProps) {
  return palmerClasses.map(({ name, below }, i) => {
    const floor = i === 0 ? -Infinity : palmerClasses[i - 1].below;
    const top = scale.y(Math.min(below, scale.wettest));
    const bottom = scale.y(Math.max(floor, scale.driest));
    const strength = Math.abs(i - 5);
    if (bottom - top < 1) return null;
    return (
      <g key={name}>
        <rect
          x={0}
          y={top}
          width={size.width}
          height={bottom - top}
          className={i < 5 ? 'fill-ink' : 'fill-water'}
          fillOpacity={i < 5 ? strength * 0.012 : strength * 0.06}
        />
        {i > 0 && <path d={`M0 ${bottom}H${size.width}`} className="stroke-rule-2" />}
        {!compact && bottom - top > 13 && (
          <text
            x={24}
            y={name === 'near normal' ? scale.y(0) - 5 : (top + bottom) / 2 + 4}
            className="fill-ink-2 text-note"
          >
            {name}
          </text>
        )}
        {i > 0 && Number.isInteger(floor) && (
          <text x={scale.left - 6} y={bottom + 4} textAnchor="end" className="fill-ink-2 font-mono text-axis">
            {formatNumber(floor)}
          </text>
        )}
      </g>
    );
  });
}

function ToleranceLines({ tolerances, scale, compact }: PlotProps) {
  const lines = [
    { at: tolerances.open, dash: '1.5 3.5', words: 'open marsh' },
    { at: tolerances.mound, dash: '6 4', words: 'near a mound' },
  ];
  const close = Math.abs(scale.y(tolerances.open) - scale.y(tolerances.mound)) < 15;
  return lines.map(({ at, dash, words }, i) => (
    <g key={words}>
      <path
        d={`M${scale.left} ${scale.y(at)}H${compact ? scale.right : scale.right + 8}`}
        strokeWidth={5}
        strokeOpacity={0.6}
        className="stroke-ground"
      />
      <path
        d={`M${scale.left} ${scale.y(at)}H${compact ? scale.right : scale.right + 8}`}
        strokeDasharray={dash}
        strokeWidth={1.5}
        className="stroke-ink"
      />
      <text
        x={compact ? scale.right : scale.right + 13}
        y={scale.y(at) + (compact ? -5 : 4) + (close && i === 1 ? 13 : 0)}
        textAnchor={compact ? 'end' : 'start'}
        className="fill-ink stroke-ground text-note font-semibold [paint-order:stroke] [stroke-width:4px]"
      >
        {compact ? `${words} dies beyond` : words}
      </text>
      {!compact && i === 0 && (
        <text x={scale.right + 13} y={scale.y(at) - 11} className="fill-ink-2 text-note">
          dies beyond:
        </text>
      )}
    </g>
  ));
}

function Years({ scale, first, last, size, futures }: PlotProps) {
  const bottom = scale.bottom + (futures ? stripHeight : 0);
  return labelledYears(first, last, scale.yearWidth, 52).map((year) => (
    <g key={year}>
      <path d={`M${scale.x(year)} ${bottom}v5`} className="stroke-ink" />
      <text
        x={Math.min(scale.x(year), size.width - 16)}
        y={bottom + 18}
        textAnchor="middle"
        className="fill-ink font-mono text-axis font-semibold"
      >
        {year}
      </text>
    </g>
  ));
}
