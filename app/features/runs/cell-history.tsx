import { useSyncExternalStore } from 'react';
import type { Grid } from '#sim-core/grid/grid.ts';
import { cellIndex } from '#sim-core/grid/grid.ts';
import { formatShare } from '#app/lib/formats.ts';
import { runFrames } from './live-runs.ts';

/** Cover of one cell over the years, as far as frames are at hand: a small line with its first and last value in words. */
export function CellHistory(props: {
  runId: string;
  grid: Grid;
  cell: { column: number; row: number } | undefined;
  surveyYear: number;
  lastYear: number;
  year: number;
  /** how many years have a frame */
  stored: number;
}) {
  const { runId, grid, cell, surveyYear, lastYear, year, stored } = props;
  // Frames come in while a pointer rests.
  useSyncExternalStore(runFrames.subscribe, runFrames.version);
  const points = cell
    ? runFrames.history(runId, surveyYear, lastYear, cellIndex(grid, cell.column, cell.row))
    : [];
  const width = 300;
  const x = (y: number) => ((y - surveyYear) / Math.max(1, lastYear - surveyYear)) * width;
  const line = points.map(({ year: y, byte }) => `${x(y)} ${30 - (byte / 255) * 28}`).join('L');
  const [first, last] = [points[0], points.at(-1)];
  return (
    <section aria-label="One cell" className="border-t border-rule py-2">
      <h2 className="text-body font-bold">One cell</h2>
      {points.length > 0 && (
        <svg
          viewBox={`0 0 ${width} 34`}
          width="100%"
          height="34"
          aria-hidden="true"
          className="block overflow-visible"
        >
          <path d={`M0 30.500H${width}`} className="stroke-rule" />
          <path d={`M${x(year)} 0V34`} className="stroke-rule" />
          {points.length > 1 && <path d={`M${line}`} fill="none" strokeWidth="1.5" className="stroke-ink" />}
          {points.length === 1 && (
            <circle cx={x(first.year)} cy={30 - (first.byte / 255) * 28} r="2" className="fill-ink" />
          )}
        </svg>
      )}
      <p className="min-h-[2.8em] text-note text-ink-2">
        {first && last
          ? `Cover here: ${formatShare(first.byte / 255)} in ${first.year}, ${formatShare(last.byte / 255)} in ${last.year}${
              points.length < stored ? ` (${restWords(points.length, stored, grid)})` : ''
            }.`
          : 'Point at the map, or move its crosshair by the arrow keys, to read a cell through the years.'}
      </p>
    </section>
  );
}

/** Why not all stored years are read: the others are on their way, or do not fit into memory together. */
function restWords(read: number, stored: number, { width, height }: Grid): string {
  const words = `${read} of ${stored} stored years read`;
  return stored <= runFrames.capacity(width * height)
    ? `${words} so far`
    : `${words}; too large to hold them all, so play or step to read others`;
}
