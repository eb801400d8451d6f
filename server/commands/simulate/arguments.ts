import { resolve } from 'node:path';
import { parseArgs } from 'node:util';
import { SimulateError } from './simulate-error.ts';

export type Task =
  | { readonly kind: 'help' }
  | { readonly kind: 'example' }
  | {
      readonly kind: 'run';
      readonly spec: string;
      readonly out: string;
      readonly force: boolean;
      /** runs at once; undefined: as many as there are cores */
      readonly workers: number | undefined;
    };

const mostWorkers = 256;

export const help = `npm run simulate -- SPEC.json --out DIR [--force] [--workers N]
npm run simulate -- --example > spec.json

Runs one simulation, or an ensemble where the spec says "replicates": N, on GeoTIFFs.

  SPEC.json   what to run; its layers name GeoTIFFs relative to it, or are constants
  --out DIR   where the results go: cover-<year>.tif, closing.tif, series.csv, summary.json
  --force     replace the results of an earlier run in DIR
  --workers N how many replicates to run at once, as many as there are cores unless said; the results are the same
  --example   print a complete spec that runs as it stands, on invented demo rasters
  --help      print this
`;

/**
 * What the command line asks for; paths relative to `folder`, where the user stands.
 * @throws SimulateError saying what is missing or not understood
 */
export function parseTask(argv: readonly string[], folder: string): Task {
  const { values, positionals } = understood(argv);
  if (values.help) return { kind: 'help' };
  if (values.example) return { kind: 'example' };
  if (positionals.length !== 1)
    throw new SimulateError(
      `Found ${positionals.length === 0 ? 'no spec' : `${positionals.length} specs`}; expected one.\n\n${help}`,
    );
  if (!values.out) throw new SimulateError(`Say with --out DIR where the results should go.\n\n${help}`);
  return {
    kind: 'run',
    spec: resolve(folder, positionals[0]),
    out: resolve(folder, values.out),
    force: values.force ?? false,
    workers: workersOf(values.workers),
  };
}

function workersOf(said: string | undefined): number | undefined {
  if (said === undefined) return undefined;
  const workers = Number(said);
  if (!/^\d+$/.test(said) || workers < 1 || workers > mostWorkers)
    throw new SimulateError(`Found --workers ${said}; expected a whole number from 1 to ${mostWorkers}.`);
  return workers;
}

function understood(argv: readonly string[]) {
  try {
    return parseArgs({
      args: [...argv],
      allowPositionals: true,
      options: {
        out: { type: 'string' },
        force: { type: 'boolean' },
        workers: { type: 'string' },
        example: { type: 'boolean' },
        help: { type: 'boolean', short: 'h' },
      },
    });
  } catch (error) {
    throw new SimulateError(`${(error as Error).message}\n\n${help}`);
  }
}
