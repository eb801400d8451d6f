import { useMemo, useReducer, useState } from 'react';
import { newWorkId, type Work } from '#contract/works.ts';
import { placeOf } from '#contract/works-words.ts';
import type { MapFoothold } from '#app/map/map-symbols.ts';
import type { MapPoint, MapTool } from '#app/map/map-tool.ts';
import type { GroundPoint, Ring } from '#app/map/rings.ts';
import type { DraftAction, OptionDraft } from '../option-draft.ts';
import { isAreaTool, isPattern, toolOfLetter, type BoardTool } from './board-tools.ts';
import { worksProblem, type RefusedPlace, type WorksGround } from './check-works.ts';
import { pulled } from './corners.ts';
import { worksInBox } from './find-works.ts';
import { withPartners } from './planted-mounds.ts';
import { copiedWorks, movedWork, snappedToMiddle } from './move-works.ts';
import { reshapable, selectTool, withRing, type Grip } from './select-tool.ts';
import { drawsOutline, noSketch, sketchStep, type Sketch, type SketchEvent } from './sketch.ts';
import { sketchTool } from './sketch-tool.ts';

export interface BoardInput {
  readonly ground: WorksGround;
  readonly draft: OptionDraft;
  readonly draw: (action: DraftAction) => void;
  readonly tool: BoardTool;
  readonly editable: boolean;
  readonly snap: boolean;
  readonly surveyed: readonly MapFoothold[];
  /** a surveyed foothold that is shown instead of a selection */
  readonly shown: string | undefined;
  readonly onTool: (tool: BoardTool) => void;
  readonly onSnap: () => void;
  readonly onSurveyed: (id: string | undefined, kept: boolean) => void;
  readonly onRefused: (place: RefusedPlace | undefined) => void;
  /** A mound at a place as it is typed above the map, with the clumps on it; undefined where that is wrong. */
  readonly moundAt: (x: number, y: number) => readonly Work[] | undefined;
  /** The works of an outline, or undefined where what is typed is wrong. */
  readonly workOf: (ring: Ring) => Work | undefined;
  /** the first point of an outline or a line was drawn */
  readonly onSketch: () => void;
  /** the tool fills the whole site unless an outline is drawn */
  readonly wholeSite: boolean;
  /** Enter on a finished outline or line, or on a pattern over the whole site; whether something was placed. */
  readonly onPlace: () => boolean;
  /** Escape with nothing drawn: the tool is left, and what it shows goes */
  readonly onLeave: () => void;
  /** Where things that were added stand in time, so that they can be shown. */
  readonly onAdded: (works: readonly Work[]) => void;
}

export interface Board {
  readonly mapTool: MapTool;
  readonly sketch: Sketch;
  readonly clearSketch: () => void;
  readonly send: (event: SketchEvent) => void;
  /** works as they are shown: those that are dragged where they are dragged to */
  readonly works: readonly Work[];
  readonly box: readonly [GroundPoint, GroundPoint] | undefined;
  /** outline with handles, and the corner that the keys hold */
  readonly shape: Ring | undefined;
  readonly corner: number | undefined;
  readonly copy: () => void;
  readonly remove: () => void;
}

const copySteps = [3, 6, 12, 24];

/** Puts the tools together: what the map tells goes to the one in use, what that decides goes into the drawing. */
export function useBoardTool(input: BoardInput): Board {
  const { ground, draft, draw, tool, editable, snap } = input;
  const { grid } = ground;
  const { works, selected } = draft;
  const [grip, setGrip] = useState<Grip>();
  const [held, setHeld] = useState<{ id: string; corner: number }>();
  const closed = drawsOutline(tool);
  const [sketch, setSketch] = useReducer(
    (now: Sketch, event: SketchEvent) => sketchStep(now, event, closed),
    noSketch,
  );
  const shape = editable ? reshapable(works, selected) : undefined;
  const corner = shape && held?.id === shape.work.id ? held.corner : undefined;

  const take = (next: readonly Work[]): boolean => {
    const problem = worksProblem(ground, next);
    input.onRefused(problem);
    return problem === undefined;
  };
  const add = (added: readonly Work[]): boolean => {
    if (!take(added)) return false;
    draw({ type: 'add', works: added });
    input.onAdded(added);
    return true;
  };
  const select = (ids: Iterable<string>) => {
    input.onRefused(undefined);
    input.onSurveyed(undefined, false);
    draw({ type: 'select', ids: withPartners(ids, works) });
  };
  const copy = () => {
    const mine = works.filter((work) => selected.has(work.id));
    let problem: RefusedPlace | undefined;
    for (const cells of copySteps)
      for (const [right, up] of [
        [1, -1],
        [1, 1],
        [-1, -1],
        [-1, 1],
      ]) {
        const step = cells * grid.cellSize;
        const copies = copiedWorks(mine, right * step, up * step, newWorkId);
        const found = worksProblem(ground, copies);
        problem ??= found;
        if (!found) return void add(copies);
      }
    input.onRefused(problem);
  };
  const remove = () => {
    input.onRefused(undefined);
    draw({ type: 'remove', ids: selected });
  };

  const selecting = selectTool({
    ...{ grid, works, selected, editable, snap, grip, corner },
    ...{ surveyed: input.surveyed, shown: input.shown, onSurveyed: input.onSurveyed },
    boxes: tool === 'box',
    setGrip,
    setCorner: (index) =>
      setHeld(index === undefined || !shape ? undefined : { id: shape.work.id, corner: index }),
    select,
    selectBox: (from, to, more) => {
      const inside = new Set(worksInBox(works, from, to).map((work) => work.id));
      select(more ? [...selected, ...inside] : inside);
    },
    change: (next, step) => {
      if (!take(next)) return false;
      draw({ type: 'change', works: next, step });
      return true;
    },
    ...{ remove, copy },
  });

  const finish = (next: Sketch) => {
    if (!next.done || sketch.done || !isAreaTool(tool)) return true;
    const work = input.workOf(next.points);
    if (!work || !add([work])) return false;
    setSketch({ type: 'clear' });
    return false;
  };
  const send = (event: SketchEvent) => {
    if (event.type === 'press' || event.type === 'clear') input.onRefused(undefined);
    if (event.type === 'press' && sketch.points.length === 0) input.onSketch();
    // What cannot be placed stays open, with its points, so that it can be mended.
    if (finish(sketchStep(sketch, event, closed))) setSketch(event);
  };
  const sketching = sketchTool({
    ...{ grid, sketch, closed, snap, send },
    onOffSite: (at) => {
      const [x, y] = at;
      input.onRefused({ x, y, problem: 'A corner must lie on the site.' });
    },
    onEnter: input.onPlace,
    wholeSite: input.wholeSite,
    onLeave: input.onLeave,
  });

  const placing: MapTool = {
    ...selecting,
    cursor: 'crosshair',
    help: `Space or Enter places a mound at the crosshair. ${selecting.help}`,
    grab: (at) => selecting.grab?.(rightOn(works, at)) === true,
    press: (at: MapPoint) => {
      if (rightOn(works, at).id !== undefined) return selecting.press?.(at);
      const [x, y] = snap ? snappedToMiddle(grid, [at.x, at.y]) : [at.x, at.y];
      const mound = input.moundAt(x, y);
      if (mound) add(mound);
    },
  };
  const sketches = editable && (isPattern(tool) || isAreaTool(tool));
  const inUse = sketches ? sketching : tool === 'mound' && editable ? placing : selecting;

  const shown = useMemo(() => shownWorks(works, selected, grip), [works, selected, grip]);

  return {
    mapTool: {
      ...inUse,
      key: (event, at) => {
        const taken = inUse.key?.(event, at);
        if (taken || !editable || event.altKey || event.ctrlKey || event.metaKey) return taken ?? false;
        if (event.key.toLowerCase() === 'k') input.onSnap();
        else {
          const chosen = event.key.length === 1 ? toolOfLetter(event.key) : undefined;
          if (!chosen) return false;
          input.onTool(chosen);
        }
        return true;
      },
    },
    sketch: sketches ? sketch : noSketch,
    clearSketch: () => setSketch({ type: 'clear' }),
    send,
    works: shown,
    box: grip?.kind === 'box' ? [grip.from, grip.to] : undefined,
    shape: shape && !sketches ? shownRing(shape.ring, grip) : undefined,
    corner,
    copy,
    remove,
  };
}

const shownRing = (ring: Ring, grip: Grip | undefined): Ring =>
  grip?.kind === 'corner' && grip.to
    ? pulled(ring, grip.hold, grip.to)
    : grip?.kind === 'works'
      ? ring.map(([x, y]): GroundPoint => [x + grip.by[0], y + grip.by[1]])
      : ring;

/** px around the point of one of the works that count as that point while others are placed beside it */
const onPoint = 4;

/**
 * A place as a tool that places hears it: on one of the works only right where that stands, so that the symbols of what
 * is there, larger on the screen than on the ground, keep nothing from being placed beside them.
 */
function rightOn(works: readonly Work[], at: MapPoint): MapPoint {
  const work = works.find(({ id }) => id === at.id);
  const { x, y } = work ? placeOf(work) : at;
  const reach = Math.max(work?.kind === 'mound' ? work.radius : 0, onPoint * at.metresPerPixel);
  return work && Math.hypot(at.x - x, at.y - y) <= reach ? at : { ...at, id: undefined };
}

/** The works, with those that are dragged where they are dragged to. */
function shownWorks(
  works: readonly Work[],
  selected: ReadonlySet<string>,
  grip: Grip | undefined,
): readonly Work[] {
  if (grip?.kind === 'works') {
    const [dx, dy] = grip.by;
    const moved = selected.has(grip.id) ? selected : withPartners([grip.id], works);
    return dx === 0 && dy === 0
      ? works
      : works.map((work) => (moved.has(work.id) ? movedWork(work, dx, dy) : work));
  }
  const shape = grip?.kind === 'corner' && grip.to ? reshapable(works, selected) : undefined;
  if (!shape || grip?.kind !== 'corner' || !grip.to) return works;
  const next = withRing(shape.work, pulled(shape.ring, grip.hold, grip.to));
  return works.map((work) => (work === shape.work ? next : work));
}
