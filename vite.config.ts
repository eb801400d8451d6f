import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

const root = import.meta.dirname;

export default defineConfig({
  root: `${root}/app`,
  publicDir: `${root}/app/public`,
  cacheDir: `${root}/node_modules/.vite`,
  plugins: [react(), tailwindcss()],
  build: {
    outDir: `${root}/.build/app`,
    emptyOutDir: true,
    // Small fonts and WASM must stay files: as data URLs the content security policy would refuse them.
    assetsInlineLimit: 0,
    target: 'es2022',
  },
  worker: { format: 'es' },
  server: {
    fs: { allow: [root] },
    proxy: { '/api': `http://localhost:${process.env.PORT ?? 4173}` },
  },
  test: {
    projects: [
      {
        test: {
          name: 'node',
          root,
          globalSetup: `${root}/.config/kernel-for-tests.mjs`,
          environment: 'node',
          include: ['{sim-core,rasters,server}/**/*.test.ts'],
          testTimeout: 60_000,
          hookTimeout: 60_000,
        },
      },
      {
        extends: true,
        root,
        test: {
          name: 'app',
          root,
          globalSetup: `${root}/.config/kernel-for-tests.mjs`,
          environment: 'happy-dom',
          include: ['app/**/*.test.{ts,tsx}'],
          exclude: ['app/e2e/**'],
          testTimeout: 20_000,
        },
      },
    ],
  },
});
