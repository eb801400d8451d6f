import { benchFrames } from './frames.ts';
import { benchWorkers } from './workers.ts';

await benchFrames();
await benchWorkers();
