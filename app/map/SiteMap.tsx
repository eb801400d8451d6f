import { lazy, Suspense, useEffect, useId, useMemo, useRef, useState } from 'react';
import { classNames } from '#app/lib/class-names.ts';
import { cellAt, cellCentre, cellIndex, type Grid } from '#sim-core/grid/grid.ts';
import { MapControls, MapReading, MapUnavailable } from './MapFurniture.tsx';
import { MapEdge } from './MapEdge.tsx';
import { MapFrameContext } from './map-context.ts';
import { Crosshair, SelectionRing } from './MapMarks.tsx';
import { MapLegend } from './MapLegend.tsx';
import { MapOverlay } from './MapOverlay.tsx';
import type { MapArea } from './map-areas.ts';
import { describeCell } from './map-raster.ts';
import type { MapFoothold } from './map-symbols.ts';
import { clampView, toScreen, wholeView, zoomAt, type MapSize, type MapView } from './map-view.ts';
import type { MapContour } from './paint-overlay.ts';
import type { SiteMapProps } from './site-map-props.ts';
import { useBoxSize } from './use-box-size.ts';
import { useClearRoom } from './use-clear-room.ts';
import { useGraphics } from './use-graphics.ts';
import { useMapActions } from './use-map-actions.ts';

/** Pixi comes when a map is painted: other pages, and browsers that cannot paint, do without it. */
const MapScene = lazy(() => import('./MapScene.tsx').then((m) => ({ default: m.MapScene })));

const noFootholds: readonly MapFoothold[] = [];
const noAreas: readonly MapArea[] = [];
const noContours: readonly MapContour[] = [];
const noneSelected: ReadonlySet<string> = new Set();
const compactBelow = 560;
/** What has been painted by the scene of a generation. */
interface Painting {
  readonly generation: number;
  readonly withRaster: boolean;
}
const noRoom: MapSize = { width: 0, height: 0 };

/** The map of a site: a raster under palette, footholds, and words; by pointer, finger and keyboard alike. */
export function SiteMap(props: SiteMapProps) {
  const { grid, raster, ground, footholds = noFootholds, furniture = true, tool } = props;
  const { areas = noAreas, contours = noContours, selected = noneSelected } = props;
  const box = useRef<HTMLDivElement>(null);
  const surface = useRef<HTMLDivElement>(null);
  const [legend, setLegend] = useState<HTMLDivElement | null>(null);
  const room = useBoxSize(box);
  const graphics = useGraphics();
  const [own, setOwn] = useState<MapView>();
  const [painting, setPainting] = useState<Painting>();
  const help = useId();

  const compact = (room?.size.width ?? 0) < compactBelow;
  const ownClear = useClearRoom(legend, furniture, compact);
  const clear = props.clear ?? ownClear;
  const { onClear } = props;
  useEffect(() => onClear?.(ownClear), [onClear, ownClear]);
  const size = useMemo((): MapSize => (room ? { ...room.size, clear } : noRoom), [room, clear]);
  const view = useMemo(
    () => room && clampView(props.view ?? own ?? wholeView(grid, size), grid, size),
    [props.view, own, grid, room, size],
  );
  const show = (next: MapView) => {
    setOwn(next);
    props.onView?.(next);
  };
  const act = useMapActions({ ...props, footholds, areas, surface, view, size, show });
  const { hovered, crosshair, keyed } = act;

  const read = crosshair ?? (hovered && cellAt(grid, hovered.x, hovered.y));
  const centre = read && cellCentre(grid, read.column, read.row);
  const reading = read && describeCell(raster, ground, cellIndex(grid, read.column, read.row));
  const chosen = useMemo(
    () => (selected.size > 0 ? footholds.filter((f) => f.kind !== 'clump' && selected.has(f.id)) : []),
    [footholds, selected],
  );
  const ringed = chosen.length > 1 ? chosen : noFootholds;
  const frame = useMemo(
    () =>
      view && {
        size,
        scale: view.scale,
        pixelsPerMetre: view.scale / grid.cellSize,
        project: (x: number, y: number) => toScreen(view, grid, size, x, y),
      },
    [view, grid, size],
  );
  const summary = props.summary ?? props.label;
  const { generation } = graphics;
  const painted = painting?.generation === generation && (painting.withRaster || raster === undefined);
  const onPainted = (withRaster: boolean) => {
    if (painting?.generation !== generation || painting.withRaster !== withRaster)
      setPainting({ generation, withRaster });
  };

  return (
    <div
      ref={box}
      data-painted={painted}
      className={classNames('relative overflow-hidden bg-ground', props.className)}
    >
      {view && <SiteSheet {...{ grid, view, size }} />}
      {room && view && graphics.ready && (
        <Suspense>
          <MapScene
            key={generation}
            {...{ grid, raster, ground, footholds, view }}
            {...room}
            onLost={graphics.lose}
            onPainted={onPainted}
          />
        </Suspense>
      )}
      {room && view && graphics.ready && (areas.length > 0 || contours.length > 0 || ringed.length > 0) && (
        <MapOverlay {...{ grid, view, areas, contours, ringed, selected }} {...room} />
      )}
      <div
        ref={surface}
        role="application"
        aria-roledescription="map"
        aria-label={props.label}
        aria-describedby={help}
        tabIndex={0}
        className={classNames(
          'absolute inset-0 touch-none outline-offset-[-3px]',
          tool?.cursor === 'crosshair' ? 'cursor-crosshair' : 'cursor-grab active:cursor-grabbing',
        )}
        {...act.handlers}
      />
      <p id={help} className="sr-only">
        {summary} Arrow keys move a crosshair that reads the ground, with Shift by one cell; plus and minus
        zoom; 0 shows the whole site. {tool?.help} Escape lets go.
      </p>
      {frame && view && (
        <MapFrameContext value={frame}>
          <svg className="pointer-events-none absolute inset-0 size-full" aria-hidden="true">
            {furniture && <MapEdge {...{ grid, view, size, compact }} />}
            {centre && crosshair && <Crosshair {...centre} />}
            {chosen.length === 1 && <SelectionRing foothold={chosen[0]} />}
          </svg>
          <div className="pointer-events-none absolute inset-0 overflow-hidden">{props.children}</div>
          {furniture && (
            <>
              <div className="pointer-events-none absolute bottom-0 left-0 max-w-full border-t border-r border-ink bg-ground">
                <MapLegend
                  standing={setLegend}
                  raster={raster}
                  water={ground !== undefined}
                  metresPerPixel={grid.cellSize / view.scale}
                  compact={compact}
                  title={props.legendTitle}
                >
                  {props.legend}
                </MapLegend>
              </div>
              <MapControls
                onZoom={(factor) => {
                  show(zoomAt(view, grid, size, { left: size.width / 2, top: size.height / 2 }, factor));
                }}
                onWhole={() => {
                  show(wholeView(grid, size));
                }}
              />
            </>
          )}
          {centre && <MapReading {...centre} reading={reading ?? ''} spoken={keyed} compact={compact} />}
        </MapFrameContext>
      )}
      {!painted && graphics.ready && (
        <p className="pointer-events-none absolute inset-0 grid place-content-center text-note text-ink-2">
          Drawing the map
        </p>
      )}
      {graphics.problem && (
        <MapUnavailable problem={graphics.problem} summary={summary} onAgain={graphics.again} />
      )}
    </div>
  );
}

/** The site's extent below what is painted: where it ends is seen even where nothing is painted. */
function SiteSheet({ grid, view, size }: { grid: Grid; view: MapView; size: MapSize }) {
  const { left, top } = toScreen(view, grid, size, grid.originX, grid.originY);
  return (
    <div
      aria-hidden="true"
      data-site-sheet
      className="absolute bg-standing outline outline-ink/70"
      style={{ left, top, width: grid.width * view.scale, height: grid.height * view.scale }}
    />
  );
}
