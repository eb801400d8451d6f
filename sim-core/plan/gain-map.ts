import { candidatePlaces, mayHold } from './candidates.ts';
import {
  footholdWorks,
  lookWithWorks,
  usualNumber,
  type SuggestInput,
  type SuggestProgress,
} from './suggest.ts';

export type GainMapInput = Omit<SuggestInput, 'amount'>;

export interface GainMap {
  /** years by which one more foothold in a cell would bring the mean arrival forward; NaN where none may stand; Float32 */
  readonly gains: Float32Array;
  /** the most that any place that was weighed would bring, and which that is, undefined where none was */
  readonly most: number;
  readonly best: { readonly x: number; readonly y: number } | undefined;
  /** places that were weighed */
  readonly candidates: number;
}

/**
 * Where one more foothold would help most: the gain of a single one at each candidate place, and between them the mean
 * of the places within two blocks, weighted by (1 − d²/r²)², which falls to nothing smoothly at that distance.
 *
 * Yields its progress; what it returns is the map.
 */
export function* gainMap(input: GainMapInput): Generator<SuggestProgress, GainMap> {
  const { grid, foothold } = input;
  const look = lookWithWorks(input);
  const { places, side, columns, inBlock } = candidatePlaces(input, input.candidates ?? usualNumber(input));
  const gains = new Float64Array(places.length);
  let most = 0;
  let best: GainMap['best'];
  for (const [i, { x, y }] of places.entries()) {
    yield { stage: 'weighing', done: i, of: places.length };
    gains[i] = look.gainOf(footholdWorks(x, y, foothold));
    if (!best || gains[i] > most) [most, best] = [gains[i], { x, y }];
  }
  const may = mayHold(input);
  const rows = inBlock.length / columns;
  const reach = (2 * side) ** 2;
  const map = new Float32Array(grid.width * grid.height).fill(NaN);
  for (let row = 0; row < grid.height; row++)
    for (let column = 0; column < grid.width; column++) {
      const cell = row * grid.width + column;
      if (may(cell)) map[cell] = mean(column, row);
    }
  return { gains: map, most, best, candidates: places.length };

  function mean(column: number, row: number): number {
    const [blockColumn, blockRow] = [Math.floor(column / side), Math.floor(row / side)];
    let [sum, weights] = [0, 0];
    for (let r = Math.max(0, blockRow - 2); r <= Math.min(rows - 1, blockRow + 2); r++)
      for (let c = Math.max(0, blockColumn - 2); c <= Math.min(columns - 1, blockColumn + 2); c++) {
        const place = inBlock[r * columns + c];
        if (place < 0) continue;
        const [dx, dy] = [places[place].column - column, places[place].row - row];
        const near = 1 - (dx * dx + dy * dy) / reach;
        if (near <= 0) continue;
        sum += near * near * gains[place];
        weights += near * near;
      }
    return sum / weights;
  }
}
