// Runs one TypeScript file of the project: node .config/run.mjs FILE [arguments].
import { become, ensureInstalled } from './lib/shell.mjs';

ensureInstalled();
become(process.execPath, ['--import', 'tsx', ...process.argv.slice(2)]);
