import { existsSync, rmSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { performance } from 'node:perf_hooks';
import { projectRoot } from '#server/project.ts';
import { simulate } from './simulate/command.ts';

/** `npm run simulate -- SPEC.json --out DIR`: the engine on files, without the product. */
const env = join(projectRoot, '.env');
if (existsSync(env)) process.loadEnvFile(env);

let partial: string | undefined;
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const)
  process.once(signal, () => {
    if (partial) rmSync(partial, { recursive: true, force: true });
    process.exit(1);
  });

process.exitCode = await simulate(process.argv.slice(2), {
  // npm runs scripts in the project and keeps in INIT_CWD where the user stands.
  folder: process.env.INIT_CWD ?? process.cwd(),
  dataDir: resolve(projectRoot, process.env.DATA_DIR || 'data'),
  print: (text) => process.stdout.write(text),
  progress: {
    write: (text) => process.stderr.write(text),
    isTerminal: process.stderr.isTTY,
    now: () => performance.now(),
  },
  onPartial: (folder) => {
    partial = folder?.partial;
  },
});
