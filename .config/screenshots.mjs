// npm run screenshots: every page at two widths in both themes, into .build/screenshots.
import { join } from 'node:path';
import { become, ensureBuilt, ensureInstalled, ensureTestTools, root } from './lib/shell.mjs';

ensureInstalled();
ensureTestTools();
ensureBuilt();
become(join(root, 'node_modules/.bin/playwright'), ['test', '-c', '.config/playwright.config.ts'], {
  env: { ...process.env, SCREENSHOTS: '1' },
});
