import { useEffect, useMemo, useRef } from 'react';
import type { Work } from '#contract/works.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { ringsOf } from '#sim-core/process/area-cells.ts';
import { toPixels } from '#app/components/raster-pixels.ts';
import { classNames } from '#app/lib/class-names.ts';
import { useTheme } from '#app/lib/use-theme.ts';
import { paletteOf, readMapColours, schemeOf, type MapColours } from '#app/map/map-colours.ts';
import { sampleGround, type SampledGround } from './sample-ground.ts';

/** What all small pictures of a site share: its ground, sampled once. */
export interface PictureBase {
  readonly grid: Grid;
  readonly ground: SampledGround | undefined;
}

/** The ground of a site for small pictures. */
export function usePictureBase(
  grid: Grid,
  cover: Uint8Array | undefined,
  capacity: Uint8Array | undefined,
): PictureBase {
  return useMemo(
    () => ({ grid, ground: cover && sampleGround(grid, cover, capacity, pictureWidth) }),
    [grid, cover, capacity],
  );
}

/** Canvas pixels across: twice the width on the page, for sharp screens. */
const pictureWidth = 320;

/** The works of an option on the site's map, small: what stands today, and a mark for each of the works. */
export function OptionPicture(props: { base: PictureBase; works: readonly Work[]; className?: string }) {
  const { base, works } = props;
  const { theme } = useTheme();
  const canvas = useRef<HTMLCanvasElement>(null);
  const width = pictureWidth;
  const height = Math.max(1, Math.round((width * base.grid.height) / base.grid.width));
  useEffect(() => {
    const context = canvas.current?.getContext('2d');
    if (!canvas.current || !context) return;
    const colours = readMapColours(canvas.current);
    context.clearRect(0, 0, width, height);
    if (base.ground) paintGround(context, base.ground, colours);
    paintWorks(context, works, base.grid, width / (base.grid.width * base.grid.cellSize), colours);
    // `theme` is not read here, but the colours are others when it changes.
  }, [base, works, width, height, theme]);
  return (
    <canvas
      ref={canvas}
      width={width}
      height={height}
      aria-hidden="true"
      className={classNames('block w-full border border-rule bg-sheet', props.className)}
    />
  );
}

function paintGround(context: CanvasRenderingContext2D, ground: SampledGround, colours: MapColours): void {
  const raster = { kind: 'cover', values: ground.cover } as const;
  const pixels = toPixels(raster, paletteOf(schemeOf(raster), colours));
  const [red, green, blue] = colours.water;
  ground.capacity?.forEach((capacity, i) => {
    if (capacity === 0) pixels.set([red, green, blue, 255], 4 * i);
  });
  const image = context.createImageData(ground.width, ground.height);
  image.data.set(pixels);
  context.putImageData(image, 0, 0);
}

/** @param scale canvas pixels a metre */
function paintWorks(
  context: CanvasRenderingContext2D,
  works: readonly Work[],
  { originX, originY }: Grid,
  scale: number,
  { flag, ink, halo }: MapColours,
): void {
  const at = (x: number, y: number) => [(x - originX) * scale, (originY - y) * scale] as const;
  const dot = (x: number, y: number, size: number) => {
    const [left, top] = at(x, y);
    context.beginPath();
    context.arc(left, top, size, 0, 2 * Math.PI);
    context.fill();
    context.stroke();
  };
  for (const work of works) {
    context.setLineDash([]);
    [context.fillStyle, context.strokeStyle, context.lineWidth] = [flag, ink, 1];
    if (work.kind === 'mound') dot(work.x, work.y, 4.5);
    else if (work.kind === 'clumps') for (const [x, y] of work.points) dot(x, y, 2);
    else {
      const planting = work.kind === 'planting';
      context.beginPath();
      if (work.area.shape === 'disc') {
        const [left, top] = at(work.area.x, work.area.y);
        context.arc(left, top, Math.max(3, work.area.radius * scale), 0, 2 * Math.PI);
      } else
        for (const ring of ringsOf(work.area)) {
          ring.forEach(([x, y], i) => (i === 0 ? context.moveTo(...at(x, y)) : context.lineTo(...at(x, y))));
          context.closePath();
        }
      if (planting) {
        context.fill('evenodd');
        context.stroke();
        continue;
      }
      [context.strokeStyle, context.lineWidth] = [halo, 5];
      context.stroke();
      context.setLineDash(work.kind === 'fence' ? [7, 4] : [2, 4]);
      [context.strokeStyle, context.lineWidth] = [ink, 2.5];
      context.stroke();
    }
  }
}
