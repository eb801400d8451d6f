import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import type { Grid } from '#sim-core/grid/grid.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import { smallGrid } from '#server/testing/sites.ts';

const side = 4000;
/** Decoded, a raster of this test is 64 MB; packed for the browser and for runs it is about as much again. */
const decodedMegabytes = (side * side * 4) / 1e6;

it(
  '4,000 × 4,000 float32 cells are read and aligned behind the requests in bounded memory',
  { timeout: 300_000 },
  () => {
    const folder = mkdtempSync(join(tmpdir(), 'foothold-large-'));
    try {
      const values = new Float32Array(side * side);
      // Rounded noise on a slope packs about as well as a survey does.
      for (let i = 0, x = 1; i < values.length; i++) {
        x = (Math.imul(x, 1_664_525) + 1_013_904_223) >>> 0;
        values[i] = Math.round(((i / values.length) * 0.8 + (x / 2 ** 32) * 0.2) * 1000) / 1000;
      }
      const file = join(folder, 'large.tif');
      writeFileSync(file, encodeGeoTiff({ grid: { ...smallGrid, width: side, height: side }, values }));
      // Cells of 2.5 m over those of 2 m: each is calculated from several.
      const said = execFileSync(
        process.execPath,
        ['--import', 'tsx', join(import.meta.dirname, '../../testing/measure-upload.ts'), file, '2.5'],
        { encoding: 'utf8' },
      );
      const { grid, method, progressSeen, before, after } = JSON.parse(said) as {
        grid: Grid;
        method: string;
        progressSeen: number;
        before: number;
        after: number;
      };
      expect({ grid, method }).toMatchObject({
        grid: { width: 3200, height: 3200 },
        method: 'area-weighted',
      });
      expect(progressSeen).toBeGreaterThan(0);
      expect(after - before).toBeLessThan(7 * decodedMegabytes);
    } finally {
      rmSync(folder, { recursive: true, force: true });
    }
  },
);
