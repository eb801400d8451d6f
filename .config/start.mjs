// npm start: installs what is missing, builds, and serves; the server itself migrates and loads the demo.
import { become, ensureBuilt, ensureInstalled } from './lib/shell.mjs';

ensureInstalled();
ensureBuilt();
become(process.execPath, ['--enable-source-maps', '.build/server/main.js'], {
  env: { NODE_ENV: 'production', ...process.env },
});
