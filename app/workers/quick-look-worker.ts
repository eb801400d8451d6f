import { expose, transfer } from 'comlink';
import type { WorksChange } from '#sim-core/plan/quick-look.ts';
import {
  createQuickLookDesk,
  type Look,
  type PatternRequest,
  type QuickLookStart,
} from './quick-look-desk.ts';

const desk = createQuickLookDesk();
const handOver = (look: Look) =>
  transfer(look, [look.years.buffer as ArrayBuffer, look.texels.buffer as ArrayBuffer]);

/** What the client calls; years and texels are handed to it, never copied twice. */
const face = {
  open: async (start: QuickLookStart) => handOver(await desk.open(start)),
  change: (change: WorksChange) => handOver(desk.change(change)),
  lines: () => desk.lines(),
  lay: (request: PatternRequest) => desk.lay(request),
};
export type QuickLookFace = typeof face;

expose(face);
