import { arrivalQueue } from './four-point-queue.ts';

/** Where growth starts and how fast it goes, one value a cell, row-major, width × height. */
export interface ArrivalInput {
  readonly width: number;
  readonly height: number;
  /** side of a cell, m */
  readonly cellSize: number;
  /** speed through each cell, m/yr; 0 (or less, or NaN) is an obstacle that nothing enters */
  readonly speed: Float32Array | Float64Array;
  /** year at which growth starts in a cell, Infinity where it does not start */
  readonly starts: Float64Array;
  /**
   * order of the differences: 1 (the default) errs like h ln 1/h; 2 like h² away from the starts (Rickett & Fomel 1999)
   */
  readonly order?: 1 | 2;
}

/**
 * Years until growth reaches each cell's centre: |∇T| · v = 1 from all starts at once, by fast marching (Sethian 1996,
 * PNAS 93:1591–1595; 1999, SIAM Rev. 41:199–235): cells settle in order of time, each from neighbours that came before.
 *
 * The yardstick of `theory/arrival-field.ts`: the textbook scheme on four neighbours, to first and to second order,
 * written apart from it.
 *
 * @returns Float64, row-major; Infinity where it never arrives
 * @throws RangeError where a layer has another size than the map
 */
export function arrivalTimes(input: ArrivalInput): Float64Array {
  const { width, height, cellSize, speed, starts, order = 1 } = input;
  const cells = width * height;
  if (speed.length !== cells || starts.length !== cells)
    throw new RangeError(
      `Found ${speed.length} speeds and ${starts.length} starts; expected ${width} × ${height} = ${cells}`,
    );
  /** of cells that have settled; Infinity elsewhere */
  const times = new Float64Array(cells).fill(Infinity);
  const queue = arrivalQueue(cells);
  const firstOrder = firstOrderTime(times, width, height);
  const timeAt = order === 1 ? firstOrder : secondOrderTime(times, width, height);

  function reach(cell: number): void {
    if (times[cell] < Infinity || !(speed[cell] > 0)) return;
    const crossing = cellSize / speed[cell];
    // First order errs on the late side, so it alone may overrule a start; second order can be a hair early, which adds up.
    const holds = starts[cell] < Infinity && firstOrder(cell, crossing) >= starts[cell];
    // The latest value replaces the one before: keeping the smaller would cost the second order.
    queue.offer(cell, holds ? starts[cell] : timeAt(cell, crossing));
  }

  for (let cell = 0; cell < cells; cell++)
    if (starts[cell] < Infinity && speed[cell] > 0) queue.offer(cell, starts[cell]);
  for (;;) {
    const time = queue.earliest();
    const cell = queue.take();
    if (cell < 0) return times;
    times[cell] = time;
    const column = cell % width;
    if (column > 0) reach(cell - 1);
    if (column < width - 1) reach(cell + 1);
    if (cell >= width) reach(cell - width);
    if (cell < cells - width) reach(cell + width);
  }
}

/** Time at a cell from its settled neighbours, given the years it takes to cross it. */
type TimeAt = (cell: number, crossing: number) => number;

/** (T − x)² + (T − y)² = crossing², with x and y the earlier neighbour on each axis; from one alone where the other is late. */
function firstOrderTime(times: Float64Array, width: number, height: number): TimeAt {
  const lastRow = width * (height - 1);
  return (cell, crossing) => {
    const column = cell % width;
    const x = Math.min(
      column > 0 ? times[cell - 1] : Infinity,
      column < width - 1 ? times[cell + 1] : Infinity,
    );
    const y = Math.min(
      cell >= width ? times[cell - width] : Infinity,
      cell < lastRow ? times[cell + width] : Infinity,
    );
    const apart = Math.abs(x - y);
    return apart < crossing
      ? (x + y + Math.sqrt(2 * crossing * crossing - apart * apart)) / 2
      : Math.min(x, y) + crossing;
  };
}

/**
 * The same with differences of second order, (3 T − 4 x + x') / 2, on each axis where the cell behind the neighbour
 * settled before it (Rickett & Fomel 1999, Stanford Exploration Project 100; Sethian 1999). Two starts at the same time
 * are a kink, over which that difference would come a third of a cell too early.
 */
function secondOrderTime(times: Float64Array, width: number, height: number): TimeAt {
  /** a and b of a difference a T − b along one axis; a is 0 where nothing settled */
  const alongRow = new Float64Array(2);
  const alongColumn = new Float64Array(2);

  /** Looks both ways along an axis, on which the cell stands at `place` of `length`. */
  function look(axis: Float64Array, cell: number, stride: number, place: number, length: number): void {
    const before = place > 0 ? times[cell - stride] : Infinity;
    const after = place < length - 1 ? times[cell + stride] : Infinity;
    const first = Math.min(before, after);
    axis[0] = first < Infinity ? 1 : 0;
    axis[1] = first;
    // Where both sides are as early, the one that grew later counts, whichever way the map lies.
    let behind = -Infinity;
    if (before === first && place > 1 && times[cell - 2 * stride] < first) behind = times[cell - 2 * stride];
    if (after === first && place < length - 2 && times[cell + 2 * stride] < first)
      behind = Math.max(behind, times[cell + 2 * stride]);
    if (behind === -Infinity) return;
    axis[0] = 1.5;
    axis[1] = 2 * first - 0.5 * behind;
  }

  return (cell, crossing) => {
    const column = cell % width;
    look(alongRow, cell, 1, column, width);
    look(alongColumn, cell, width, (cell - column) / width, height);
    const slopeX = alongRow[0];
    const x = alongRow[1];
    const slopeY = alongColumn[0];
    const y = alongColumn[1];
    if (slopeX === 0) return (y + crossing) / slopeY;
    if (slopeY === 0) return (x + crossing) / slopeX;
    const alone = Math.min((x + crossing) / slopeX, (y + crossing) / slopeY);
    // a T² − 2 b T + c = 0
    const a = slopeX * slopeX + slopeY * slopeY;
    const b = slopeX * x + slopeY * y;
    const c = x * x + y * y - crossing * crossing;
    const root = b * b - a * c;
    if (root < 0) return alone;
    const time = (b + Math.sqrt(root)) / a;
    // Growth must flow to the cell along both axes; else the front comes along one of them.
    return slopeX * time >= x && slopeY * time >= y ? time : alone;
  };
}
