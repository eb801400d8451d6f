import type { Grid } from '#sim-core/grid/grid.ts';
import { pointBuckets, type PointBuckets } from './point-buckets.ts';
import { toGround, toScreen, type MapSize, type MapView, type ScreenPoint } from './map-view.ts';

/** A foothold on the map, in the grid's CRS, m. Several may share an id: the clumps of one planting. */
export interface MapFoothold {
  readonly id: string;
  readonly x: number;
  readonly y: number;
  /** was there at the survey (ink diamond), is planned by people (coral flag), or is one clump planted (coral dot) */
  readonly kind: 'surveyed' | 'planned' | 'clump';
  /** year of a planned one */
  readonly year?: number;
  /** not there yet in the year shown: drawn faint */
  readonly faint?: boolean;
  /** radius of the refuge, m: drawn around the selected one */
  readonly radius?: number;
}

/** Where the middle of a symbol stands from its point on the ground, px at full size. */
const middleOf = {
  surveyed: { left: 0, top: 0 },
  planned: { left: 4, top: -6 },
  clump: { left: 0, top: 0 },
} as const;
/** Reach of a pointer, px: targets are 28 px across. */
const reach = 14;
/** Farthest that a point on the ground can be from a pointer that hits its symbol, px. */
const farthest = reach + 8;

/** Size of the symbols: smaller where so many stand that they would cover the map. */
export function symbolSize(view: MapView, grid: Grid, count: number): number {
  if (count === 0) return 1;
  const apart = view.scale * Math.sqrt((grid.width * grid.height) / count);
  return Math.min(1, Math.max(0.4, apart / 20));
}

/** Distance between clumps, m, as if they stood evenly in the box around them all; 0 where there are fewer than two. */
export function clumpSpacing(footholds: readonly MapFoothold[]): number {
  let count = 0;
  let [west, south, east, north] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const { kind, x, y } of footholds) {
    if (kind !== 'clump') continue;
    count++;
    west = Math.min(west, x);
    east = Math.max(east, x);
    south = Math.min(south, y);
    north = Math.max(north, y);
  }
  return count > 1 ? Math.sqrt(((east - west) * (north - south)) / count) : 0;
}

/** Size of a clump's dot, so that neighbours can be told apart as long as they are worth a pixel. */
export const clumpSize = (spacing: number, pixelsPerMetre: number): number =>
  Math.min(1, Math.max(0.35, (spacing * pixelsPerMetre) / 8));

const known = new WeakMap<readonly MapFoothold[], PointBuckets<MapFoothold>>();
/** The footholds sorted into buckets, once for each list of them. */
function bucketsOf(footholds: readonly MapFoothold[]): PointBuckets<MapFoothold> {
  const found = known.get(footholds) ?? pointBuckets(footholds);
  known.set(footholds, found);
  return found;
}

/** The foothold below a place on the screen: the nearest within reach, what people plan before what was surveyed. */
export function footholdAt(
  footholds: readonly MapFoothold[],
  view: MapView,
  grid: Grid,
  size: MapSize,
  at: ScreenPoint,
): MapFoothold | undefined {
  const scale = symbolSize(view, grid, footholds.length);
  const ground = toGround(view, grid, size, at);
  let found: MapFoothold | undefined;
  let least = reach;
  bucketsOf(footholds).near(ground.x, ground.y, (farthest * grid.cellSize) / view.scale, (foothold) => {
    const point = toScreen(view, grid, size, foothold.x, foothold.y);
    const middle = middleOf[foothold.kind];
    const distance = Math.hypot(
      at.left - point.left - middle.left * scale,
      at.top - point.top - middle.top * scale,
    );
    const surveyed = foothold.kind === 'surveyed';
    const wins =
      found && found.kind !== 'surveyed' && surveyed
        ? false
        : found?.kind === 'surveyed' && !surveyed
          ? distance < reach
          : distance < least;
    if (wins) {
      found = foothold;
      least = distance;
    }
  });
  return found;
}
