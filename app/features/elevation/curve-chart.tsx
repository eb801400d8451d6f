import { useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';
import type { TidalDatum } from '#contract/layers.ts';
import { curveShare } from '#sim-core/grid/curve-share.ts';
import { formatNumber, formatShare } from '#app/lib/formats.ts';
import { curveNames, type CurveName, type ElevationDraft, type ElevationEvent } from './curve-draft.ts';
import { curveDashes, curveInWords, metres } from './curve-words.ts';
import { chartSpan, type SiteHeights } from './elevation-facts.ts';
import { niceTicks, stagger } from './chart-ticks.ts';

const width = 312;
const height = 150;
const handleReach = 13;
/** Of the names of tide levels, above the plot: a row's height, and what a letter takes at the most. */
const [nameRow, nameLetter] = [12, 6.3];
/** A longer name is cut in the picture; the list of levels has it whole. */
const longestName = 26;

/**
 * The curves over the site's own heights. Points of the chosen curve are dragged, or moved by arrow keys (Shift for ten
 * times as far), removed with Delete, and added by a press on the chart or with Enter.
 */
export function CurveChart(props: {
  heights: SiteHeights;
  draft: ElevationDraft;
  chosen: CurveName;
  editable: boolean;
  tell: (event: ElevationEvent) => void;
}) {
  const { heights, draft, chosen, editable, tell } = props;
  const { elevationCurves, tidalDatums } = draft;
  const svg = useRef<SVGSVGElement>(null);
  const [dragged, setDragged] = useState<{
    point: number;
    gesture: string;
    span: { from: number; to: number };
  }>();
  // While a point is dragged the scale stays, or the chart would run away under the pointer.
  const span = dragged?.span ?? chartSpan(heights, elevationCurves, tidalDatums);
  const x = (z: number) => ((z - span.from) / (span.to - span.from)) * width;
  const y = (share: number) => foot - share * height;
  const levels = placeLevels(tidalDatums, x);
  const top = 22 + nameRow * (1 + Math.max(-1, ...levels.map(({ row }) => row)));
  const foot = top + height;
  const curve = elevationCurves[chosen];

  const placeOf = (event: PointerEvent) => {
    const box = svg.current?.getBoundingClientRect();
    if (!box || box.width === 0) return undefined;
    const across = ((event.clientX - box.left) / box.width) * width;
    const down = ((event.clientY - box.top) / box.width) * width;
    return { height: span.from + (across / width) * (span.to - span.from), share: (foot - down) / height };
  };
  const path = (name: CurveName) => {
    const points = elevationCurves[name];
    if (!points) return undefined;
    const ends = [
      [span.from, points[0][1]],
      ...points.filter(([z]) => z > span.from && z < span.to),
      [span.to, points[points.length - 1][1]],
    ];
    return ends
      .map(([z, share], i) => `${i === 0 ? 'M' : 'L'}${x(z).toFixed(1)} ${y(share).toFixed(1)}`)
      .join('');
  };

  const onKey = (event: KeyboardEvent, point: number) => {
    if (!curve) return;
    const [z, share] = curve[point];
    const far = event.shiftKey ? 0.1 : 0.01;
    const moves: Record<string, [number, number]> = {
      ArrowLeft: [-far, 0],
      ArrowRight: [far, 0],
      ArrowUp: [0, far],
      ArrowDown: [0, -far],
    };
    const move = moves[event.key];
    if (move) tell({ type: 'moved', curve: chosen, point, height: z + move[0], share: share + move[1] });
    else if (event.key === 'Delete' || event.key === 'Backspace')
      tell({ type: 'removed', curve: chosen, point });
    else if (event.key === 'Enter') {
      const next = curve[point + 1];
      const at = next ? (z + next[0]) / 2 : z + 0.1;
      tell({ type: 'added', curve: chosen, height: at, share: curveShare(curve, at) });
    } else return;
    event.preventDefault();
  };

  const binWidth = (heights.maximum - heights.minimum) / Math.max(1, heights.histogram.length);
  const most = Math.max(1, ...heights.histogram);
  const words = curveNames
    .flatMap((name) => (elevationCurves[name] ? [curveInWords(name, elevationCurves[name])] : []))
    .join(' ');
  return (
    <svg
      ref={svg}
      viewBox={`0 0 ${width} ${foot + 30}`}
      role="group"
      aria-label={`Curves over the heights of the site, ${metres(heights.minimum)} to ${metres(heights.maximum)}. ${words}`}
      className="my-1 block w-full select-none"
      onPointerDown={(event) => {
        if (!editable || !curve || event.button !== 0) return;
        const at = placeOf(event);
        if (at && at.share >= -0.02 && at.share <= 1.04) tell({ type: 'added', curve: chosen, ...at });
      }}
    >
      {heights.histogram.map((count, i) => {
        const left = x(heights.minimum + i * binWidth);
        const rise = count === 0 ? 0 : Math.max(1.5, Math.sqrt(count / most) * height * 0.8);
        const wide = Math.max(0.5, (binWidth / (span.to - span.from)) * width - 0.3);
        return <rect key={i} x={left} y={foot - rise} width={wide} height={rise} className="fill-rule-2" />;
      })}
      <path d={`M0 ${y(1)}H${width}M0 ${y(0.5)}H${width}`} className="stroke-rule" strokeWidth={0.7} />
      <DatumLines levels={levels} foot={foot} />
      {curveNames.map((name) => (
        <path
          key={name}
          d={path(name)}
          strokeWidth={name === chosen ? 2.4 : 1.3}
          strokeDasharray={curveDashes[name]}
          className={name === chosen ? 'fill-none stroke-ink' : 'fill-none stroke-ink-2'}
        />
      ))}
      <path d={`M0 ${foot}H${width}`} className="stroke-ink" />
      <g aria-hidden="true" className="fill-ink-2 font-mono text-axis">
        <text x={1} y={y(1) - 3}>
          100 %
        </text>
        {niceTicks(span.from, span.to, 5).map((tick) => (
          <g key={tick}>
            <path d={`M${x(tick)} ${foot}v4`} className="stroke-ink" />
            <text x={x(tick)} y={foot + 15} textAnchor="middle">
              {formatNumber(tick)}
            </text>
          </g>
        ))}
        <text x={width / 2} y={foot + 28} textAnchor="middle" className="font-sans">
          height, m
        </text>
      </g>
      {curve && editable && (
        <g>
          {curve.map(([z, share], point) => (
            <g
              key={point}
              role="slider"
              tabIndex={0}
              aria-label={`Point ${point + 1} of ${chosen}`}
              aria-valuenow={z}
              aria-valuemin={span.from}
              aria-valuemax={span.to}
              aria-valuetext={`${metres(z)}, ${formatShare(share)}`}
              transform={`translate(${x(z).toFixed(1)} ${y(share).toFixed(1)})`}
              className="group cursor-grab touch-none outline-none active:cursor-grabbing"
              onKeyDown={(event) => onKey(event, point)}
              onPointerDown={(event) => {
                event.stopPropagation();
                event.currentTarget.setPointerCapture(event.pointerId);
                setDragged({ point, span, gesture: `drag at ${event.timeStamp}` });
              }}
              onPointerMove={(event) => {
                if (dragged?.point !== point) return;
                const at = placeOf(event);
                if (at) tell({ type: 'moved', curve: chosen, point, ...at, gesture: dragged.gesture });
              }}
              onPointerUp={() => setDragged(undefined)}
              onPointerCancel={() => setDragged(undefined)}
            >
              <circle
                r={handleReach}
                className="fill-transparent group-focus-visible:stroke-focus group-focus-visible:stroke-[2.5px]"
              />
              <circle r={5} strokeWidth={2} className="fill-sheet stroke-ink" />
            </g>
          ))}
        </g>
      )}
    </svg>
  );
}

interface PlacedLevel extends TidalDatum {
  /** px: of its line, and where its name begins */
  readonly at: number;
  readonly from: number;
  readonly row: number;
  readonly shown: string;
}

/** Levels of the tide with their names in rows, so that none runs into another. */
function placeLevels(datums: readonly TidalDatum[], x: (height: number) => number): PlacedLevel[] {
  const sorted = [...datums]
    .sort((a, b) => a.height - b.height)
    .map((datum) => ({
      ...datum,
      at: x(datum.height),
      shown: datum.name.length > longestName ? `${datum.name.slice(0, longestName - 1)}…` : datum.name,
    }));
  const rows = stagger(
    sorted.map(({ at, shown }) => ({ at, length: shown.length * nameLetter + 6 })),
    width,
  );
  return sorted.map((level, i) => ({ ...level, ...rows[i] }));
}

/** The levels as guides, lines below all names. */
function DatumLines({ levels, foot }: { levels: readonly PlacedLevel[]; foot: number }) {
  return (
    <g aria-hidden="true">
      {levels.map(({ name, height: z, at, row }) => (
        <path
          key={`${name} ${z}`}
          d={`M${at} ${4 + row * nameRow}V${foot}`}
          className="stroke-ink-2"
          strokeWidth={0.8}
          strokeDasharray="4 2"
        />
      ))}
      {levels.map(({ name, height: z, from, row, shown }) => (
        <text
          key={`${name} ${z}`}
          x={from}
          y={9 + row * nameRow}
          className="fill-ink-2 stroke-ground text-[10.5px] [paint-order:stroke] [stroke-linejoin:round] [stroke-width:4px]"
        >
          {shown}
        </text>
      ))}
    </g>
  );
}
