import { digestFrames } from './digest-frames.ts';
import type { RasterTask, Refusal } from './raster-tasks.ts';
import { readLayer } from './read-layer.ts';
import { writeMap } from './write-map.ts';

const isRefusal = (error: unknown): error is Error & Refusal =>
  error instanceof Error && 'code' in error && 'found' in error && 'expected' in error && 'remedy' in error;

const perform = (task: RasterTask) => {
  switch (task.kind) {
    case 'read-layer':
      return readLayer(task);
    case 'write-map':
      return writeMap(task);
    case 'digest':
      return digestFrames(task);
  }
};

/** The shell around the tasks: one message in, one out, a refusal as plain data. */
export default async function work(task: RasterTask): Promise<{ value: unknown } | { refused: Refusal }> {
  try {
    return { value: await perform(task) };
  } catch (error) {
    if (!isRefusal(error)) throw error;
    const { code, message, found, expected, remedy } = error;
    return { refused: { code, message, found, expected, remedy } };
  }
}
