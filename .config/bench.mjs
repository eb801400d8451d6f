// npm run bench [-- --json] [NAME …]: what takes how long or how much, beside a yardstick in the same run; `ratio` above 1
// means that we are better. With --json a JSON object a line. A NAME (kernel, arrival, fit, product, comparison, page) runs that part alone.
import {
  chromiumPath,
  ensureBuilt,
  ensureInstalled,
  ensureKernel,
  ensureTestTools,
  giveUp,
  run,
} from './lib/shell.mjs';

const parts = {
  kernel: 'sim-core/bench/main.ts',
  arrival: 'sim-core/bench/arrival.ts',
  fit: 'sim-core/bench/fit.ts',
  product: 'server/bench/main.ts',
  comparison: 'app/bench/comparison.ts',
  page: 'app/bench/page.ts',
};

const options = process.argv.slice(2).filter((word) => word.startsWith('--'));
const asked = process.argv.slice(2).filter((word) => !word.startsWith('--'));
const unknown = asked.find((name) => !(name in parts));
if (unknown) giveUp(`Found "${unknown}"; the parts of the bench are ${Object.keys(parts).join(', ')}.`);
ensureInstalled();
ensureKernel();
if (asked.length === 0 || asked.includes('page')) ensureBuilt();
for (const name of asked.length > 0 ? asked : Object.keys(parts)) {
  if (name === 'comparison') ensureTestTools();
  const code = run(process.execPath, ['--import', 'tsx', parts[name], ...options], {
    stdio: 'inherit',
    env: { ...process.env, CHROMIUM_PATH: chromiumPath() },
  });
  if (code !== 0) process.exit(code);
}
