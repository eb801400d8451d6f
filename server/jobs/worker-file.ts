import { createRequire } from 'node:module';
import { fileURLToPath, pathToFileURL } from 'node:url';

/** Built, a worker is an entry of its own beside the bundle; from the sources it is read through tsx. */
const fromSources = import.meta.url.endsWith('.ts');

/** tsx as a URL, since a bare name would be looked for from the current folder. */
const loader = () => pathToFileURL(createRequire(import.meta.url).resolve('tsx')).href;

export interface WorkerFile {
  readonly filename: string;
  /** options of Node for the worker */
  readonly execArgv: string[];
}

/** Where the worker of that name in this folder is, and how Node reads it. */
export const workerFile = (name: string): WorkerFile => ({
  filename: fileURLToPath(new URL(`./${name}.${fromSources ? 'ts' : 'js'}`, import.meta.url)),
  execArgv: fromSources ? ['--import', loader()] : [],
});
