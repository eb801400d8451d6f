import { toTexels, type MapRaster } from '#app/map/map-raster.ts';

/**
 * RGBA of every cell, row-major, 4 × cells. A still picture is too small for hatching, so what the map hatches is
 * painted full; what it leaves bare stays clear.
 *
 * @param palette 256 × RGBA, as `paletteOf` gives it
 */
export function toPixels(raster: MapRaster, palette: Uint8Array): Uint8ClampedArray {
  const full = palette.slice();
  for (let alpha = 3; alpha < full.length; alpha += 4) if (full[alpha] > 0) full[alpha] = 255;
  // Whole pixels at once: both views share the machine's byte order, so none needs to be turned.
  const colours = new Uint32Array(full.buffer);
  const texels = toTexels(raster);
  const pixels = new Uint32Array(texels.length);
  for (let i = 0; i < texels.length; i++) pixels[i] = colours[texels[i]];
  return new Uint8ClampedArray(pixels.buffer);
}
