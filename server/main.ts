import { existsSync } from 'node:fs';
import { createApp } from './app.ts';
import { ConfigError, readConfig } from './config.ts';
import { loadDemo } from './demo/load-demo.ts';
import { prepareFirstStart } from './first-start.ts';
import { openDemoAccounts } from './people/session-view.repository.ts';
import { resumeWork } from './resume-work.ts';
import { createServices, type Services } from './services.ts';
import { showProgress } from './show-progress.ts';
import type { RunnerProgress } from '#sim-core/ensemble/runner.ts';

const say = (text: string) => process.stdout.write(`${text}\n`);

/** Says how far the demo is. Nothing is said by a start that finds it made. */
function sayDemo(): (progress: RunnerProgress) => void {
  const { stdout } = process;
  const tell = showProgress({
    write: (text) => stdout.write(text),
    isTerminal: stdout.isTTY,
    now: () => performance.now(),
  });
  let begun = false;
  return ({ stepsDone, steps, runsDone, runs }) => {
    if (!begun)
      say(`Making the invented demo, once: ${runs} runs for its comparison. This can take a minute.`);
    begun = true;
    // Time left would be a guess before the first run; the last step may be done before the last run is handed over.
    if (runsDone > 0 && (stepsDone < steps || runsDone === runs))
      tell(stepsDone, steps, `${runsDone} of ${runs} runs`);
  };
}

/** Prints how to get in: the demo's sign-ins while it is on, or the one-time set-up link. */
async function greet({ config, dataSource }: Services, setupLink: string | undefined): Promise<void> {
  say(`\nFoothold is ready at ${config.publicUrl}\n`);
  if (setupLink) say(`Nobody has an account yet. Make the first one within 24 hours:\n  ${setupLink}\n`);
  const accounts = await openDemoAccounts(dataSource, config.demo);
  if (accounts.length === 0) return;
  say('The demo is on. Everything in it is invented. Sign in as');
  for (const { role, email, password } of accounts) say(`  ${role.padEnd(9)} ${email}  ${password}`);
  say('Set DEMO=off before other people can reach this server.\n');
}

async function main(): Promise<void> {
  // Whatever is written from here on is for this account alone: sessions, passwords' hashes, unsent e-mail.
  process.umask(0o077);
  if (existsSync('.env')) process.loadEnvFile('.env');
  const config = readConfig(process.env);
  const services = await createServices(config);
  const { demo, setupLink } = await prepareFirstStart(services);
  if (demo) await loadDemo(services, { onProgress: sayDemo() });
  await resumeWork(services);
  const server = createApp(services).listen(config.port, config.host);
  await new Promise<void>((resolve, reject) => {
    server.once('listening', resolve).once('error', reject);
  });
  await greet(services, setupLink);

  let stopping = false;
  const stop = () => {
    if (stopping) process.exit(1);
    stopping = true;
    server.close(() => {
      void services.close().then(() => process.exit(0));
    });
    server.closeIdleConnections();
    // A download that nobody reads on must not keep the server from ending.
    setTimeout(() => server.closeAllConnections(), 10_000).unref();
  };
  process.on('SIGTERM', stop);
  process.on('SIGINT', stop);
}

main().catch((error: unknown) => {
  const text = error instanceof ConfigError ? error.message : String((error as Error).stack ?? error);
  process.stderr.write(`Foothold cannot start.\n${text}\n`);
  process.exit(1);
});
