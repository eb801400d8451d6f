import { readdirSync } from 'node:fs';
import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import reactHooks from 'eslint-plugin-react-hooks';
import globals from 'globals';
import tseslint from 'typescript-eslint';

const root = `${import.meta.dirname}/..`;
const source = (folder) => [`${folder}/**/*.ts`, `${folder}/**/*.tsx`];

/** Forbids module names that match `regex` in `files`, with the reason shown to whoever tripped over it. */
const forbid = (files, patterns, ignores = []) => ({
  files,
  ignores,
  rules: { 'no-restricted-imports': ['error', { patterns }] },
});

/** Crossing a top folder is done by its `#` name, so that the rules below see every crossing. */
const relativeAcrossFolders = {
  regex: '^(\\.\\./)+(app|server|sim-core|rasters)/',
  message: 'Import another top folder by its # name.',
};
const only = (allowed, message) => ({ regex: `^(?!\\.{1,2}/|(?:${allowed.join('|')})(?:/|$))`, message });

const tests = ['**/*.test.ts', '**/*.test.tsx', '**/testing/**', '**/bench/**', 'app/e2e/**'];

/** Features never import features; routes compose them. */
const featureWalls = ['app', 'server'].flatMap((top) => {
  let features = [];
  try {
    features = readdirSync(`${root}/${top}/features`, { withFileTypes: true }).filter((e) => e.isDirectory());
  } catch {
    return [];
  }
  return features.map(({ name }) => ({
    files: source(`${top}/features/${name}`),
    ignores: tests,
    name,
    top,
    pattern: {
      regex: `^#${top}/features/(?!${name}/)|^(\\.\\./)+features/|^\\.\\./(?:${features
        .map((f) => f.name)
        .filter((f) => f !== name)
        .join('|')})/`,
      message: 'Features never import features; compose them in a route.',
    },
  }));
});

const folderRules = [
  {
    top: 'sim-core',
    pattern: only(
      ['seedrandom', '@noble/hashes', 'd3-contour', '#sim-core'],
      'sim-core is pure: it imports itself, seedrandom, @noble/hashes and d3-contour.',
    ),
    except: ['sim-core/spec/**'],
  },
  {
    top: 'sim-core/spec',
    pattern: only(['zod', '#sim-core'], 'sim-core/spec imports sim-core and zod.'),
  },
  {
    top: 'rasters',
    pattern: only(
      ['#sim-core/grid', '#rasters', 'geotiff', 'proj4', 'fflate'],
      'rasters imports sim-core/grid, geotiff, proj4 and fflate; only geo/epsg-register.ts reads epsg-index.',
    ),
    except: ['rasters/geo/epsg-register.ts', 'rasters/ensemble/**'],
  },
  {
    top: 'server/contract',
    pattern: only(
      ['zod', '#contract', '#sim-core/spec', '#sim-core/belief', '#sim-core/grid'],
      'The contract imports zod, sim-core/spec and sim-core/belief: it runs in browsers.',
    ),
  },
  {
    top: 'server',
    pattern: { regex: '^#app/', message: 'The server never imports the app.' },
    except: ['server/contract/**'],
  },
  {
    top: 'app',
    pattern: {
      regex: '^#server/|^#rasters/(?:geo|describe|align)/',
      message:
        'The app speaks to the server through #contract alone, and the EPSG register stays off the browser.',
    },
  },
  {
    top: 'rasters/ensemble',
    pattern: only(
      ['#sim-core/grid', '#sim-core/ensemble', '#rasters', 'fflate', 'zod'],
      'rasters/ensemble imports sim-core/grid, sim-core/ensemble, rasters, fflate and zod.',
    ),
  },
];

const typeormOnlyInRepositories = {
  regex: '^typeorm$',
  message: 'TypeORM stays in server/database and in *.repository.ts files.',
};

export default tseslint.config(
  // AssemblyScript only looks like TypeScript; its own compiler checks the types.
  { ignores: ['.build/**', 'node_modules/**', 'data/**', 'sim-core/kernel/simd/assembly/**'] },
  js.configs.recommended,
  ...tseslint.configs.recommendedTypeChecked.map((c) => ({ ...c, files: ['**/*.ts', '**/*.tsx'] })),
  {
    files: ['**/*.ts', '**/*.tsx'],
    languageOptions: {
      parserOptions: {
        project: [
          '{sim-core,rasters,server,app}/tsconfig{,.test}.json',
          'server/contract/tsconfig{,.test}.json',
          '.config/tsconfig.tools.json',
        ],
        tsconfigRootDir: root,
      },
    },
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      'max-lines': ['error', { max: 400, skipBlankLines: true, skipComments: true }],
      eqeqeq: 'error',
      'no-console': 'error',
    },
  },
  { files: ['**/*.mjs', '.config/**/*.js'], languageOptions: { globals: globals.node } },
  {
    files: source('app'),
    plugins: { 'react-hooks': reactHooks },
    rules: reactHooks.configs.recommended.rules,
  },
  // The last matching block wins in flat config, so each block carries every pattern that holds for its files.
  ...folderRules.map((r) =>
    forbid(source(r.top), [relativeAcrossFolders, r.pattern], [...tests, ...(r.except ?? [])]),
  ),
  forbid(
    ['server/**/*.ts'],
    [relativeAcrossFolders, folderRules[4].pattern, typeormOnlyInRepositories],
    [...tests, 'server/contract/**', 'server/database/**', 'server/**/*.repository.ts'],
  ),
  ...featureWalls.map((w) =>
    forbid(
      w.files,
      [
        relativeAcrossFolders,
        w.pattern,
        folderRules.find((r) => r.top === w.top).pattern,
        ...(w.top === 'server' ? [typeormOnlyInRepositories] : []),
      ],
      [...w.ignores, 'server/**/*.repository.ts'],
    ),
  ),
  ...featureWalls
    .filter((w) => w.top === 'server')
    .map((w) =>
      forbid(
        [`server/features/${w.name}/**/*.repository.ts`],
        [relativeAcrossFolders, w.pattern, folderRules[4].pattern],
      ),
    ),
  {
    files: tests,
    rules: {
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
    },
  },
  { files: ['**/bench/**', 'server/commands/**', '.config/**'], rules: { 'no-console': 'off' } },
  prettier,
);
