import { spawn } from 'node:child_process';
import { createServer, type AddressInfo } from 'node:net';
import { projectRoot } from '../project.ts';

export async function freePort(): Promise<number> {
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  await new Promise((resolve) => server.close(resolve));
  return port;
}

/** Starts the server as its users do; `said` resolves once its output holds a text, `ended` with its exit code. */
export function startServer(dataDir: string, environment: Record<string, string>) {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
    cwd: projectRoot,
    env: { PATH: process.env.PATH, DATA_DIR: dataDir, DEMO: 'off', LOG_LEVEL: 'silent', ...environment },
  });
  let output = '';
  const waiting: { pattern: RegExp; found: (match: RegExpExecArray) => void }[] = [];
  const listen = (chunk: Buffer) => {
    output += chunk.toString();
    for (const { pattern, found } of waiting) {
      const match = pattern.exec(output);
      if (match) found(match);
    }
  };
  child.stdout.on('data', listen);
  child.stderr.on('data', listen);
  const ended = new Promise<number | null>((resolve) => child.on('close', resolve));
  const said = (pattern: RegExp) =>
    Promise.race([
      new Promise<RegExpExecArray>((found) => waiting.push({ pattern, found })),
      ended.then(() => Promise.reject(new Error(`The server ended early:\n${output}`))),
    ]);
  return { child, said, ended, output: () => output };
}
