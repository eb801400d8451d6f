import type { Grid } from '#sim-core/grid/grid.ts';
import type { MapPoint, MapTool } from '#app/map/map-tool.ts';
import type { GroundPoint } from '#app/map/rings.ts';
import { isOnSite } from './check-works.ts';
import { holdAt } from './corners.ts';
import { snappedToCorner } from './move-works.ts';
import { fewestPoints, type Sketch, type SketchEvent } from './sketch.ts';

/** Reach of a pointer around a point, px. */
const reach = 10;

export interface SketchContext {
  readonly grid: Grid;
  readonly sketch: Sketch;
  /** an outline, or a line */
  readonly closed: boolean;
  readonly snap: boolean;
  readonly send: (event: SketchEvent) => void;
  /** a point off the site was asked for */
  readonly onOffSite: (at: GroundPoint) => void;
  /** a pattern that fills the whole site needs no sketch to be placed */
  readonly wholeSite: boolean;
  /** Enter on a sketch that is done, or with nothing drawn on what is shown; whether it was taken */
  readonly onEnter: () => boolean;
  /** Escape with nothing drawn */
  readonly onLeave: () => void;
}

/** Draws an outline or a line point by point; points can be moved as long as it is not placed. */
export function sketchTool(context: SketchContext): MapTool {
  const { grid, sketch, closed, snap, send, wholeSite } = context;
  const pointAt = (at: MapPoint): GroundPoint => (snap ? snappedToCorner(grid, [at.x, at.y]) : [at.x, at.y]);
  const what = closed ? 'outline' : 'line';
  return {
    cursor: 'crosshair',
    help: sketch.done
      ? `The ${what} is drawn. Enter places what is shown, Backspace opens the ${what} again, Escape takes it away.`
      : `${wholeSite && sketch.points.length === 0 ? 'Enter places the pattern that is shown, Escape drops it. ' : ''}Space adds a point at the crosshair, Enter ${closed ? 'closes the outline' : 'ends the line'}, Backspace takes the last point back, Escape leaves it.`,
    press: (at) => {
      if (sketch.done) return;
      const [x, y] = pointAt(at);
      if (!isOnSite(grid, x, y)) return context.onOffSite([at.x, at.y]);
      send({ type: 'press', at: [x, y], reach: reach * at.metresPerPixel });
    },
    doublePress: () => send({ type: 'finish' }),
    grab: (at) => {
      if (sketch.points.length === 0) return false;
      const hold = holdAt(sketch.points, at.x, at.y, reach * at.metresPerPixel, closed && sketch.done);
      if (!hold || (hold.kind === 'middle' && !sketch.done)) return false;
      send({ type: 'hold', hold });
      return true;
    },
    drag: (at) => send({ type: 'pull', to: pointAt(at) }),
    drop: (at) => {
      if (at) send({ type: 'pull', to: pointAt(at) });
      send({ type: 'hold', hold: undefined });
    },
    point: (at) => send({ type: 'over', at: at && pointAt(at) }),
    key: (event) => {
      if (event.altKey || event.ctrlKey || event.metaKey) return false;
      if (event.key === 'Enter') {
        if (sketch.done || (wholeSite && sketch.points.length === 0)) return context.onEnter();
        if (sketch.points.length < fewestPoints(closed)) return false;
        send({ type: 'finish' });
        return true;
      }
      if (event.key === 'Backspace' || event.key === 'Delete') {
        send({ type: 'back' });
        return sketch.points.length > 0;
      }
      if (event.key !== 'Escape') return false;
      if (sketch.points.length > 0) send({ type: 'clear' });
      else context.onLeave();
      return true;
    },
  };
}
