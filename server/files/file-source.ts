import { open } from 'node:fs/promises';
import type { RasterSource } from '#rasters/read/raster-source.ts';

/** Lends a file's bytes piece by piece to `use`, so that a large raster is never in memory whole; closes it after. */
export async function withFileSource<T>(path: string, use: (source: RasterSource) => Promise<T>): Promise<T> {
  const handle = await open(path, 'r');
  try {
    const { size } = await handle.stat();
    return await use({
      size,
      async read(offset, length) {
        const bytes = new Uint8Array(length);
        let filled = 0;
        while (filled < length) {
          const { bytesRead } = await handle.read(bytes, filled, length - filled, offset + filled);
          if (bytesRead === 0) break;
          filled += bytesRead;
        }
        return bytes.subarray(0, filled);
      },
    });
  } finally {
    await handle.close();
  }
}
