// Runs one TypeScript file of the project: node .config/run.mjs FILE [arguments].
import { become, ensureInstalled, ensureKernel } from './lib/shell.mjs';

ensureInstalled();
ensureKernel();
become(process.execPath, ['--import', 'tsx', ...process.argv.slice(2)]);
