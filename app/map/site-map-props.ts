import type { ReactNode } from 'react';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { MapCell } from './map-keys.ts';
import type { MapRaster } from './map-raster.ts';
import type { MapFoothold } from './map-symbols.ts';
import type { MapView } from './map-view.ts';

/** A place that was pointed at, in the grid's CRS, m (to the centimetre), and its cell. */
export interface MapPlace extends MapCell {
  readonly x: number;
  readonly y: number;
}

export interface SiteMapProps {
  readonly grid: Grid;
  /** Held by identity: a new frame is a new `values` array, and costs one upload. */
  readonly raster?: MapRaster;
  /** capacity of the ground (0..255); cells of 0 are painted as water. Leave it out under class maps. */
  readonly ground?: Uint8Array;
  readonly footholds?: readonly MapFoothold[];
  readonly selectedId?: string;
  /** `place`: a click or Enter puts something where it points; `look`: it selects */
  readonly tool?: 'look' | 'place';
  readonly onPlace?: (place: MapPlace) => void;
  /** `undefined`: nothing is selected any more */
  readonly onSelect?: (id: string | undefined) => void;
  /** Planned footholds can be moved where this is given: by dragging, or by arrow keys when selected. */
  readonly onMove?: (id: string, place: MapPlace) => void;
  /** Delete on a selected planned foothold. */
  readonly onRemove?: (id: string) => void;
  /** Delete on a selected surveyed foothold, which cannot be removed: the place to say so. */
  readonly onKept?: (id: string) => void;
  readonly onHover?: (cell: MapCell | undefined) => void;
  /** Controlled view, for maps that move together; without it the map keeps its own. */
  readonly view?: MapView;
  readonly onView?: (view: MapView) => void;
  /** name of the map for those who hear it, such as `Sallow Reach, cover in 2043` */
  readonly label: string;
  /** what the map shows, in a sentence or two; also stands in for it where it cannot be drawn */
  readonly summary?: string;
  readonly legendTitle?: string;
  /** further entries of the legend */
  readonly legend?: ReactNode;
  /** `false` for small maps side by side: no legend, controls or coordinates */
  readonly furniture?: boolean;
  readonly className?: string;
  /** words on the map: MapNote, or anything that uses useMapFrame */
  readonly children?: ReactNode;
}
