import type { Grid } from '#sim-core/grid/grid.ts';
import { boxOf, type MapArea } from './map-areas.ts';
import type { MapColours } from './map-colours.ts';
import { toScreen, type MapSize, type MapView, type ScreenPoint } from './map-view.ts';
import { pointInside, type GroundPoint, type Ring } from './rings.ts';

/** A line of equal values over the map, with where its words stand. */
export interface MapContour {
  readonly words: string;
  readonly lines: readonly Ring[];
  readonly labels: readonly { readonly x: number; readonly y: number; readonly angle?: number }[];
}

export interface Overlay {
  readonly areas: readonly MapArea[];
  readonly contours: readonly MapContour[];
  /** footholds that carry a ring because several are selected */
  readonly ringed: readonly { readonly x: number; readonly y: number }[];
  readonly selected: ReadonlySet<string>;
}

type Pen = CanvasRenderingContext2D;
const faintness = 0.45;
/** What is surveyed or taken away is drawn in ink; what people plant, in coral. */
const inkDashes: Partial<Record<MapArea['kind'], readonly number[]>> = {
  fence: [5, 3],
  loss: [2, 2.5],
  refuge: [],
  allowed: [9, 3, 2, 3],
};

/** Paints contours, outlines and the rings of a selection; px of the screen from the map's top left corner. */
export function paintOverlay(
  pen: Pen,
  overlay: Overlay,
  at: { grid: Grid; view: MapView; size: MapSize },
  colours: MapColours,
): void {
  const { grid, view, size } = at;
  const place = ([x, y]: GroundPoint): ScreenPoint => toScreen(view, grid, size, x, y);
  const pixels = view.scale / grid.cellSize;
  pen.clearRect(0, 0, size.width, size.height);
  pen.lineJoin = 'round';
  paintContours(pen, overlay.contours, place, size, colours);
  const half = { x: size.width / 2 / pixels, y: size.height / 2 / pixels };
  for (const area of overlay.areas) {
    const { west, east, south, north } = boxOf(area);
    if (east < view.x - half.x || west > view.x + half.x) continue;
    if (north < view.y - half.y || south > view.y + half.y) continue;
    pen.globalAlpha = area.faint ? faintness : 1;
    paintArea(pen, area, place, (east - west) * pixels, overlay.selected.has(area.id), colours);
  }
  pen.globalAlpha = 1;
  pen.setLineDash([]);
  for (const { x, y } of overlay.ringed) {
    const { left, top } = place([x, y]);
    if (left < -20 || top < -20 || left > size.width + 20 || top > size.height + 20) continue;
    pen.beginPath();
    pen.arc(left + 3, top - 5, 11, 0, 2 * Math.PI);
    outline(pen, colours.halo, 3.6);
    outline(pen, colours.ink, 1.6);
  }
}

function trace(pen: Pen, line: Ring, place: (point: GroundPoint) => ScreenPoint, closed: boolean): void {
  line.forEach((point, i) => {
    const { left, top } = place(point);
    if (i === 0) pen.moveTo(left, top);
    else pen.lineTo(left, top);
  });
  if (closed) pen.closePath();
}

function outline(pen: Pen, colour: string, width: number): void {
  pen.strokeStyle = colour;
  pen.lineWidth = width;
  pen.stroke();
}

/** A fence is dashed in ink, a loss dotted with a cross, a surveyed refuge drawn through, plants a line of coral between lines of ink, like their flags. */
function paintArea(
  pen: Pen,
  { kind, ring, holes = [] }: MapArea,
  place: (point: GroundPoint) => ScreenPoint,
  width: number,
  selected: boolean,
  colours: MapColours,
): void {
  const more = selected ? 1.4 : 0;
  pen.beginPath();
  for (const outline of [ring, ...holes]) trace(pen, outline, place, true);
  pen.setLineDash([]);
  outline(pen, colours.halo, 4.4 + more);
  const dash = inkDashes[kind];
  if (dash) {
    pen.setLineDash([...dash]);
    outline(pen, colours.ink, 1.8 + more);
    pen.setLineDash([]);
  } else {
    outline(pen, colours.ink, 3.2 + more);
    outline(pen, colours.flag, 1.7);
  }
  if ((kind !== 'planting' && kind !== 'loss') || width < 24) return;
  const { left, top } = place(pointInside(ring));
  pen.beginPath();
  if (kind === 'loss') {
    pen.moveTo(left - 5, top - 5);
    pen.lineTo(left + 5, top + 5);
    pen.moveTo(left + 5, top - 5);
    pen.lineTo(left - 5, top + 5);
    outline(pen, colours.halo, 4.5);
    outline(pen, colours.ink, 1.6);
    return;
  }
  pen.moveTo(left, top + 7);
  pen.lineTo(left, top - 4);
  pen.moveTo(left - 5, top - 2);
  pen.lineTo(left, top + 3.5);
  pen.lineTo(left + 5, top - 2);
  outline(pen, colours.halo, 6);
  outline(pen, colours.ink, 3.6);
  outline(pen, colours.flag, 2);
}

function paintContours(
  pen: Pen,
  contours: readonly MapContour[],
  place: (point: GroundPoint) => ScreenPoint,
  size: MapSize,
  colours: MapColours,
): void {
  for (const { lines } of contours) {
    pen.beginPath();
    for (const line of lines) trace(pen, line, place, false);
    pen.globalAlpha = 0.3;
    outline(pen, colours.halo, 2.2);
    pen.globalAlpha = 0.7;
    outline(pen, colours.ink, 0.8);
  }
  pen.globalAlpha = 1;
  pen.font = '600 11px "Atkinson Hyperlegible Mono Variable", monospace';
  pen.textAlign = 'center';
  pen.textBaseline = 'middle';
  const taken: ScreenPoint[] = [];
  for (const { words, labels } of contours)
    for (const { x, y, angle = 0 } of labels) {
      const { left, top } = place([x, y]);
      if (left < 24 || top < 24 || left > size.width - 24 || top > size.height - 12) continue;
      // Years that stood on each other could not be read.
      if (taken.some((other) => Math.abs(other.left - left) < 80 && Math.abs(other.top - top) < 48)) continue;
      taken.push({ left, top });
      pen.save();
      pen.translate(left, top);
      pen.rotate(angle);
      pen.lineWidth = 3.4;
      pen.strokeStyle = colours.halo;
      pen.strokeText(words, 0, 0);
      pen.fillStyle = colours.ink;
      pen.fillText(words, 0, 0);
      pen.restore();
    }
}
