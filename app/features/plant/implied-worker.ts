import { expose } from 'comlink';
import { impliedDraws } from './implied-draws.ts';

/** Some hundred kernels and curves take about a second, so the page has them worked out here. */
const face = { impliedDraws };
export type ImpliedFace = typeof face;

expose(face);
