// npm run dev: the server restarts on a change (PORT, 4173), Vite serves the client at its own address and passes /api on.
import { spawn } from 'node:child_process';
import { ensureInstalled, ensureKernel, root } from './lib/shell.mjs';

ensureInstalled();
ensureKernel();
const children = [
  spawn(process.execPath, ['--watch', '--import', 'tsx', 'server/main.ts'], { cwd: root, stdio: 'inherit' }),
  spawn('node_modules/.bin/vite', ['--config', 'vite.config.ts'], { cwd: root, stdio: 'inherit' }),
];
const stop = () => children.forEach((child) => child.kill('SIGTERM'));
process.on('SIGINT', stop);
process.on('SIGTERM', stop);
children.forEach((child) => child.on('exit', stop));
