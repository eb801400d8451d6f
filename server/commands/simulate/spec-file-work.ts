import type { ResultFolder } from './result-folder.ts';

/** What goes with a spec that is to be run. */
export interface SpecFileWork {
  /** makes the folder for the results, once the spec and its files turn out to be good */
  readonly open: () => Promise<ResultFolder>;
  /** how many of how many steps are done, and in what */
  readonly tell: (done: number, of: number, what?: string) => void;
  /** replicates at once; undefined: as many as there are cores */
  readonly workers: number | undefined;
}
