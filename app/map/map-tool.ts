import type { KeyboardEvent } from 'react';
import type { MapCell } from './map-keys.ts';

/** Where the pointer, a finger or the crosshair is, in the grid's CRS, m (to the centimetre); also beyond the site. */
export interface MapPoint {
  readonly x: number;
  readonly y: number;
  /** undefined off the site */
  readonly cell: MapCell | undefined;
  /** of the foothold or outline below it */
  readonly id: string | undefined;
  readonly metresPerPixel: number;
  readonly shift: boolean;
}

/** A place that the map should bring into view. */
export interface MapSight {
  readonly x: number;
  readonly y: number;
}

/**
 * What pointer and keys do on a map beyond reading, moving and zooming it. The map turns mouse, finger and crosshair into
 * the same few events, so that a tool that works by one works by all.
 */
export interface MapTool {
  readonly cursor: 'crosshair' | 'default';
  /** what its keys do, in words, for those who hear the map */
  readonly help: string;
  /** pressed and let go in one place; or Space or Enter at the crosshair */
  readonly press?: (at: MapPoint) => void;
  readonly doublePress?: (at: MapPoint) => void;
  /** whether a drag that begins here is the tool's; else it moves the map */
  readonly grab?: (at: MapPoint) => boolean;
  readonly drag?: (at: MapPoint) => void;
  /** `undefined`: the drag was broken off */
  readonly drop?: (at: MapPoint | undefined) => void;
  /** pointer or crosshair moved, or left the map */
  readonly point?: (at: MapPoint | undefined) => void;
  /** Takes a key before the map does; a sight is taken too, and brought into view. */
  readonly key?: (event: KeyboardEvent, at: MapPoint | undefined) => boolean | MapSight;
}
