import { useRef, type KeyboardEvent, type PointerEvent } from 'react';
import { formatNumber } from '#app/lib/formats.ts';
import { useBoxSize } from '#app/map/use-box-size.ts';
import { chartScale } from './chart-scale.ts';
import type { DrawnFutures } from '#sim-core/weather/drawn-futures.ts';
import { DroughtPlot, stripHeight } from './drought-plot.tsx';
import { yearEffect, type Tolerances, type ListedYear } from './outlook-words.ts';
import { palmerClass } from '#sim-core/weather/palmer-classes.ts';

const compactBelow = 620;
/** How far a press must move before it counts as drawing: a plain press only selects. */
const drawingFrom = 4;

/** What drawing and table of the drought record are told, and tell. */
export interface DroughtRecordProps {
  series: readonly ListedYear[];
  tolerances: Tolerances;
  /** year that is read */
  year: number;
  onYear: (year: number) => void;
  /** left out for those who may only read */
  onChange?: (year: number, index: number) => void;
}

/** The drought record as a drawing: bars are dragged by pointer or finger, or moved by the arrow keys. */
export function DroughtChart(props: DroughtRecordProps & { futures: DrawnFutures | undefined }) {
  const { futures } = props;
  const { series, tolerances, year, onYear, onChange } = props;
  const box = useRef<HTMLDivElement>(null);
  const room = useBoxSize(box);
  const press = useRef<{ top: number; left: number; drawing: boolean }>(undefined);
  const first = series[0].year;
  const last = series[series.length - 1].year;
  const { index, acting } = series[year - first];
  const compact = room !== undefined && room.size.width < compactBelow;
  const scale =
    room &&
    chartScale(
      room.size,
      first,
      series.length,
      [
        ...series.flatMap((each) => [each.index, each.acting]),
        ...(futures ? futures.band.flatMap((band) => [band[0], band[4]]) : []),
        ...[tolerances.open, tolerances.mound],
      ],
      compact,
      futures ? stripHeight : 0,
    );

  const at = (event: PointerEvent<HTMLDivElement>) => {
    const { left, top } = event.currentTarget.getBoundingClientRect();
    return { left: event.clientX - left, top: event.clientY - top };
  };
  const down = (event: PointerEvent<HTMLDivElement>) => {
    if (event.button !== 0 || !scale) return;
    const place = at(event);
    press.current = { ...place, drawing: false };
    event.currentTarget.setPointerCapture(event.pointerId);
    onYear(scale.yearAt(place.left));
  };
  const move = (event: PointerEvent<HTMLDivElement>) => {
    if (!press.current || !scale) return;
    const place = at(event);
    const pointed = scale.yearAt(place.left);
    const { top, left } = press.current;
    if (Math.hypot(place.top - top, place.left - left) >= drawingFrom) press.current.drawing = true;
    if (!press.current.drawing) return;
    onYear(pointed);
    onChange?.(pointed, scale.indexAt(place.top));
  };
  const up = () => {
    press.current = undefined;
  };
  const key = (event: KeyboardEvent<HTMLDivElement>) => {
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    const years: Record<string, number> = {
      ArrowLeft: year - 1,
      ArrowRight: year + 1,
      Home: first,
      End: last,
    };
    const steps: Record<string, number> = { ArrowUp: 0.1, ArrowDown: -0.1, PageUp: 1, PageDown: -1 };
    if (event.key in years) onYear(Math.min(last, Math.max(first, years[event.key])));
    else if (event.key in steps && onChange) onChange(year, Math.round((index + steps[event.key]) * 10) / 10);
    else return;
    event.preventDefault();
  };

  const reading =
    (acting === index
      ? formatNumber(index)
      : `${formatNumber(index)}, with the trend ${formatNumber(acting)}`) +
    `, ${palmerClass(acting)}; ${yearEffect(acting, tolerances)}`;
  return (
    <div
      ref={box}
      role="slider"
      tabIndex={0}
      aria-label={`Drought index of ${year}`}
      aria-valuemin={-15}
      aria-valuemax={15}
      aria-valuenow={index}
      aria-valuetext={`${year}: ${reading}`}
      aria-readonly={onChange === undefined || undefined}
      aria-orientation="vertical"
      aria-describedby="drought-chart-help"
      className={`relative size-full overflow-hidden bg-ground outline-offset-[-3px] select-none ${onChange ? 'cursor-ns-resize touch-none' : 'cursor-pointer touch-pan-y'}`}
      onPointerDown={down}
      onPointerMove={move}
      onPointerUp={up}
      onPointerCancel={up}
      onKeyDown={key}
    >
      {room && scale && (
        <DroughtPlot
          {...{ series, tolerances, year, scale, compact, first, last, futures }}
          size={room.size}
        />
      )}
      <p className="pointer-events-none absolute top-2.5 left-4 flex max-w-[calc(100%-32px)] items-baseline gap-2.5 lg:left-6">
        <span className="text-figure leading-none font-light tracking-tight">{year}</span>
        <span className="text-note text-ink-2">{reading}</span>
      </p>
      <span id="drought-chart-help" className="sr-only">
        Left and right choose the year
        {onChange && '; up and down change its index by a tenth, page keys by one'}.
      </span>
    </div>
  );
}
