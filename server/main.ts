import { existsSync } from 'node:fs';
import { createApp } from './app.ts';
import { ConfigError, readConfig } from './config.ts';
import { createServices } from './services.ts';

const say = (text: string) => process.stdout.write(`${text}\n`);

async function main(): Promise<void> {
  if (existsSync('.env')) process.loadEnvFile('.env');
  const config = readConfig(process.env);
  const services = await createServices(config);
  const server = createApp(services).listen(config.port, config.host);
  await new Promise<void>((resolve, reject) => {
    server.once('listening', resolve).once('error', reject);
  });
  say(`Foothold is ready at ${config.publicUrl}`);

  const stop = () => {
    server.close(() => {
      void services.close().then(() => process.exit(0));
    });
    server.closeIdleConnections();
  };
  process.once('SIGTERM', stop);
  process.once('SIGINT', stop);
}

main().catch((error: unknown) => {
  const text = error instanceof ConfigError ? error.message : String((error as Error).stack ?? error);
  process.stderr.write(`Foothold cannot start.\n${text}\n`);
  process.exit(1);
});
