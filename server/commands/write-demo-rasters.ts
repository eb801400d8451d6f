import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { demoRasters } from '#rasters/demo/sallow-reach.ts';

/** `npm run demo:rasters -- DIR`: writes the invented site's GeoTIFFs into DIR. */
const folder = process.argv[2];
if (!folder) {
  console.error('Say where to: npm run demo:rasters -- DIR');
  process.exitCode = 2;
} else {
  await mkdir(folder, { recursive: true });
  for (const { fileName, bytes } of demoRasters()) {
    await writeFile(join(folder, fileName), bytes);
    console.log(`${join(folder, fileName)}: ${bytes.length} bytes, invented demo data`);
  }
}
