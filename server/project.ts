import { existsSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';

/** The folder that holds package.json, found upwards from here: it differs between the sources and the bundle. */
function findRoot(folder: string): string {
  if (existsSync(join(folder, 'package.json'))) return folder;
  const parent = dirname(folder);
  if (parent === folder)
    throw new Error('package.json was not found above the server: the copy is incomplete');
  return findRoot(parent);
}

export const projectRoot = findRoot(import.meta.dirname);

/** The product's version, from package.json. */
export const productVersion = String(
  (JSON.parse(readFileSync(join(projectRoot, 'package.json'), 'utf8')) as { version: unknown }).version,
);
