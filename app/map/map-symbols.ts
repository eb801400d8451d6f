import type { Grid } from '#sim-core/grid/grid.ts';
import { toScreen, type MapSize, type MapView, type ScreenPoint } from './map-view.ts';

/** A foothold on the map, in the grid's CRS, m. */
export interface MapFoothold {
  readonly id: string;
  readonly x: number;
  readonly y: number;
  /** was there at the survey (ink diamond), or is planned by people (coral flag) */
  readonly kind: 'surveyed' | 'planned';
  /** year of a planned one */
  readonly year?: number;
  /** not there yet in the year shown: drawn faint */
  readonly faint?: boolean;
  /** radius of the refuge, m: drawn around the selected one */
  readonly radius?: number;
  /** what it is called, such as `Mound 17` */
  readonly name?: string;
}

/** Where the middle of a symbol stands from its point on the ground, px at full size. */
const middleOf = { surveyed: { left: 0, top: 0 }, planned: { left: 4, top: -6 } } as const;
/** Reach of a pointer, px: targets are 28 px across. */
const reach = 14;

/** Size of the symbols: smaller where so many stand that they would cover the map. */
export function symbolSize(view: MapView, grid: Grid, count: number): number {
  if (count === 0) return 1;
  const apart = view.scale * Math.sqrt((grid.width * grid.height) / count);
  return Math.min(1, Math.max(0.4, apart / 20));
}

/** The foothold below a place on the screen: the nearest within reach, planned ones before surveyed ones. */
export function footholdAt(
  footholds: readonly MapFoothold[],
  view: MapView,
  grid: Grid,
  size: MapSize,
  at: ScreenPoint,
): MapFoothold | undefined {
  const scale = symbolSize(view, grid, footholds.length);
  let found: MapFoothold | undefined;
  let least = reach;
  for (const foothold of footholds) {
    const point = toScreen(view, grid, size, foothold.x, foothold.y);
    const middle = middleOf[foothold.kind];
    const distance = Math.hypot(
      at.left - point.left - middle.left * scale,
      at.top - point.top - middle.top * scale,
    );
    const wins =
      found?.kind === 'planned' && foothold.kind === 'surveyed'
        ? false
        : found?.kind === 'surveyed' && foothold.kind === 'planned'
          ? distance < reach
          : distance < least;
    if (wins) {
      found = foothold;
      least = distance;
    }
  }
  return found;
}
