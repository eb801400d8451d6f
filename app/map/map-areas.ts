import { distanceToLine, isInside, ringArea, type Ring } from './rings.ts';

/** Works and surveyed areas that take up ground, as the map outlines them. */
export interface MapArea {
  readonly id: string;
  readonly kind: 'planting' | 'clumps' | 'fence' | 'loss' | 'refuge' | 'allowed';
  readonly ring: Ring;
  /** what is cut out of it */
  readonly holes?: readonly Ring[];
  /** not there in the year shown: drawn faint */
  readonly faint?: boolean;
}

/** Reach of a pointer to either side of an outline, px. */
const reach = 12;

interface Box {
  readonly west: number;
  readonly east: number;
  readonly south: number;
  readonly north: number;
}
const boxes = new WeakMap<MapArea, Box>();

/** Box around an area, worked out once. */
export function boxOf(area: MapArea): Box {
  const found = boxes.get(area);
  if (found) return found;
  let box = { west: Infinity, east: -Infinity, south: Infinity, north: -Infinity };
  for (const [x, y] of area.ring)
    box = {
      west: Math.min(box.west, x),
      east: Math.max(box.east, x),
      south: Math.min(box.south, y),
      north: Math.max(box.north, y),
    };
  boxes.set(area, box);
  return box;
}

/** The area below a place: that with its outline within reach before one that holds the place, the smallest of those. */
export function areaAt(
  areas: readonly MapArea[],
  x: number,
  y: number,
  metresPerPixel: number,
): MapArea | undefined {
  const near = reach * metresPerPixel;
  let found: MapArea | undefined;
  let least = Infinity;
  for (const area of areas) {
    const { west, east, south, north } = boxOf(area);
    if (x < west - near || x > east + near || y < south - near || y > north + near) continue;
    const outlines = [area.ring, ...(area.holes ?? [])];
    const away = Math.min(...outlines.map((outline) => distanceToLine(outline, x, y, true)));
    const holds = outlines.filter((outline) => isInside(outline, x, y)).length % 2 === 1;
    // An outline's own rank lies below 0, so that it wins over whatever merely holds the place.
    const rank = away <= near ? away - near : holds ? ringArea(area.ring) : Infinity;
    if (rank < least) {
      found = area;
      least = rank;
    }
  }
  return found;
}
