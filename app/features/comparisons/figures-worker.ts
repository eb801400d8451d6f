import { expose } from 'comlink';
import { comparisonFigures } from '#sim-core/compare/comparison-figures.ts';

/** Bootstraps take long where there are many futures, so the page has them worked out here. */
const face = { figures: comparisonFigures };
export type FiguresFace = typeof face;

expose(face);
