import type { Grid } from '#sim-core/grid/grid.ts';

/** What a map shows: the point in its middle, in the grid's CRS (m), and the side of a cell in CSS px. */
export interface MapView {
  readonly x: number;
  readonly y: number;
  readonly scale: number;
}
/** Room for the map, CSS px. */
export interface MapSize {
  readonly width: number;
  readonly height: number;
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
/** The map starts filled to its edges unless that hides more than this. */
const mostHidden = 1.7;

/** Scale at which the whole grid is seen. */
export const fitScale = (grid: Grid, size: MapSize): number =>
  Math.min(largestScale, size.width / grid.width, size.height / grid.height);

const middle = (grid: Grid) => ({
  x: grid.originX + (grid.width * grid.cellSize) / 2,
  y: grid.originY - (grid.height * grid.cellSize) / 2,
});

/** The whole grid. */
export const wholeView = (grid: Grid, size: MapSize): MapView => ({
  ...middle(grid),
  scale: fitScale(grid, size),
});

/** What a map starts with: ground to its edges where that hides little of it, else the whole grid. */
export function startView(grid: Grid, size: MapSize): MapView {
  const whole = fitScale(grid, size);
  const full = Math.min(largestScale, Math.max(size.width / grid.width, size.height / grid.height));
  return { ...middle(grid), scale: full / whole <= mostHidden ? full : whole };
}

/** The same view kept within what makes sense: not smaller than the whole, not beyond the ground. */
export function clampView(view: MapView, grid: Grid, size: MapSize): MapView {
  const scale = Math.min(largestScale, Math.max(fitScale(grid, size), view.scale));
  const perPixel = grid.cellSize / scale;
  const inside = (value: number, centre: number, cells: number, pixels: number) => {
    const room = Math.max(0, (cells * scale - pixels) / 2);
    const reach = (room > 0.5 ? room + slack : 0) * perPixel;
    return Math.min(centre + reach, Math.max(centre - reach, value));
  };
  const centre = middle(grid);
  return {
    x: inside(view.x, centre.x, grid.width, size.width),
    y: inside(view.y, centre.y, grid.height, size.height),
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
