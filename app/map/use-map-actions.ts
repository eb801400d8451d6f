import { useEffect, useRef, useState, type KeyboardEvent, type RefObject } from 'react';
import { cellAt, cellCentre, type Grid } from '#sim-core/grid/grid.ts';
import { arrowMove, crosshairStride, movedCell, type MapCell } from './map-keys.ts';
import { footholdAt, type MapFoothold } from './map-symbols.ts';
import {
  bringIn,
  panBy,
  toGround,
  toScreen,
  wholeView,
  zoomAt,
  type MapSize,
  type MapView,
  type ScreenPoint,
} from './map-view.ts';
import type { MapPlace, SiteMapProps } from './site-map-props.ts';
import { useMapPointer } from './use-map-pointer.ts';

interface MapActionsInput extends Pick<
  SiteMapProps,
  'grid' | 'selectedId' | 'tool' | 'onPlace' | 'onSelect' | 'onMove' | 'onRemove' | 'onKept' | 'onHover'
> {
  readonly footholds: readonly MapFoothold[];
  readonly surface: RefObject<HTMLDivElement | null>;
  readonly view: MapView | undefined;
  readonly size: MapSize;
  readonly show: (view: MapView) => void;
}

const keepIn = 60;
const toCentimetre = (metres: number) => Math.round(metres * 100) / 100;

/** A point of the ground as a place of the grid, or undefined outside it. */
function placeAt(grid: Grid, x: number, y: number): MapPlace | undefined {
  const cell = cellAt(grid, x, y);
  return cell && { ...cell, x: toCentimetre(x), y: toCentimetre(y) };
}

/** What pointer and keyboard do on a site's map, and what that leaves to be drawn. */
export function useMapActions(input: MapActionsInput) {
  const { grid, footholds, surface, view, size, show, selectedId, onPlace, onSelect, onMove, onHover } =
    input;
  const [hovered, setHovered] = useState<{ x: number; y: number }>();
  const [crosshair, setCrosshair] = useState<MapCell>();
  const [moving, setMoving] = useState<{ id: string; x: number; y: number }>();
  const grabbedId = useRef<string>(undefined);
  const selected = footholds.find((f) => f.id === selectedId);
  const movable = (f: MapFoothold | undefined) => (onMove && f?.kind === 'planned' ? f : undefined);

  const hoveredCell = hovered && cellAt(grid, hovered.x, hovered.y);
  const read = crosshair ?? hoveredCell;
  const { column, row } = read ?? {};
  useEffect(() => {
    onHover?.(column === undefined || row === undefined ? undefined : { column, row });
  }, [onHover, column, row]);

  const groundAt = (at: ScreenPoint) => view && toGround(view, grid, size, at);
  const hit = (at: ScreenPoint) => view && footholdAt(footholds, view, grid, size, at);

  const pointer = useMapPointer(surface, {
    zoom: (at, factor) => {
      if (view) show(zoomAt(view, grid, size, at, factor));
    },
    pan: (right, down) => {
      if (view) show(panBy(view, grid, size, right, down));
    },
    hover: (at) => {
      setCrosshair(undefined);
      setHovered(at && groundAt(at));
    },
    click: (at) => {
      const found = hit(at);
      const ground = groundAt(at);
      const place = ground && placeAt(grid, ground.x, ground.y);
      if (found) onSelect?.(found.id);
      else if (input.tool === 'place') {
        if (place) onPlace?.(place);
      } else onSelect?.(undefined);
    },
    doubleClick: (at, out) => {
      if (view && input.tool !== 'place' && !hit(at)) show(zoomAt(view, grid, size, at, out ? 0.5 : 2));
    },
    grab: (at) => {
      grabbedId.current = movable(hit(at))?.id;
      return grabbedId.current !== undefined;
    },
    drag: (at) => {
      const ground = groundAt(at);
      const id = grabbedId.current;
      if (ground && id !== undefined) setMoving({ id, ...ground });
    },
    drop: (at) => {
      const ground = at && groundAt(at);
      const place = ground && placeAt(grid, ground.x, ground.y);
      if (moving && place) onMove?.(moving.id, place);
      setMoving(undefined);
    },
  });

  const lookAt = (x: number, y: number) => {
    if (view) show(bringIn(view, grid, size, x, y, keepIn));
  };
  const middle = () => {
    const ground = groundAt({ left: size.width / 2, top: size.height / 2 });
    return (
      (ground && cellAt(grid, ground.x, ground.y)) ?? {
        column: grid.width >> 1,
        row: grid.height >> 1,
      }
    );
  };

  const arrow = (event: KeyboardEvent): boolean => {
    if (!view || !arrowMove(event.key, 1)) return false;
    const own = movable(selected);
    if (own) {
      const cells = arrowMove(event.key, event.shiftKey ? 10 : 1) ?? [0, 0];
      const place = placeAt(grid, own.x + cells[0] * grid.cellSize, own.y - cells[1] * grid.cellSize);
      if (place) {
        setCrosshair(undefined);
        onMove?.(own.id, place);
        lookAt(place.x, place.y);
      }
      return true;
    }
    const by = arrowMove(event.key, crosshairStride(view, event.shiftKey)) ?? [0, 0];
    const next = crosshair ? movedCell(grid, crosshair, by) : (hoveredCell ?? middle());
    setCrosshair(next);
    const centre = cellCentre(grid, next.column, next.row);
    lookAt(centre.x, centre.y);
    return true;
  };

  const next = (step: number) => {
    if (footholds.length === 0) return;
    // What people plan comes before what they found: there may be hundreds of surveyed ones.
    const order = (['planned', 'surveyed'] as const).flatMap((kind) =>
      footholds.filter((f) => f.kind === kind),
    );
    const at = order.findIndex((f) => f.id === selectedId);
    const from = at === -1 && step < 0 ? 0 : at;
    const found = order[(from + step + order.length) % order.length];
    setCrosshair(undefined);
    onSelect?.(found.id);
    lookAt(found.x, found.y);
  };

  const enter = () => {
    if (!view) return;
    const cell = crosshair ?? middle();
    setCrosshair(cell);
    const centre = cellCentre(grid, cell.column, cell.row);
    const found = footholdAt(footholds, view, grid, size, toScreen(view, grid, size, centre.x, centre.y));
    if (found) onSelect?.(found.id);
    else if (input.tool === 'place') onPlace?.({ ...cell, ...centre });
    else onSelect?.(undefined);
  };

  const onKeyDown = (event: KeyboardEvent) => {
    if (!view || event.altKey || event.ctrlKey || event.metaKey) return;
    const at = crosshair && cellCentre(grid, crosshair.column, crosshair.row);
    const around = at
      ? toScreen(view, grid, size, at.x, at.y)
      : { left: size.width / 2, top: size.height / 2 };
    if (!arrow(event)) {
      if (event.key === '+' || event.key === '=') show(zoomAt(view, grid, size, around, 1.6));
      else if (event.key === '-' || event.key === '_') show(zoomAt(view, grid, size, around, 1 / 1.6));
      else if (event.key === '0') show(wholeView(grid, size));
      else if (event.key === 'Enter') enter();
      else if (event.key.toLowerCase() === 'n') next(event.shiftKey ? -1 : 1);
      else if ((event.key === 'Delete' || event.key === 'Backspace') && selected)
        (selected.kind === 'planned' ? input.onRemove : input.onKept)?.(selected.id);
      else if (event.key === 'Escape') {
        setCrosshair(undefined);
        onSelect?.(undefined);
      } else return;
    }
    event.preventDefault();
  };

  return {
    hovered,
    crosshair,
    moving,
    /** the keyboard is what reads the ground */
    keyed: crosshair !== undefined,
    handlers: {
      ...pointer,
      onKeyDown,
      onBlur: () => {
        setCrosshair(undefined);
      },
    },
  };
}
