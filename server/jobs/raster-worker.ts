import type { MessagePort } from 'node:worker_threads';
import { digestFrames } from './digest-frames.ts';
import { placeRaster } from './place-raster.ts';
import type { RasterTask, Refusal } from './raster-tasks.ts';
import { makeBriefFacts, writeBrief } from './print-brief.ts';
import { readLayer } from './read-layer.ts';
import { surveyUpload } from './survey-upload.ts';
import { writeMap } from './write-map.ts';

const isRefusal = (error: unknown): error is Error & Refusal =>
  error instanceof Error && 'code' in error && 'found' in error && 'expected' in error && 'remedy' in error;

const perform = (task: RasterTask, onProgress: (share: number) => void) => {
  switch (task.kind) {
    case 'read-layer':
      return readLayer(task);
    case 'survey':
      return surveyUpload(task, onProgress);
    case 'place':
      return placeRaster(task, onProgress);
    case 'write-map':
      return writeMap(task);
    case 'digest':
      return digestFrames(task);
    case 'brief-facts':
      return makeBriefFacts(task);
    case 'write-brief':
      return writeBrief(task);
  }
};

/** The shell around the tasks: one message in, one out, a refusal as plain data. */
export default async function work({
  task,
  port,
}: {
  task: RasterTask;
  port: MessagePort;
}): Promise<{ value: unknown } | { refused: Refusal }> {
  try {
    return { value: await perform(task, (share) => port.postMessage(share)) };
  } catch (error) {
    if (!isRefusal(error)) throw error;
    const { code, message, found, expected, remedy } = error;
    return { refused: { code, message, found, expected, remedy } };
  } finally {
    port.close();
  }
}
