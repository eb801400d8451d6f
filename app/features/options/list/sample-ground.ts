/** A raster of the site, as many cells of it as a small picture has pixels. */
export interface SampledGround {
  readonly width: number;
  readonly height: number;
  readonly cover: Uint8Array;
  readonly capacity: Uint8Array | undefined;
}

/**
 * The cell in the middle of each pixel of a picture of the whole grid.
 *
 * @param cover,capacity 8 bits, row-major
 * @param width pixels across
 */
export function sampleGround(
  grid: { readonly width: number; readonly height: number },
  cover: Uint8Array,
  capacity: Uint8Array | undefined,
  width: number,
): SampledGround {
  const height = Math.max(1, Math.round((width * grid.height) / grid.width));
  const sample = (values: Uint8Array) => {
    const sampled = new Uint8Array(width * height);
    for (let y = 0; y < height; y++) {
      const row = Math.floor(((y + 0.5) * grid.height) / height) * grid.width;
      for (let x = 0; x < width; x++)
        sampled[y * width + x] = values[row + Math.floor(((x + 0.5) * grid.width) / width)];
    }
    return sampled;
  };
  return { width, height, cover: sample(cover), capacity: capacity && sample(capacity) };
}
