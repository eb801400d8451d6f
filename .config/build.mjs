// Builds the client into .build/app and the server into .build/server.
import { rmSync } from 'node:fs';
import { join } from 'node:path';
import { build as buildServer } from 'esbuild';
import { build as buildClient } from 'vite';
import { ensureKernel, root } from './lib/shell.mjs';

ensureKernel();

const outdir = join(root, '.build/server');
rmSync(outdir, { recursive: true, force: true });
await buildServer({
  absWorkingDir: root,
  // Workers are entries of their own: they are loaded by file name.
  entryPoints: {
    main: 'server/main.ts',
    'raster-worker': 'server/jobs/raster-worker.ts',
    'run-worker': 'server/jobs/run-worker.ts',
  },
  outdir,
  bundle: true,
  splitting: true,
  platform: 'node',
  target: 'node20',
  format: 'esm',
  packages: 'external',
  sourcemap: true,
  logLevel: 'warning',
});
await buildClient({ configFile: join(root, 'vite.config.ts'), logLevel: 'warn' });
