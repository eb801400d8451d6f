import { formatNumber } from '#app/lib/formats.ts';
import type { MapSize } from '#app/map/map-view.ts';
import { labelledYears } from '#app/yearline/yearline-scale.ts';
import type { ChartScale } from './chart-scale.ts';
import type { Tolerances, YearIndex } from './outlook-words.ts';
import { palmerClasses } from './palmer-classes.ts';

interface PlotProps {
  series: readonly YearIndex[];
  tolerances: Tolerances;
  year: number;
  scale: ChartScale;
  size: MapSize;
  compact: boolean;
  first: number;
  last: number;
}

/** Drought hangs below the datum, further when drier, and turns to ink past what open marsh bears. */
export function DroughtPlot(props: PlotProps) {
  const { series, tolerances, year, scale, size } = props;
  const datum = scale.y(0);
  return (
    <svg width={size.width} height={size.height} aria-hidden="true" className="block">
      <Bands {...props} />
      <rect
        x={scale.x(year) - Math.max(2, scale.yearWidth / 2)}
        y={scale.top}
        width={Math.max(4, scale.yearWidth)}
        height={scale.bottom - scale.top}
        className="fill-ink/10"
      />
      {series.map(({ year: each, index }) => (
        <rect
          key={each}
          x={scale.x(each) - scale.yearWidth * 0.41}
          y={Math.min(datum, scale.y(index))}
          width={scale.yearWidth * 0.82}
          height={Math.max(index === 0 ? 0 : 1, Math.abs(scale.y(index) - datum))}
          className={index < tolerances.open ? 'fill-ink' : index < 0 ? 'fill-shore' : 'fill-shore/60'}
        />
      ))}
      <path d={`M0 ${datum}H${size.width}`} strokeWidth={1.5} className="stroke-ink" />
      <ToleranceLines {...props} />
      <Years {...props} />
    </svg>
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
        {words}
      </text>
      {!compact && i === 0 && (
        <text x={scale.right + 13} y={scale.y(at) - 11} className="fill-ink-2 text-note">
          dies beyond:
        </text>
      )}
    </g>
  ));
}

function Years({ scale, first, last, size }: PlotProps) {
  return labelledYears(first, last, scale.yearWidth, 52).map((year) => (
    <g key={year}>
      <path d={`M${scale.x(year)} ${scale.bottom}v5`} className="stroke-ink" />
      <text
        x={Math.min(scale.x(year), size.width - 16)}
        y={scale.bottom + 18}
        textAnchor="middle"
        className="fill-ink font-mono text-axis font-semibold"
      >
        {year}
      </text>
    </g>
  ));
}
