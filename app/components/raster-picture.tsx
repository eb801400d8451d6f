import { useEffect, useRef } from 'react';
import { classNames } from '#app/lib/class-names.ts';
import { useTheme } from '#app/lib/use-theme.ts';
import { paletteOf, readMapColours, schemeOf } from '#app/map/map-colours.ts';
import type { MapRaster } from '#app/map/map-raster.ts';
import { toPixels } from './raster-pixels.ts';

/** A still picture of a raster in the map's colours, one canvas pixel a cell; its size on the page is up to CSS. */
export function RasterPicture(props: {
  raster: MapRaster;
  /** in cells */
  width: number;
  height: number;
  /** what it shows; left out where the words beside it say so */
  label?: string;
  className?: string;
}) {
  const { raster, width, height } = props;
  const { theme } = useTheme();
  const canvas = useRef<HTMLCanvasElement>(null);
  useEffect(() => {
    const context = canvas.current?.getContext('2d');
    if (!canvas.current || !context) return;
    const image = context.createImageData(width, height);
    image.data.set(toPixels(raster, paletteOf(schemeOf(raster), readMapColours(canvas.current))));
    context.putImageData(image, 0, 0);
    // `theme` is not read here, but the palette is another one when it changes.
  }, [raster, width, height, theme]);
  return (
    <canvas
      ref={canvas}
      width={width}
      height={height}
      {...(props.label === undefined ? { 'aria-hidden': true } : { role: 'img', 'aria-label': props.label })}
      className={classNames('block', props.className)}
    />
  );
}
