import { candidateCells, type CandidateInput } from './candidate-cells.ts';
import { createQuickLook, type QuickLookInput } from './quick-look.ts';
import { footholdWorks, type FootholdKind, type SuggestProgress } from './suggest.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';

export interface GainMapInput extends QuickLookInput, Pick<CandidateInput, 'allowed' | 'candidates'> {
  readonly works: readonly Action[];
  readonly foothold: FootholdKind;
}

export interface GainMap {
  /** years by which one more foothold in a cell would bring the mean arrival forward; NaN where none may stand. Float32 */
  readonly gains: Float32Array;
  /** the most that any place that was weighed would bring */
  readonly most: number;
  readonly candidates: number;
}

/**
 * Where one more foothold would help most: the gain of a single one at each candidate place, and between them the mean
 * of the places around, weighted by the inverse square of their distance (Shepard 1968).
 */
export function* gainMap(input: GainMapInput): Generator<SuggestProgress, GainMap> {
  const { grid, foothold, works, ground, allowed } = input;
  const look = createQuickLook(input);
  look.change({ removed: [], added: works.map((action, i) => [i, action] as const) });
  const candidates = candidateCells(input);
  const gains: number[] = [];
  for (const [i, { x, y }] of candidates.entries()) {
    yield { stage: 'weighing', done: i, of: candidates.length };
    gains.push(look.gainOf(footholdWorks(x, y, foothold)));
  }
  const { width } = grid;
  const map = Float32Array.from(ground.capacity, (k, cell) => {
    if (k === 0 || allowed?.[cell] === 0) return NaN;
    let [sum, weights] = [0, 0];
    for (const [i, { cell: other }] of candidates.entries()) {
      const dx = (cell % width) - (other % width);
      const dy = Math.floor(cell / width) - Math.floor(other / width);
      if (dx === 0 && dy === 0) return gains[i];
      const weight = 1 / (dx * dx + dy * dy) ** 2;
      sum += weight * gains[i];
      weights += weight;
    }
    return weights > 0 ? sum / weights : NaN;
  });
  return { gains: map, most: gains.reduce((a, b) => Math.max(a, b), 0), candidates: candidates.length };
}
