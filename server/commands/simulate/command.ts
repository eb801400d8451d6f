import { join } from 'node:path';
import { help, parseTask } from './arguments.ts';
import { exampleSpec } from './example.ts';
import { showProgress, type ProgressTarget } from '#server/show-progress.ts';
import { openResultFolder, refuseOccupied, type ResultFolder } from './result-folder.ts';
import { runSpecFile } from './run-spec-file.ts';
import { SimulateError } from './simulate-error.ts';

export interface CommandContext {
  /** where the user stands */
  readonly folder: string;
  /** where the demo's rasters may be kept */
  readonly dataDir: string;
  /** results for pipes */
  readonly print: (text: string) => void;
  /** everything else */
  readonly progress: ProgressTarget;
  /** told of what must be removed should the command be broken off */
  readonly onPartial?: (folder: ResultFolder | undefined) => void;
}

/** Carries out `npm run simulate`. Returns the exit code: 0, or 1 with a message that says what to mend. */
export async function simulate(argv: readonly string[], context: CommandContext): Promise<number> {
  const { progress, print, onPartial } = context;
  let results: ResultFolder | undefined;
  try {
    const task = parseTask(argv, context.folder);
    if (task.kind === 'help') {
      print(help);
      return 0;
    }
    if (task.kind === 'example') {
      const spec = await exampleSpec(join(context.dataDir, 'demo-rasters'));
      print(`${JSON.stringify(spec, null, 2)}\n`);
      return 0;
    }
    const open = async () => {
      results = await openResultFolder(task.out, task.force);
      onPartial?.(results);
      return results;
    };
    await refuseOccupied(task.out, task.force);
    await runSpecFile(task.spec, { open, tell: showProgress(progress), workers: task.workers });
    progress.write(`The results are in ${task.out}\n`);
    return 0;
  } catch (error) {
    await results?.discard();
    if (!(error instanceof SimulateError)) throw error;
    progress.write(`${error.message}\n`);
    return 1;
  } finally {
    onPartial?.(undefined);
  }
}
