import type { KeyboardEvent } from 'react';
import { withoutPlanted } from '#contract/work-titles.ts';
import type { Work } from '#contract/works.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { arrowMove } from '#app/map/map-keys.ts';
import type { MapFoothold } from '#app/map/map-symbols.ts';
import type { MapPoint, MapSight, MapTool } from '#app/map/map-tool.ts';
import type { GroundPoint } from '#app/map/rings.ts';
import { placeOf } from '#contract/works-words.ts';
import { holdAt, pulled, withoutCorner, type Hold } from './corners.ts';
import { movedWork, snappedToCorner, snappedToMiddle } from './move-works.ts';
import { nextOnMap } from './find-works.ts';
import { withPartners } from './planted-mounds.ts';

/** What is held while it is dragged: works, a corner of an outline, or the far corner of a box. */
export type Grip =
  | { readonly kind: 'works'; readonly id: string; readonly from: GroundPoint; readonly by: GroundPoint }
  | { readonly kind: 'corner'; readonly hold: Hold; readonly to: GroundPoint | undefined }
  | { readonly kind: 'box'; readonly from: GroundPoint; readonly to: GroundPoint };

/** Reach of a pointer around a corner, px. */
const cornerReach = 10;

export interface SelectContext {
  readonly grid: Grid;
  readonly works: readonly Work[];
  readonly selected: ReadonlySet<string>;
  readonly surveyed: readonly MapFoothold[];
  /** a surveyed foothold that is shown instead of a selection */
  readonly shown: string | undefined;
  readonly editable: boolean;
  readonly snap: boolean;
  /** every drag on open ground, and every press, spans a box */
  readonly boxes: boolean;
  readonly grip: Grip | undefined;
  /** corner that the keys move */
  readonly corner: number | undefined;
  readonly setGrip: (grip: Grip | undefined) => void;
  readonly setCorner: (corner: number | undefined) => void;
  readonly select: (ids: Iterable<string>) => void;
  readonly selectBox: (from: GroundPoint, to: GroundPoint, more: boolean) => void;
  /** a surveyed foothold was pressed, or could not be removed */
  readonly onSurveyed: (id: string, kept: boolean) => void;
  /** Takes works in place of themselves, or says why not; `step` makes one of many small changes. */
  readonly change: (works: readonly Work[], step?: string) => boolean;
  readonly remove: () => void;
  readonly copy: () => void;
}

/** The outline that can be reshaped: that of the only one of the works that is selected. */
export function reshapable(works: readonly Work[], selected: ReadonlySet<string>) {
  if (selected.size !== 1) return undefined;
  const [id] = selected;
  const work = works.find((other) => other.id === id);
  return work && 'area' in work && work.area.shape === 'polygon'
    ? { work, ring: work.area.ring as readonly GroundPoint[] }
    : undefined;
}

/** One of the works with another outline; its holes stay where they are. */
export const withRing = (work: Work, ring: readonly GroundPoint[]): Work => {
  const area = 'area' in work && work.area.shape === 'polygon' ? work.area : { shape: 'polygon' };
  return { ...work, area: { ...area, ring: ring.map(([x, y]) => [x, y]) } } as Work;
};

/** Selects by press, Shift and box; moves what is selected; reshapes an outline by its corners. */
export function selectTool(context: SelectContext): MapTool {
  const { grid, works, selected, editable, snap, grip, boxes } = context;
  const shape = editable ? reshapable(works, selected) : undefined;
  const isWork = (id: string | undefined): id is string =>
    id !== undefined && works.some((work) => work.id === id);

  /** How far the works are to go when the pointer is at a place. */
  const wayTo = (at: MapPoint, held: Extract<Grip, { kind: 'works' }>): GroundPoint => {
    const [dx, dy] = [at.x - held.from[0], at.y - held.from[1]];
    const work = works.find((other) => other.id === held.id);
    if (!snap || !work) return [dx, dy];
    const { x, y } = placeOf(work);
    if (work.kind !== 'mound') {
      const cells = (metres: number) => Math.round(metres / grid.cellSize) * grid.cellSize;
      return [cells(dx), cells(dy)];
    }
    const [tx, ty] = snappedToMiddle(grid, [x + dx, y + dy]);
    return [tx - x, ty - y];
  };
  const cornerAt = (at: MapPoint): GroundPoint => (snap ? snappedToCorner(grid, [at.x, at.y]) : [at.x, at.y]);
  const moving = (id: string) => {
    const ids = selected.has(id) ? selected : withPartners([id], works);
    return works.filter((work) => ids.has(work.id));
  };

  return {
    cursor: boxes ? 'crosshair' : 'default',
    help:
      `${boxes ? 'Space sets one corner of a box and then the other, and selects what is inside. ' : 'Space selects what is under the crosshair, with Shift beside what is selected. '}` +
      'N finds the next of the works, Shift and N the one before.' +
      (editable
        ? ' Arrow keys move what is selected by one cell, with Shift by ten; Delete removes it; Control and D copies it; V takes hold of the next corner of an outline.'
        : ''),
    press: (at) => {
      if (boxes && at.id === undefined) {
        if (grip?.kind === 'box') {
          context.selectBox(grip.from, [at.x, at.y], at.shift);
          context.setGrip(undefined);
        } else context.setGrip({ kind: 'box', from: [at.x, at.y], to: [at.x, at.y] });
        return;
      }
      if (isWork(at.id)) {
        const pressed = withPartners([at.id], works);
        const others = [...selected].filter((id) => !pressed.has(id));
        context.select(at.shift ? (selected.has(at.id) ? others : [...others, at.id]) : [at.id]);
      } else if (at.id !== undefined) context.onSurveyed(at.id, false);
      else if (!at.shift) context.select([]);
    },
    grab: (at) => {
      const hold = shape && holdAt(shape.ring, at.x, at.y, cornerReach * at.metresPerPixel, true);
      if (hold) {
        context.setGrip({ kind: 'corner', hold, to: undefined });
        return true;
      }
      if (editable && isWork(at.id) && !at.shift) {
        context.setGrip({ kind: 'works', id: at.id, from: [at.x, at.y], by: [0, 0] });
        return true;
      }
      if (!boxes && !at.shift) return false;
      context.setGrip({ kind: 'box', from: [at.x, at.y], to: [at.x, at.y] });
      return true;
    },
    drag: (at) => {
      if (grip?.kind === 'works') {
        if (!selected.has(grip.id)) context.select([grip.id]);
        context.setGrip({ ...grip, by: wayTo(at, grip) });
      } else if (grip?.kind === 'corner') context.setGrip({ ...grip, to: cornerAt(at) });
      else if (grip) context.setGrip({ ...grip, to: [at.x, at.y] });
    },
    drop: (at) => {
      context.setGrip(undefined);
      if (!at || !grip) return;
      if (grip.kind === 'works') {
        const [dx, dy] = wayTo(at, grip);
        context.change(moving(grip.id).map((work) => movedWork(work, dx, dy)));
      } else if (grip.kind === 'corner') {
        if (shape) context.change([withRing(shape.work, pulled(shape.ring, grip.hold, cornerAt(at)))]);
      } else context.selectBox(grip.from, [at.x, at.y], at.shift);
    },
    point: (at) => {
      if (at && boxes && grip?.kind === 'box') context.setGrip({ ...grip, to: [at.x, at.y] });
    },
    key: (event) => keyed(event, context, shape),
  };
}

function keyed(
  event: KeyboardEvent,
  context: SelectContext,
  shape: ReturnType<typeof reshapable>,
): boolean | MapSight {
  const { grid, works, selected, editable, corner } = context;
  const mine = () => works.filter((work) => selected.has(work.id));
  const modified = event.ctrlKey || event.metaKey;
  const letter = event.key.toLowerCase();
  if (modified && !event.altKey) {
    if (letter === 'a') context.select(works.map((work) => work.id));
    else if (letter === 'd' && editable && selected.size > 0) context.copy();
    else return false;
    return true;
  }
  if (event.altKey) return false;
  if (letter === 'n') {
    const stops = withoutPlanted(works);
    const from = context.shown ?? stops.findLast((work) => selected.has(work.id))?.id;
    const next = nextOnMap(stops, context.surveyed, from, event.shiftKey ? -1 : 1);
    if (!next) return false;
    if (works.some((work) => work.id === next.id)) context.select([next.id]);
    else context.onSurveyed(next.id, false);
    return next;
  }
  if (event.key === 'Escape') {
    if (context.grip) context.setGrip(undefined);
    else if (corner !== undefined) context.setCorner(undefined);
    else if (selected.size > 0 || context.shown !== undefined) context.select([]);
    else return false;
    return true;
  }
  if (!editable) return false;
  if (letter === 'v' && shape) {
    const { length } = shape.ring;
    const next = ((corner ?? (event.shiftKey ? 0 : -1)) + (event.shiftKey ? -1 : 1) + length) % length;
    context.setCorner(next);
    return { x: shape.ring[next][0], y: shape.ring[next][1] };
  }
  if (event.key === 'Delete' || event.key === 'Backspace') {
    if (shape && corner !== undefined) {
      const ring = withoutCorner(shape.ring, corner, true);
      context.setCorner(undefined);
      if (ring) context.change([withRing(shape.work, ring)]);
    } else if (selected.size > 0) context.remove();
    else if (context.shown !== undefined) context.onSurveyed(context.shown, true);
    else return false;
    return true;
  }
  const cells = arrowMove(event.key, event.shiftKey ? 10 : 1);
  if (!cells || selected.size === 0) return false;
  const [dx, dy] = [cells[0] * grid.cellSize, -cells[1] * grid.cellSize];
  if (shape && corner !== undefined) {
    const [x, y] = shape.ring[corner];
    const to: GroundPoint = [x + dx, y + dy];
    context.change(
      [withRing(shape.work, pulled(shape.ring, { kind: 'corner', index: corner }, to))],
      `corner ${shape.work.id}/${corner}`,
    );
    return { x: to[0], y: to[1] };
  }
  const moved = mine().map((work) => movedWork(work, dx, dy));
  context.change(moved, `push ${[...selected].join()}`);
  return placeOf(moved[moved.length - 1]);
}
