import type { Grid } from '#sim-core/grid/grid.ts';

/** What a map shows: the point in its middle, in the grid's CRS (m), and the side of a cell in CSS px. */
export interface MapView {
  readonly x: number;
  readonly y: number;
  readonly scale: number;
}
/** Room along the edges that words and buttons take, CSS px. */
export interface MapClear {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}
/** Room for the map, CSS px. */
export interface MapSize {
  readonly width: number;
  readonly height: number;
  /** what the whole site keeps clear of; nothing unless said */
  readonly clear?: MapClear;
}
/** A place on the screen, CSS px from the map's top left corner. */
export interface ScreenPoint {
  readonly left: number;
  readonly top: number;
}

/** Largest side of a cell on the screen, CSS px. */
export const largestScale = 64;
/** How far the ground may be pulled in from the edge, so that what stands on the border can be read. */
const slack = 40;
const noClear: MapClear = { left: 0, top: 0, right: 0, bottom: 0 };
/** A map too small for its own furniture gives at most this share of itself to it. */
const mostClear = 0.5;

/** What is left between the furniture: its size, and how far its middle lies right of and below the map's, px. */
function openRoom({ width, height, clear = noClear }: MapSize) {
  const { left, top, right, bottom } = clear;
  const across = Math.min(1, (mostClear * width) / Math.max(1, left + right));
  const down = Math.min(1, (mostClear * height) / Math.max(1, top + bottom));
  return {
    width: width - across * (left + right),
    height: height - down * (top + bottom),
    right: (across * (left - right)) / 2,
    down: (down * (top - bottom)) / 2,
  };
}

/** Scale at which the whole grid is seen, clear of the furniture. */
export const fitScale = (grid: Grid, size: MapSize): number => {
  const room = openRoom(size);
  return Math.min(largestScale, room.width / grid.width, room.height / grid.height);
};

/** The point that stands in the map's middle when the grid's own middle stands in that of the open room. */
function middle(grid: Grid, size: MapSize, scale: number) {
  const { right, down } = openRoom(size);
  const perPixel = grid.cellSize / scale;
  return {
    x: grid.originX + (grid.width * grid.cellSize) / 2 - right * perPixel,
    y: grid.originY - (grid.height * grid.cellSize) / 2 + down * perPixel,
  };
}

/** The whole grid, clear of the furniture: what a map starts with. */
export function wholeView(grid: Grid, size: MapSize): MapView {
  const scale = fitScale(grid, size);
  return { ...middle(grid, size, scale), scale };
}

/** The same view kept within what makes sense: not smaller than the whole, not beyond the ground. */
export function clampView(view: MapView, grid: Grid, size: MapSize): MapView {
  const scale = Math.min(largestScale, Math.max(fitScale(grid, size), view.scale));
  const perPixel = grid.cellSize / scale;
  const open = openRoom(size);
  const inside = (value: number, centre: number, cells: number, pixels: number) => {
    const room = Math.max(0, (cells * scale - pixels) / 2);
    const reach = (room > 0.5 ? room + slack : 0) * perPixel;
    return Math.min(centre + reach, Math.max(centre - reach, value));
  };
  const centre = middle(grid, size, scale);
  return {
    x: inside(view.x, centre.x, grid.width, open.width),
    y: inside(view.y, centre.y, grid.height, open.height),
    scale,
  };
}

/** Where a point of the ground (m) stands on the screen. */
export function toScreen(view: MapView, grid: Grid, size: MapSize, x: number, y: number): ScreenPoint {
  const pixels = view.scale / grid.cellSize;
  return { left: size.width / 2 + (x - view.x) * pixels, top: size.height / 2 + (view.y - y) * pixels };
}

/** The point of the ground (m) below a place on the screen. */
export function toGround(
  view: MapView,
  grid: Grid,
  size: MapSize,
  { left, top }: ScreenPoint,
): { x: number; y: number } {
  const perPixel = grid.cellSize / view.scale;
  return { x: view.x + (left - size.width / 2) * perPixel, y: view.y - (top - size.height / 2) * perPixel };
}

/** Zooms by a factor so that the ground below `at` stays there, as far as the limits allow. */
export function zoomAt(view: MapView, grid: Grid, size: MapSize, at: ScreenPoint, factor: number): MapView {
  const scale = Math.min(largestScale, Math.max(fitScale(grid, size), view.scale * factor));
  const held = toGround(view, grid, size, at);
  const perPixel = grid.cellSize / scale;
  return clampView(
    {
      x: held.x - (at.left - size.width / 2) * perPixel,
      y: held.y + (at.top - size.height / 2) * perPixel,
      scale,
    },
    grid,
    size,
  );
}

/** Moves the ground by so many px to the right and down. */
export function panBy(view: MapView, grid: Grid, size: MapSize, right: number, down: number): MapView {
  const perPixel = grid.cellSize / view.scale;
  return clampView({ ...view, x: view.x - right * perPixel, y: view.y + down * perPixel }, grid, size);
}

/** The nearest view that keeps a point of the ground at least `margin` px from the edges. */
export function bringIn(
  view: MapView,
  grid: Grid,
  size: MapSize,
  x: number,
  y: number,
  margin: number,
): MapView {
  const { left, top } = toScreen(view, grid, size, x, y);
  const shift = (at: number, length: number) => {
    const kept = Math.min(margin, length / 2);
    return Math.min(length - kept, Math.max(kept, at)) - at;
  };
  return panBy(view, grid, size, shift(left, size.width), shift(top, size.height));
}
