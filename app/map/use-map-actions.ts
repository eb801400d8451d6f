import { useEffect, useState, type KeyboardEvent, type RefObject } from 'react';
import { cellAt, cellCentre } from '#sim-core/grid/grid.ts';
import { areaAt, type MapArea } from './map-areas.ts';
import { arrowMove, crosshairStride, movedCell, type MapCell } from './map-keys.ts';
import { footholdAt, type MapFoothold } from './map-symbols.ts';
import type { MapPoint, MapSight } from './map-tool.ts';
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
import type { SiteMapProps } from './site-map-props.ts';
import { useMapPointer } from './use-map-pointer.ts';

interface MapActionsInput extends Pick<SiteMapProps, 'grid' | 'tool' | 'onHover'> {
  readonly footholds: readonly MapFoothold[];
  readonly areas: readonly MapArea[];
  readonly surface: RefObject<HTMLDivElement | null>;
  readonly view: MapView | undefined;
  readonly size: MapSize;
  readonly show: (view: MapView) => void;
}

const keepIn = 60;
const toCentimetre = (metres: number) => Math.round(metres * 100) / 100;

/** What pointer and keyboard do on a site's map, and what that leaves to be drawn. */
export function useMapActions(input: MapActionsInput) {
  const { grid, footholds, areas, surface, view, size, show, tool, onHover } = input;
  const [hovered, setHovered] = useState<{ x: number; y: number }>();
  const [crosshair, setCrosshair] = useState<MapCell>();

  const hoveredCell = hovered && cellAt(grid, hovered.x, hovered.y);
  const read = crosshair ?? hoveredCell;
  const { column, row } = read ?? {};
  useEffect(() => {
    onHover?.(column === undefined || row === undefined ? undefined : { column, row });
  }, [onHover, column, row]);

  const groundAt = (at: ScreenPoint) => view && toGround(view, grid, size, at);
  const metresPerPixel = view ? grid.cellSize / view.scale : 1;
  /** What a tool is told of a place on the screen; `exact` where it is known better than the screen shows it. */
  const pointAt = (at: ScreenPoint, shift: boolean, exact?: MapSight): MapPoint | undefined => {
    const ground = exact ?? groundAt(at);
    if (!ground || !view) return undefined;
    const id =
      footholdAt(footholds, view, grid, size, at)?.id ??
      areaAt(areas, ground.x, ground.y, metresPerPixel)?.id;
    const [x, y] = [toCentimetre(ground.x), toCentimetre(ground.y)];
    return { x, y, cell: cellAt(grid, ground.x, ground.y), id, metresPerPixel, shift };
  };
  const cellPoint = (cell: MapCell, shift: boolean): MapPoint | undefined => {
    const centre = cellCentre(grid, cell.column, cell.row);
    return view && pointAt(toScreen(view, grid, size, centre.x, centre.y), shift, centre);
  };

  const pointer = useMapPointer(surface, {
    zoom: (at, factor) => {
      if (view) show(zoomAt(view, grid, size, at, factor));
    },
    pan: (right, down) => {
      if (view) show(panBy(view, grid, size, right, down));
    },
    hover: (at, shift) => {
      setCrosshair(undefined);
      setHovered(at && groundAt(at));
      tool?.point?.(at && pointAt(at, shift));
    },
    click: (at, shift) => {
      const point = pointAt(at, shift);
      if (point) tool?.press?.(point);
    },
    doubleClick: (at, shift) => {
      const point = pointAt(at, shift);
      if (tool?.doublePress) {
        if (point) tool.doublePress(point);
      } else if (view && tool?.cursor !== 'crosshair' && point?.id === undefined)
        show(zoomAt(view, grid, size, at, shift ? 0.5 : 2));
    },
    grab: (at, shift) => {
      const point = pointAt(at, shift);
      return point !== undefined && tool?.grab?.(point) === true;
    },
    drag: (at, shift) => {
      const point = pointAt(at, shift);
      if (point) tool?.drag?.(point);
    },
    drop: (at, shift) => tool?.drop?.(at && pointAt(at, shift)),
  });

  const lookAt = (x: number, y: number) => {
    if (view) show(bringIn(view, grid, size, x, y, keepIn));
  };
  const middle = (): MapCell => {
    const ground = groundAt({ left: size.width / 2, top: size.height / 2 });
    return (ground && cellAt(grid, ground.x, ground.y)) ?? { column: grid.width >> 1, row: grid.height >> 1 };
  };

  const arrow = (event: KeyboardEvent): boolean => {
    if (!view || !arrowMove(event.key, 1)) return false;
    const by = arrowMove(event.key, crosshairStride(view, event.shiftKey)) ?? [0, 0];
    const next = crosshair ? movedCell(grid, crosshair, by) : (hoveredCell ?? middle());
    setCrosshair(next);
    const centre = cellCentre(grid, next.column, next.row);
    lookAt(centre.x, centre.y);
    tool?.point?.(cellPoint(next, event.shiftKey));
    return true;
  };

  const press = (event: KeyboardEvent) => {
    const cell = crosshair ?? middle();
    setCrosshair(cell);
    const point = cellPoint(cell, event.shiftKey);
    if (point) tool?.press?.(point);
  };

  const onKeyDown = (event: KeyboardEvent) => {
    if (!view) return;
    const taken = tool?.key?.(event, crosshair && cellPoint(crosshair, event.shiftKey));
    if (taken) {
      if (typeof taken === 'object') {
        setCrosshair(undefined);
        lookAt(taken.x, taken.y);
      }
      event.preventDefault();
      return;
    }
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    const at = crosshair && cellCentre(grid, crosshair.column, crosshair.row);
    const around = at
      ? toScreen(view, grid, size, at.x, at.y)
      : { left: size.width / 2, top: size.height / 2 };
    if (!arrow(event)) {
      if (event.key === '+' || event.key === '=') show(zoomAt(view, grid, size, around, 1.6));
      else if (event.key === '-' || event.key === '_') show(zoomAt(view, grid, size, around, 1 / 1.6));
      else if (event.key === '0') show(wholeView(grid, size));
      else if (event.key === 'Enter' || event.key === ' ') press(event);
      else if (event.key === 'Escape') {
        setCrosshair(undefined);
        tool?.point?.(undefined);
      } else return;
    }
    event.preventDefault();
  };

  return {
    hovered,
    crosshair,
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
