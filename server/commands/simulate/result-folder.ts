import { mkdir, mkdtemp, readdir, rename, rm, rmdir, stat, writeFile } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { SimulateError } from './simulate-error.ts';

const isResult = (name: string) => /^(?:cover-\d+\.tif|closing\.tif|series\.csv|summary\.json)$/.test(name);

/** Results that appear all at once or not at all. */
export interface ResultFolder {
  /** the folder that is filled meanwhile, beside the one that was asked for */
  readonly partial: string;
  write(name: string, content: Uint8Array | string): Promise<void>;
  /** Puts the results in place; with `force`, in the place of an earlier run's. */
  finish(): Promise<void>;
  /** Removes what was written; harmless after `finish`. */
  discard(): Promise<void>;
}

/**
 * Prepares to write results to `out`.
 * @throws SimulateError where `out` is a file, or holds anything and `force` was not said
 */
export async function openResultFolder(out: string, force: boolean): Promise<ResultFolder> {
  await refuseOccupied(out, force);
  await mkdir(dirname(out), { recursive: true });
  const partial = await mkdtemp(join(dirname(out), `.${basename(out)}.partial-`));
  return {
    partial,
    write: (name, content) => writeFile(join(partial, name), content),
    async finish() {
      await mkdir(out, { recursive: true });
      // Years that this run does not report must not stay behind from an earlier one.
      for (const name of await readdir(out)) if (isResult(name)) await rm(join(out, name));
      for (const name of await readdir(partial)) await rename(join(partial, name), join(out, name));
      await rmdir(partial);
    },
    discard: () => rm(partial, { recursive: true, force: true }),
  };
}

/** @throws SimulateError where `out` is a file, or holds anything and `force` was not said */
export async function refuseOccupied(out: string, force: boolean): Promise<void> {
  const found = await stat(out).catch(() => undefined);
  if (!found) return;
  if (!found.isDirectory()) throw new SimulateError(`${out} is a file; --out must name a folder.`);
  const names = await readdir(out);
  if (names.length > 0 && !force)
    throw new SimulateError(
      `${out} is not empty (it holds ${names[0]}${names.length > 1 ? ` and ${names.length - 1} more` : ''}). ` +
        'Name another folder, or say --force to replace the results of an earlier run in it.',
    );
}
