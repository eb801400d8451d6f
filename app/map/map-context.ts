import { createContext, use } from 'react';
import type { MapSize, ScreenPoint } from './map-view.ts';

/** What an overlay needs to stand in its place. */
export interface MapFrame {
  readonly size: MapSize;
  /** side of a cell, CSS px */
  readonly scale: number;
  /** CSS px a metre */
  readonly pixelsPerMetre: number;
  /** where a point of the ground (m) stands on the screen */
  readonly project: (x: number, y: number) => ScreenPoint;
}

export const MapFrameContext = createContext<MapFrame | undefined>(undefined);

/** The frame of the map that a component stands in. @throws Error outside a SiteMap */
export function useMapFrame(): MapFrame {
  const frame = use(MapFrameContext);
  if (!frame)
    throw new Error('useMapFrame was called outside a SiteMap: give the component to it as a child');
  return frame;
}
