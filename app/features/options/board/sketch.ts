import type { GroundPoint } from '#app/map/rings.ts';
import type { BoardTool } from './board-tools.ts';
import { pulled, type Hold } from './corners.ts';

/** An outline, or a line, while it is drawn. */
export interface Sketch {
  readonly points: readonly GroundPoint[];
  /** where the next point would be */
  readonly over: GroundPoint | undefined;
  /** all points are there: it can be filled, or its points moved */
  readonly done: boolean;
  /** what is being dragged */
  readonly held?: Hold | undefined;
}

export type SketchEvent =
  /** `reach`: how near a point counts as that point, m */
  | { type: 'press'; at: GroundPoint; reach: number }
  | { type: 'over'; at: GroundPoint | undefined }
  /** takes the last point back, or opens again what is done */
  | { type: 'back' }
  | { type: 'finish' }
  | { type: 'hold'; hold: Hold | undefined }
  | { type: 'pull'; to: GroundPoint }
  /** an outline or a line that was drawn before */
  | { type: 'put'; points: readonly GroundPoint[] }
  | { type: 'clear' };

export const noSketch: Sketch = { points: [], over: undefined, done: false };

const near = ([ax, ay]: GroundPoint, [bx, by]: GroundPoint, reach: number) =>
  Math.hypot(ax - bx, ay - by) <= reach;

/** Whether a tool's sketch is an outline, and not a line. */
export const drawsOutline = (tool: BoardTool): boolean => tool !== 'line';

/** Fewest points that make a whole: three of an outline, two of a line. */
export const fewestPoints = (closed: boolean): number => (closed ? 3 : 2);

/**
 * The next state of a sketch. A press adds a point; one on the first point closes an outline, one on the last ends a
 * line, and a second press on the last point of either adds nothing, so that a double click can finish.
 */
export function sketchStep(sketch: Sketch, event: SketchEvent, closed: boolean): Sketch {
  const { points, done } = sketch;
  const enough = points.length >= fewestPoints(closed);
  switch (event.type) {
    case 'press': {
      if (done) return sketch;
      if (closed && enough && near(points[0], event.at, event.reach)) return finished(sketch);
      const last = points.at(-1);
      if (last && near(last, event.at, event.reach)) return sketch;
      return { points: [...points, event.at], over: event.at, done: false };
    }
    case 'over':
      return done || event.at === sketch.over ? sketch : { ...sketch, over: event.at };
    case 'back':
      if (done) return { ...sketch, done: false };
      return points.length === 0 ? sketch : { ...sketch, points: points.slice(0, -1) };
    case 'finish':
      return enough && !done ? finished(sketch) : sketch;
    case 'hold':
      return { ...sketch, held: event.hold };
    case 'pull': {
      const { held } = sketch;
      if (!held) return sketch;
      // A middle that is pulled is a corner from then on.
      const index = held.kind === 'middle' ? held.index + 1 : held.index;
      return { ...sketch, points: pulled(points, held, event.to), held: { kind: 'corner', index } };
    }
    case 'put':
      return event.points.length > 0 ? { points: event.points, over: undefined, done: true } : noSketch;
    case 'clear':
      return noSketch;
  }
}

const finished = (sketch: Sketch): Sketch => ({ ...sketch, over: undefined, done: true });
