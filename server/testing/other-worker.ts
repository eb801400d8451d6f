import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { createRasterPool } from '#server/jobs/raster-pool.ts';
import type { TestServer } from './test-server.ts';

/** Workers that end badly. */
export const badWorkers = {
  dies: 'export default () => process.exit(3);',
  hangs: 'export default () => new Promise(() => setInterval(() => {}, 1000));',
} as const;

/** Lets another worker than ours do the work in the background while `during` runs. */
export async function withOtherWorker(
  { services }: TestServer,
  worker: keyof typeof badWorkers,
  during: () => Promise<void>,
): Promise<void> {
  const filename = join(services.config.dataDir, `${worker}.mjs`);
  await writeFile(filename, badWorkers[worker]);
  const { backgroundRasters } = services;
  const other = createRasterPool({ worker: { filename, execArgv: [] } });
  services.backgroundRasters = other;
  try {
    await during();
  } finally {
    services.backgroundRasters = backgroundRasters;
    await other.close();
  }
}
