import 'pixi.js/unsafe-eval';
import { Application, extend, useApplication } from '@pixi/react';
import { Container, type Application as PixiApplication } from 'pixi.js';
import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import type { Grid } from '#sim-core/grid/grid.ts';
import { paletteOf, schemeOf, type MapColours } from './map-colours.ts';
import type { MapRaster } from './map-raster.ts';
import { clumpSize, clumpSpacing, symbolSize, type MapFoothold } from './map-symbols.ts';
import { toScreen, type MapSize, type MapView } from './map-view.ts';
import { useMapColours } from './use-map-colours.ts';
import { RasterTiles } from './raster-tiles.ts';
import { SymbolLayer } from './symbol-layer.ts';

extend({ Container });

export interface MapSceneProps {
  readonly grid: Grid;
  readonly raster?: MapRaster;
  readonly ground?: Uint8Array;
  readonly footholds: readonly MapFoothold[];
  readonly view: MapView;
  readonly size: MapSize;
  readonly pixelRatio: number;
  /** The graphics context is gone; nothing is drawn until the scene is made anew. */
  readonly onLost: () => void;
  /** The map was painted, with the raster or still without one. */
  readonly onPainted: (withRaster: boolean) => void;
}

/** The painted part of the map: a Pixi scene that draws when something changed, and rests otherwise. */
export function MapScene(props: MapSceneProps) {
  const { pixelRatio, size, onLost } = props;
  const colours = useMapColours();
  // Pixi is made asynchronously, and its children may be asked for before it is there.
  const [ready, setReady] = useState(false);
  const lost = useRef(onLost);
  useEffect(() => {
    lost.current = onLost;
  });
  const begin = useCallback((app: PixiApplication) => {
    const { gl } = app.renderer as unknown as { gl: WebGL2RenderingContext };
    // Rows of bytes stand side by side, whatever their number.
    gl.pixelStorei(gl.UNPACK_ALIGNMENT, 1);
    app.canvas.addEventListener('webglcontextlost', () => {
      lost.current();
    });
    setReady(true);
  }, []);
  return (
    <Application
      className="absolute inset-0 block"
      preference="webgl"
      autoStart={false}
      sharedTicker={false}
      backgroundAlpha={0}
      antialias={false}
      autoDensity
      resolution={pixelRatio}
      width={size.width}
      height={size.height}
      onInit={begin}
    >
      {ready && <Scene {...props} colours={colours} />}
    </Application>
  );
}

interface Layers {
  readonly tiles: RasterTiles;
  readonly symbols: SymbolLayer;
}

function Scene(props: MapSceneProps & { readonly colours: MapColours }) {
  const { grid, raster, ground, footholds, view, size, pixelRatio, colours, onPainted } = props;
  const { app } = useApplication();
  const [layers, setLayers] = useState<Layers>();
  const { width, height } = grid;

  const attach = useCallback(
    (root: Container) => {
      const { gl } = app.renderer as unknown as { gl: WebGL2RenderingContext };
      const limit = gl.getParameter(gl.MAX_TEXTURE_SIZE) as number;
      const made = { tiles: new RasterTiles(width, height, limit), symbols: new SymbolLayer() };
      root.addChild(made.tiles.container, made.symbols.container);
      setLayers(made);
      return () => {
        setLayers(undefined);
        made.symbols.destroy();
        made.tiles.destroy();
      };
    },
    [app, width, height],
  );

  useEffect(() => {
    if (raster) layers?.tiles.setRaster(raster);
  }, [layers, raster]);
  useEffect(() => {
    layers?.tiles.setGround(ground);
  }, [layers, ground]);
  const { kind, surveyYear, lastYear, classes } = schemeOf(raster);
  const palette = useMemo(
    () => paletteOf({ kind, surveyYear, lastYear, classes }, colours),
    [kind, surveyYear, lastYear, classes, colours],
  );
  useEffect(() => {
    layers?.tiles.setPalette(palette, colours);
  }, [layers, palette, colours]);
  useEffect(() => {
    layers?.symbols.setSheet(colours, pixelRatio);
  }, [layers, colours, pixelRatio]);
  useEffect(() => {
    layers?.symbols.setFootholds(footholds, grid);
  }, [layers, footholds, grid]);
  const spacing = useMemo(() => clumpSpacing(footholds), [footholds]);
  useEffect(() => {
    layers?.tiles.setScale(view.scale);
    layers?.symbols.setSize(
      symbolSize(view, grid, footholds.length) / view.scale,
      clumpSize(spacing, view.scale / grid.cellSize) / view.scale,
    );
  }, [layers, view, grid, footholds.length, spacing]);
  useEffect(() => {
    app.renderer.resize(size.width, size.height, pixelRatio);
  }, [app, size, pixelRatio]);
  useEffect(() => {
    // After every commit: whatever changed is painted once, in the next frame.
    const frame = requestAnimationFrame(() => {
      app.render();
      if (layers) onPainted(raster !== undefined);
    });
    return () => {
      cancelAnimationFrame(frame);
    };
  });

  const corner = toScreen(view, grid, size, grid.originX, grid.originY);
  return <pixiContainer ref={attach} x={corner.left} y={corner.top} scale={view.scale} />;
}
