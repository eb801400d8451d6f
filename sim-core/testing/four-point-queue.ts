/** Cells in order of time: a binary heap that knows where each cell stands, so that one can be moved. */
export interface ArrivalQueue {
  /** Takes in a cell at a time, or moves it there if it is in the queue. */
  offer(cell: number, time: number): void;
  /** time of the earliest cell, Infinity of nothing */
  earliest(): number;
  /** Takes out the earliest cell, or returns −1 of nothing. */
  take(): number;
}

/** @param cells how many there are on the map */
export function arrivalQueue(cells: number): ArrivalQueue {
  /** cells, each no earlier than the one at half its place, and their times beside them */
  let heap = new Int32Array(1024);
  let times = new Float64Array(1024);
  /** place of each cell in the heap, one more, 0 where it is not in it */
  const places = new Int32Array(cells);
  let count = 0;

  function put(cell: number, time: number, place: number): void {
    heap[place] = cell;
    times[place] = time;
    places[cell] = place + 1;
  }

  /** Puts the cell at `from` or nearer the front, moving later ones back. */
  function up(cell: number, time: number, from: number): void {
    let place = from;
    while (place > 0) {
      const parent = (place - 1) >> 1;
      if (times[parent] <= time) break;
      put(heap[parent], times[parent], place);
      place = parent;
    }
    put(cell, time, place);
  }

  /** Puts the cell at `from` or further back, moving earlier ones to the front. */
  function down(cell: number, time: number, from: number): void {
    let place = from;
    for (let child = 2 * place + 1; child < count; child = 2 * place + 1) {
      if (child + 1 < count && times[child + 1] < times[child]) child++;
      if (times[child] >= time) break;
      put(heap[child], times[child], place);
      place = child;
    }
    put(cell, time, place);
  }

  function grow(): void {
    const [larger, largerTimes] = [new Int32Array(2 * count), new Float64Array(2 * count)];
    larger.set(heap);
    largerTimes.set(times);
    [heap, times] = [larger, largerTimes];
  }

  return {
    offer(cell, time) {
      const place = places[cell] - 1;
      if (place < 0) {
        if (count === heap.length) grow();
        up(cell, time, count++);
      } else if (time < times[place]) up(cell, time, place);
      else down(cell, time, place);
    },
    earliest: () => (count > 0 ? times[0] : Infinity),
    take() {
      if (count === 0) return -1;
      const first = heap[0];
      places[first] = 0;
      count--;
      if (count > 0) down(heap[count], times[count], 0);
      return first;
    },
  };
}
