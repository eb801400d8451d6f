import type { ReactNode } from 'react';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { MapArea } from './map-areas.ts';
import type { MapCell } from './map-keys.ts';
import type { MapRaster } from './map-raster.ts';
import type { MapFoothold } from './map-symbols.ts';
import type { MapTool } from './map-tool.ts';
import type { MapClear, MapView } from './map-view.ts';
import type { MapContour } from './paint-overlay.ts';

export interface SiteMapProps {
  readonly grid: Grid;
  /** Held by identity: a new frame is a new `values` array, and costs one upload. */
  readonly raster?: MapRaster;
  /** capacity of the ground (0..255); cells of 0 are painted as water. Leave it out under class maps. */
  readonly ground?: Uint8Array;
  readonly footholds?: readonly MapFoothold[];
  /** works that take up ground, outlined */
  readonly areas?: readonly MapArea[];
  /** lines of equal values, such as closing years */
  readonly contours?: readonly MapContour[];
  /** ids of footholds and areas that are selected */
  readonly selected?: ReadonlySet<string>;
  /** what pointer and keys do beyond reading, moving and zooming the map */
  readonly tool?: MapTool;
  readonly onHover?: (cell: MapCell | undefined) => void;
  /** Controlled view, for maps that move together; without it the map keeps its own. */
  readonly view?: MapView;
  readonly onView?: (view: MapView) => void;
  /** Room that the whole site keeps free, for maps that move together; without it each keeps clear of its own furniture. */
  readonly clear?: MapClear;
  /** What this map's own furniture takes, as it changes. */
  readonly onClear?: (clear: MapClear) => void;
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
