import { useEffect, useRef } from 'react';
import type { Grid } from '#sim-core/grid/grid.ts';
import { paintOverlay, type Overlay } from './paint-overlay.ts';
import type { MapSize, MapView } from './map-view.ts';
import { useMapColours } from './use-map-colours.ts';

/** Contours, outlines and rings over the painted map, on a canvas of their own: thousands of them are one drawing. */
export function MapOverlay(
  props: Overlay & {
    readonly grid: Grid;
    readonly view: MapView;
    readonly size: MapSize;
    readonly pixelRatio: number;
  },
) {
  const { grid, view, size, pixelRatio, areas, contours, ringed, selected } = props;
  const canvas = useRef<HTMLCanvasElement>(null);
  const colours = useMapColours();
  useEffect(() => {
    const pen = canvas.current?.getContext('2d');
    if (!pen) return;
    pen.setTransform(pixelRatio, 0, 0, pixelRatio, 0, 0);
    paintOverlay(pen, { areas, contours, ringed, selected }, { grid, view, size }, colours);
  }, [grid, view, size, pixelRatio, areas, contours, ringed, selected, colours]);
  return (
    <canvas
      ref={canvas}
      aria-hidden="true"
      data-overlay
      width={Math.round(size.width * pixelRatio)}
      height={Math.round(size.height * pixelRatio)}
      className="pointer-events-none absolute inset-0 size-full"
    />
  );
}
