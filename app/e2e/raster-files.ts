import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { demoRasters, type DemoRaster } from '#rasters/demo/sallow-reach.ts';

/** Writes the demo's rasters into a new folder and returns their paths by part. */
export function writeRasters(): Record<DemoRaster['name'], string> {
  const folder = mkdtempSync(join(tmpdir(), 'foothold-rasters-'));
  const paths = demoRasters().map(({ name, bytes }) => {
    const path = join(folder, `${name}.tif`);
    writeFileSync(path, bytes);
    return [name, path] as const;
  });
  return Object.fromEntries(paths) as Record<DemoRaster['name'], string>;
}
