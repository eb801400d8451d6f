import { spawn, spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, lstatSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = resolve(dirname(fileURLToPath(import.meta.url)), '../..');

/** Says what is happening on stderr, so that stdout stays free for results. */
export const say = (text) => process.stderr.write(`${text}\n`);

/** Ends with a message that says what to do, without a stack trace. */
export function giveUp(text) {
  say(text);
  process.exit(1);
}

/** Runs a command with its output shown on stderr; returns its exit code. */
export function run(command, args, options = {}) {
  const { status, error } = spawnSync(command, args, { cwd: root, stdio: ['inherit', 2, 2], ...options });
  if (error) say(`${command}: ${error.message}`);
  return status ?? 1;
}

/** Replaces this process as far as that goes: same streams, signals passed on, same exit code. */
export function become(command, args, options = {}) {
  const child = spawn(command, args, { cwd: root, stdio: 'inherit', ...options });
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => child.kill(signal));
  child.on('error', (error) => giveUp(`${command}: ${error.message}`));
  child.on('exit', (code, signal) => process.exit(code ?? (signal ? 1 : 0)));
}

const hashFiles = (paths) => {
  const hash = createHash('sha256');
  for (const path of paths)
    hash
      .update(path)
      .update('\0')
      .update(readFileSync(join(root, path)))
      .update('\0');
  return hash.digest('hex');
};

const filesBelow = (folder) =>
  readdirSync(join(root, folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && !/\.test\.tsx?$/.test(entry.name))
    .map((entry) => join(entry.parentPath, entry.name).slice(root.length + 1))
    .sort();

/** Does `work` unless `stamp` says that it was done on the very same files. */
function unlessDone(stamp, files, work) {
  const now = hashFiles(files);
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === now) return;
  work();
  mkdirSync(dirname(stamp), { recursive: true });
  writeFileSync(stamp, now);
}

/** Installs the packages of the lock file where they are missing or of another lock file. */
export function ensureInstalled() {
  const [major] = process.versions.node.split('.').map(Number);
  if (major !== 20)
    giveUp(`Foothold runs on Node 20; this is Node ${process.versions.node}. Install Node 20 and try again.`);
  const packages = join(root, 'node_modules');
  // A link leads to the packages of another working tree: `npm ci` would empty them for everybody who shares them.
  if (lstatSync(packages, { throwIfNoEntry: false })?.isSymbolicLink()) return;
  unlessDone(join(packages, '.foothold-installed'), ['package-lock.json'], () => {
    say('Installing packages (some minutes the first time: the database driver is compiled) …');
    if (run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error']) !== 0)
      giveUp(
        'The packages could not be installed; the lines above say why. Compiling needs python3, make and g++.',
      );
  });
}

/** Where the shipping kernel is written, and the module that it is compiled into. */
export const kernelSource = 'sim-core/kernel/simd/assembly';
export const kernelBytes = 'sim-core/kernel/simd/kernel-bytes.ts';

/** Compiles the kernel unless the module that holds it is of the very same sources. */
export function ensureKernel() {
  const stamp = join(root, '.build/kernel');
  if (!existsSync(join(root, kernelBytes))) rmSync(stamp, { force: true });
  const files = [...filesBelow(kernelSource), 'package-lock.json', '.config/build-kernel.mjs'];
  unlessDone(stamp, files, () => {
    say('Compiling the kernel …');
    if (run(process.execPath, ['.config/build-kernel.mjs']) !== 0)
      giveUp('The kernel could not be compiled; the lines above say why.');
  });
}

/** Builds client and server unless the present build is of the very same sources. */
export function ensureBuilt() {
  ensureKernel();
  const sources = ['app', 'server', 'sim-core', 'rasters'].flatMap(filesBelow);
  const files = [...sources, 'package-lock.json', 'vite.config.ts', '.config/build.mjs'];
  unlessDone(join(root, '.build/built'), files, () => {
    say('Building …');
    if (run(process.execPath, ['.config/build.mjs']) !== 0)
      giveUp('The build failed; the lines above say why.');
  });
}

const onPath = (command) =>
  spawnSync('sh', ['-c', `command -v ${command}`], { encoding: 'utf8' }).stdout.trim();

/** Path of a Chromium for the browser journeys. */
export const chromiumPath = () =>
  process.env.CHROMIUM_PATH || onPath('chromium') || onPath('chromium-browser');

/** Installs what the tests need from Debian (Chromium; GDAL and Poppler as independent readers), or says what to install. */
export function ensureTestTools() {
  const missing = [
    chromiumPath() ? [] : ['chromium'],
    onPath('gdalinfo') ? [] : ['gdal-bin'],
    onPath('pdftotext') ? [] : ['poppler-utils'],
  ].flat();
  if (missing.length === 0) return;
  const install = `apt-get install ${missing.join(' ')}`;
  if (process.getuid?.() === 0 && onPath('apt-get')) {
    say(`Installing ${missing.join(' and ')} from Debian …`);
    const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
    const waiting = ['-o', 'DPkg::Lock::Timeout=300', '-qq'];
    run('apt-get', [...waiting, 'update'], { env });
    run('apt-get', [...waiting, 'install', '-y', '--no-install-recommends', ...missing], { env });
  }
  if (!chromiumPath())
    giveUp(
      `The browser journeys need Chromium. Install it (as root: ${install}) or name one in CHROMIUM_PATH.`,
    );
  if (!onPath('gdalinfo'))
    say(`GDAL is not installed: the checks against it are skipped (as root: ${install}).`);
  if (!onPath('pdftotext'))
    say(`Poppler is not installed: the checks of PDFs are skipped (as root: ${install}).`);
}
