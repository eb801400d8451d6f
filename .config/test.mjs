// npm test: type-check, lint, unit and API tests, browser journeys. All parts run even when one fails.
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

/** A command that passes or fails as one. */
const check = (name, command, args) => {
  say(`\n── ${name}`);
  const passed = run(bin(command), args) === 0;
  return { name, passed: passed ? 1 : 0, failed: passed ? 0 : 1, skipped: 0 };
};

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

const results = [
  check('types', 'tsc', ['-b']),
  check('lint', 'eslint', ['-c', '.config/eslint.config.js', '--max-warnings', '0', '.']),
  check('format', 'prettier', ['--config', '.config/prettier.json', '--check', '--log-level', 'warn', '.']),
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
];
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
