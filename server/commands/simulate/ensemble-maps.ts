import { cannotClose, stillOpen } from '#sim-core/index.ts';
import { SimulateError } from './simulate-error.ts';

const mostBytes = 2 * 1024 ** 3;

/**
 * Maps over replicates: mean cover of each reported year, and the year by which at least half of the replicates have
 * closed.
 *
 * @throws SimulateError where they would not fit into memory
 */
export function ensembleMaps(cells: number, years: readonly number[], replicates: number) {
  const bytes = cells * (8 * years.length + 2 * replicates);
  if (bytes > mostBytes)
    throw new SimulateError(
      `${replicates} replicates with ${years.length} reported years on ${cells} cells need ${Math.ceil(bytes / 1024 ** 3)} GB ` +
        'for their maps; at most 2 GB are taken. Report fewer years with "reportYears", or run fewer replicates.',
    );
  const sums = new Map(years.map((year) => [year, new Float64Array(cells)]));
  const closings: Int16Array[] = [];
  return {
    addCover(year: number, cover: Float32Array): void {
      const sum = sums.get(year);
      if (sum) for (let i = 0; i < cells; i++) sum[i] += cover[i];
    },
    addClosing: (closing: Int16Array): void => {
      closings.push(closing);
    },
    meanCover: (year: number): Float32Array =>
      Float32Array.from(sums.get(year) ?? [], (sum) => sum / closings.length),
    /** 0 where fewer than half have closed; −32768 where nothing can grow */
    medianClosing(): Int16Array {
      const median = new Int16Array(cells);
      const half = Math.ceil(closings.length / 2);
      const closed = new Int16Array(closings.length);
      for (let i = 0; i < cells; i++) {
        let n = 0;
        for (const closing of closings) if (closing[i] > stillOpen) closed[n++] = closing[i];
        if (closings[0][i] === cannotClose) median[i] = cannotClose;
        else median[i] = n < half ? stillOpen : closed.subarray(0, n).sort()[half - 1];
      }
      return median;
    },
  };
}
