// npm test: type-check, lint, unit and API tests, browser journeys. All parts run even when one fails.
import { spawn } from 'node:child_process';
import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ensureBuilt, ensureInstalled, ensureKernel, ensureTestTools, root, run, say } from './lib/shell.mjs';

ensureInstalled();
ensureKernel();
ensureTestTools();

const reports = join(root, '.build/reports');
rmSync(reports, { recursive: true, force: true });
mkdirSync(reports, { recursive: true });
const bin = (name) => join(root, 'node_modules/.bin', name);

/** A command that passes or fails as one; what it says is kept until its turn, as others run beside it. */
const check = (name, command, args) =>
  new Promise((done) => {
    const child = spawn(bin(command), args, { cwd: root, stdio: ['ignore', 'pipe', 'pipe'] });
    let said = '';
    for (const stream of [child.stdout, child.stderr])
      stream.on('data', (piece) => {
        said += piece;
      });
    const end = (passed) => done({ name, said, passed: passed ? 1 : 0, failed: passed ? 0 : 1, skipped: 0 });
    child.on('error', (error) => {
      said += `${command}: ${error.message}`;
      end(false);
    });
    child.on('close', (code) => end(code === 0));
  });

/** Checks that know nothing of each other, side by side; each is reported as a whole. */
async function checks(...started) {
  const results = [];
  for (const each of started) {
    const { said, ...result } = await each;
    say(`\n── ${result.name}`);
    if (said.trim()) say(said.trimEnd());
    results.push(result);
  }
  return results;
}

/** A test runner that leaves a JSON report; a run without a report, or without a test, counts as one failure. */
const suite = (name, command, args, env, count) => {
  say(`\n── ${name}`);
  const code = run(bin(command), args, { env: { ...process.env, ...env } });
  let counts = { passed: 0, failed: 0, skipped: 0 };
  try {
    counts = count(JSON.parse(readFileSync(join(reports, `${name}.json`), 'utf8')));
  } catch (error) {
    say(`${name} left no report: ${error.message}`);
  }
  if ((code !== 0 || counts.passed === 0) && counts.failed === 0) counts.failed = 1;
  return { name, ...counts };
};

const results = await checks(
  check('types', 'tsc', ['-b']),
  check('lint', 'eslint', ['-c', '.config/eslint.config.js', '--max-warnings', '0', '.']),
  check('format', 'prettier', ['--config', '.config/prettier.json', '--check', '--log-level', 'warn', '.']),
);
results.push(
  suite(
    'unit',
    'vitest',
    ['run', '--reporter=default', '--reporter=json', `--outputFile.json=${join(reports, 'unit.json')}`],
    {},
    (report) => ({
      passed: report.numPassedTests,
      failed: report.numFailedTests,
      skipped: report.numPendingTests,
    }),
  ),
);
ensureBuilt();
results.push(
  suite(
    'browser',
    'playwright',
    ['test', '-c', '.config/playwright.config.ts'],
    { PLAYWRIGHT_JSON_OUTPUT_FILE: join(reports, 'browser.json') },
    ({ stats }) => ({
      passed: stats.expected + stats.flaky,
      failed: stats.unexpected,
      skipped: stats.skipped,
    }),
  ),
);

say('');
for (const { name, passed, failed, skipped } of results)
  say(`${name.padEnd(8)} ${passed} passed, ${failed} failed${skipped ? `, ${skipped} skipped` : ''}`);
const total = (key) => results.reduce((sum, result) => sum + result[key], 0);
const skipped = total('skipped');
const summary = `${total('passed')} passed, ${total('failed')} failed${skipped ? `, ${skipped} skipped` : ''}`;
writeFileSync(join(root, '.build/test-summary'), `${summary}\n`);
process.stdout.write(`${summary}\n`);
process.exit(total('failed') === 0 ? 0 : 1);
