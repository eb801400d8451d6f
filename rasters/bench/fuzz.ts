import { fork } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { damage } from '#rasters/testing/damage.ts';
import { fixtureNames, loadFixture } from '#rasters/testing/fixtures.ts';
import { tryFile } from '#rasters/testing/try-file.ts';

/**
 * Takes damaged files the way of an upload, in a process that is watched from outside, as a decoder might loop for ever:
 * npm run fuzz:rasters [how many] [seed]. Ends with 1 when any of them came to anything but a refusal or a raster.
 */
const silenceMs = 30_000;
type Message =
  | { at: string; k: number }
  | { outcome: string; ms: number }
  | { broken: string }
  | { done: true; startMb: number; peakMb: number };

const [count, seed] = [Number(process.argv[2] ?? 10_000), Number(process.argv[3] ?? 1)];
if (process.send) await work();
else await watch();

async function work(): Promise<void> {
  const tell = (message: Message) => process.send?.(message);
  const megabytes = () => Math.round(process.resourceUsage().maxRSS / 1024);
  const names = ['good-', 'mend-', 'bad-'].flatMap(fixtureNames);
  const files = names.map(loadFixture);
  const startMb = megabytes();
  for (let k = 0; k < count; k++) {
    const which = k % names.length;
    const bytes = damage(files[which], files[(which + 1 + (k >> 3)) % files.length], seed, k);
    tell({ at: names[which], k });
    const began = performance.now();
    try {
      const outcome = await tryFile(bytes, k);
      tell({ outcome, ms: performance.now() - began });
    } catch (error) {
      const said = error instanceof Error ? (error.stack ?? error.message) : String(error);
      tell({ broken: `${names[which]}, damage ${k}: ${said}` });
    }
  }
  tell({ done: true, startMb, peakMb: megabytes() });
}

function watch(): Promise<void> {
  const tally = new Map<string, number>();
  const times: number[] = [];
  let [at, broken] = ['', 0];
  let memory = '';
  return new Promise((resolve) => {
    const child = fork(fileURLToPath(import.meta.url), process.argv.slice(2));
    const end = (words: string) => {
      clearTimeout(timer);
      child.kill('SIGKILL');
      report(words);
      resolve();
    };
    const silent = () => {
      broken++;
      end(`${at} came to no end in ${silenceMs / 1000} s.`);
    };
    let timer = setTimeout(silent, silenceMs);
    child.on('exit', (code) => {
      if (code === null) return;
      broken++;
      end(`${at}: the process ended with ${code}.`);
    });
    child.on('message', (message: Message) => {
      if ('at' in message) {
        at = `${message.at}, damage ${message.k}`;
        clearTimeout(timer);
        timer = setTimeout(silent, silenceMs);
      } else if ('outcome' in message) {
        tally.set(message.outcome, (tally.get(message.outcome) ?? 0) + 1);
        times.push(message.ms);
      } else if ('broken' in message) {
        broken++;
        console.log(message.broken);
      } else {
        memory = `peak memory ${message.peakMb} MB (${message.startMb} MB at the start)`;
        end('All of them came to an end.');
      }
    });
  });

  function report(words: string): void {
    const all = [...tally].sort((a, b) => b[1] - a[1]);
    times.sort((a, b) => a - b);
    console.log(words);
    console.log(
      `${times.length} files: ${all.map(([what, n]) => `${n} ${what}`).join(', ')}; ${broken} broken`,
    );
    const [half, slowest] = [times[times.length >> 1] ?? 0, times.at(-1) ?? 0];
    console.log(`half within ${half.toFixed(1)} ms, the slowest ${slowest.toFixed(0)} ms; ${memory}`);
    process.exitCode = broken > 0 ? 1 : 0;
  }
}
