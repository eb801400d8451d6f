import { arrivalBuckets } from './arrival-buckets.ts';

export interface ArrivalFieldInput {
  readonly width: number;
  readonly height: number;
  /** years that growth takes through each cell, row-major; Infinity is an obstacle that nothing enters */
  readonly crossing: Float32Array;
  /** years after which nothing is of interest: what arrives later counts as never */
  readonly latest: number;
}

/** Cells whose time changed, and the time that each had; valid until the next change. */
export interface ArrivalChange {
  readonly count: number;
  /** the first `count` are meant */
  readonly cells: Int32Array;
  readonly before: Float32Array;
}

/** Arrival times that are kept up while starts and ground change, cell by cell. */
export interface ArrivalField {
  /** years until growth reaches a cell's centre, Infinity where it does not by `latest` */
  time(cell: number): number;
  /** years at which growth starts in a cell, Infinity where it does not; counts from the next `update` on */
  setStart(cell: number, years: number): void;
  start(cell: number): number;
  /**
   * Ground that grows faster from a year on: the years through the cell are `crossing` from `from` on, and those that
   * the map was made with before. Infinity takes it back. Counts from the next `update` on. Nothing on an obstacle.
   */
  setFaster(cell: number, crossing: number, from: number): void;
  /** Brings the times up to what was set, working on nothing but the cells that it changes and their borders. */
  update(): ArrivalChange;
  /** Puts the times back that the last `update` changed, and the starts and ground that were set for it. */
  rollBack(): void;
}

/** What is noted of a cell, bit by bit. */
const [queued, noted, touched, faster] = [1, 2, 4, 8];

/**
 * Arrival times on eight triangles a cell: the front comes to a cell's centre over the line between a neighbour beside it
 * and the one at the corner next to that, in a straight way, at the cell's own speed (the eight-point scheme of
 * Tsitsiklis 1995, IEEE Transactions on Automatic Control 40:1528–1538, from memory; with a quarter of the error of four
 * points on the diagonals, since each triangle spans half the angle). Nothing slips through a corner between two
 * obstacles.
 *
 * The scheme is monotone (earlier neighbours never make a later cell), so its solution is unique, in whatever order the
 * cells come: a change of starts or ground can be worked in to the last bit of what a solve from scratch gives. What a
 * lost start held up is found first (each cell is asked whether it stands without the cells lost so far), then the times
 * flow in again from the border and from what is new.
 *
 * @throws RangeError where the ground has another size than the map
 */
export function arrivalField({ width, height, crossing: given, latest }: ArrivalFieldInput): ArrivalField {
  if (given.length !== width * height)
    throw new RangeError(
      `Found ${given.length} crossings; expected ${width} × ${height} = ${width * height}`,
    );
  // All arrays have a border of obstacles one cell wide, so that every cell has eight neighbours.
  const row = width + 2;
  const cells = row * (height + 2);
  const times = new Float32Array(cells).fill(Infinity);
  const starts = new Float32Array(cells).fill(Infinity);
  const crossing = new Float32Array(cells).fill(Infinity);
  let shortest = Infinity;
  for (let y = 0; y < height; y++)
    for (let x = 0; x < width; x++) {
      const years = given[y * width + x];
      if (!(years > 0)) throw new RangeError(`Found a crossing of ${years} years; expected more than 0`);
      crossing[(y + 1) * row + x + 1] = years;
      if (years < shortest) shortest = years;
    }
  const notes = new Uint8Array(cells);
  /** of the cells noted as faster: years through them, and from when on */
  const fasterCrossing = new Map<number, number>();
  const fasterFrom = new Map<number, number>();
  const padded = (cell: number) => {
    const y = (cell / width) | 0;
    return cell + 2 * y + row + 1;
  };
  const bare = (cell: number) => {
    const y = (cell / row) | 0;
    return cell - 2 * y - width - 1;
  };

  // A cell cannot make another earlier than this after it, so the cells of one bucket never wait on each other.
  const buckets = arrivalBuckets(latest, shortest < Infinity ? shortest * Math.SQRT1_2 : latest);

  let changed = new Int32Array(1024);
  let before = new Float32Array(1024);
  let count = 0;
  let asked: number[] = [];
  /** what was set since the last update, to be put back: cell, start, faster crossing, from */
  let undone: [cell: number, start: number, crossing: number | undefined, from: number | undefined][] = [];
  let setSince = false;

  function note(cell: number): void {
    if (notes[cell] & noted) return;
    notes[cell] |= noted;
    if (count === changed.length) {
      const [more, moreBefore] = [new Int32Array(2 * count), new Float32Array(2 * count)];
      more.set(changed);
      moreBefore.set(before);
      [changed, before] = [more, moreBefore];
    }
    changed[count] = cell;
    before[count++] = times[cell];
  }

  /** Earliest way to a cell through the side neighbour a and the earlier of the corners beside it, at c years a cell. */
  function over(a: number, corner: number, c: number): number {
    if (!(corner < a)) return a + c;
    const ahead = a - corner;
    return ahead < c * Math.SQRT1_2 ? a + Math.sqrt(c * c - ahead * ahead) : corner + Math.SQRT2 * c;
  }
  function through(cell: number, c: number): number {
    const nw = times[cell - row - 1];
    const ne = times[cell - row + 1];
    const sw = times[cell + row - 1];
    const se = times[cell + row + 1];
    let least = Infinity;
    if (crossing[cell - 1] < Infinity) least = over(times[cell - 1], Math.min(nw, sw), c);
    if (crossing[cell + 1] < Infinity) least = Math.min(least, over(times[cell + 1], Math.min(ne, se), c));
    if (crossing[cell - row] < Infinity)
      least = Math.min(least, over(times[cell - row], Math.min(nw, ne), c));
    if (crossing[cell + row] < Infinity)
      least = Math.min(least, over(times[cell + row], Math.min(sw, se), c));
    return least;
  }
  /** Time at a cell from its neighbours' times, or its start. */
  function solve(cell: number): number {
    const c = crossing[cell];
    if (c === Infinity) return Infinity;
    let time = through(cell, c);
    if (notes[cell] & faster) time = hurried(cell, time, through(cell, fasterCrossing.get(cell)!));
    time = Math.fround(Math.min(time, starts[cell]));
    return time <= latest ? time : Infinity;
  }
  /** Slow until the ground turns fast; what is under way by then arrives no sooner than that. */
  function hurried(cell: number, slow: number, fast: number): number {
    const from = fasterFrom.get(cell)!;
    return slow > from ? Math.max(from, fast) : slow;
  }

  function settle(cell: number, time: number): void {
    note(cell);
    times[cell] = time;
    notes[cell] |= queued;
    buckets.push(cell, time);
  }
  function offer(cell: number, given: number): void {
    let time = given;
    if (notes[cell] & faster) time = solve(cell);
    time = Math.fround(time);
    if (time < times[cell] && time <= latest) settle(cell, time);
  }

  /** Lets a cell at time t improve the neighbour beside it, together with the corners on either side. */
  function beside(cell: number, t: number, one: number, other: number): void {
    const c = crossing[cell];
    if (c === Infinity || !(times[cell] > t)) return;
    offer(cell, over(t, Math.min(times[one], times[other]), c));
  }
  /** … and the neighbour at its corner, together with the cells beside both. */
  function across(cell: number, t: number, one: number, other: number): void {
    const c = crossing[cell];
    // Over a corner no way is shorter than one cell.
    if (c === Infinity || !(times[cell] > t)) return;
    const a = crossing[one] < Infinity ? times[one] : NaN;
    const b = crossing[other] < Infinity ? times[other] : NaN;
    let least = Infinity;
    if (a > t) least = over(a, t, c);
    if (b > t) least = Math.min(least, over(b, t, c));
    if (least < Infinity) offer(cell, least);
  }

  function flow(): void {
    for (let cell = buckets.take(); cell >= 0; cell = buckets.take()) {
      if (!(notes[cell] & queued)) continue;
      notes[cell] &= ~queued;
      const t = times[cell];
      const [n, s, w, e] = [cell - row, cell + row, cell - 1, cell + 1];
      beside(w, t, n, s);
      beside(e, t, n, s);
      beside(n, t, w, e);
      beside(s, t, w, e);
      across(n - 1, t, n, w);
      across(n + 1, t, n, e);
      across(s - 1, t, s, w);
      across(s + 1, t, s, e);
    }
  }

  /** Takes the time from a cell that no longer stands, and from all that stood on it. */
  function lose(first: number): void {
    const stack = [first];
    const was = [times[first]];
    drop(first);
    for (let cell = stack.pop(); cell !== undefined; cell = stack.pop()) {
      const t = was.pop()!;
      for (let y = -row; y <= row; y += row)
        for (let x = -1; x <= 1; x++) {
          const other = cell + y + x;
          const time = times[other];
          if (time > t && time < Infinity && solve(other) > time) {
            stack.push(other);
            was.push(time);
            drop(other);
          }
        }
    }
  }
  const dropped: number[] = [];
  function drop(cell: number): void {
    note(cell);
    times[cell] = Infinity;
    dropped.push(cell);
  }

  function ask(cell: number): void {
    if (!setSince) {
      setSince = true;
      undone = [];
    }
    undone.push([cell, starts[cell], fasterCrossing.get(cell), fasterFrom.get(cell)]);
    if (notes[cell] & touched) return;
    notes[cell] |= touched;
    asked.push(cell);
  }
  function makeFaster(cell: number, years: number | undefined, from: number | undefined): void {
    if (years === undefined || from === undefined || years === Infinity) {
      notes[cell] &= ~faster;
      fasterCrossing.delete(cell);
      fasterFrom.delete(cell);
      return;
    }
    notes[cell] |= faster;
    fasterCrossing.set(cell, years);
    fasterFrom.set(cell, from);
  }

  return {
    time: (cell) => times[padded(cell)],
    start: (cell) => starts[padded(cell)],
    setStart(cell, years) {
      const at = padded(cell);
      if (starts[at] === Math.fround(years)) return;
      ask(at);
      starts[at] = years;
    },
    setFaster(cell, years, from) {
      const at = padded(cell);
      if (crossing[at] === Infinity) return;
      if (
        years === Infinity
          ? !(notes[at] & faster)
          : fasterCrossing.get(at) === years && fasterFrom.get(at) === from
      )
        return;
      ask(at);
      makeFaster(at, years, from);
    },
    update() {
      for (let i = 0; i < count; i++) notes[changed[i]] &= ~noted;
      count = 0;
      if (!setSince) undone = [];
      setSince = false;
      for (const cell of asked) {
        notes[cell] &= ~touched;
        if (solve(cell) > times[cell]) lose(cell);
      }
      for (const cell of dropped) improve(cell);
      for (const cell of asked) improve(cell);
      dropped.length = 0;
      asked = [];
      flow();
      return { count, cells: changed.subarray(0, count).map(bare), before };
    },
    rollBack() {
      for (let i = 0; i < count; i++) {
        times[changed[i]] = before[i];
        notes[changed[i]] &= ~noted;
      }
      count = 0;
      for (const [cell, start, years, from] of undone.reverse()) {
        starts[cell] = start;
        makeFaster(cell, years, from);
      }
      undone = [];
    },
  };

  function improve(cell: number): void {
    const time = solve(cell);
    if (time < times[cell]) settle(cell, time);
  }
}
