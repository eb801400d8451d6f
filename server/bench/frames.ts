import { decodeCellValues, encodeCellValues } from '#rasters/cells/cell-values.ts';
import { printLine } from '#sim-core/bench/line.ts';
import { createRun } from '#sim-core/index.ts';
import type { Mode } from '#sim-core/spec/run-spec.ts';
import { demoCase } from './demo-case.ts';

const modes: Mode[] = ['counts', 'mean-field'];

/** What the demo run's frames take as they are stored; the time is that of packing them. */
export async function benchFrames(): Promise<void> {
  for (const mode of modes) {
    const input = await demoCase(mode);
    const { width, height } = input.grid;
    const run = createRun(input);
    const frames: Uint8Array[] = [];
    for (let year = run.survey; ;) {
      if (year.frame) frames.push(year.frame);
      const next = run.nextYear();
      if (!next) break;
      year = next;
    }
    const start = process.cpuUsage();
    const packed = frames.map((values) => encodeCellValues({ width, height, values }));
    const { user, system } = process.cpuUsage(start);
    packed.forEach((bytes, i) => {
      if (Buffer.compare(decodeCellValues(bytes).values as Uint8Array, frames[i]) !== 0)
        throw new Error(`Frame ${i} does not come back as it was`);
    });
    const work = width * height * frames.length;
    const bytes = packed.reduce((sum, { length }) => sum + length, 0);
    printLine({
      name: 'frames',
      mode,
      map: 'demo',
      size: `${width}×${height}`,
      against: 'byte-a-cell',
      work,
      seconds: (user + system) / 1e6,
      rate: bytes / work,
      ratio: work / bytes,
    });
  }
}
