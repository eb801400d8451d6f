/** Points in square buckets, so that what is near a place is found without looking at all of them. */
export interface PointBuckets<Point> {
  /** Calls `see` for every point of the buckets within `reach` of a place, m, and so for some that lie farther. */
  near(x: number, y: number, reach: number, see: (point: Point) => void): void;
}

/** Points a bucket holds on average. */
const usual = 4;

export function pointBuckets<Point extends { readonly x: number; readonly y: number }>(
  points: readonly Point[],
): PointBuckets<Point> {
  let [west, south, east, north] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const { x, y } of points) {
    west = Math.min(west, x);
    east = Math.max(east, x);
    south = Math.min(south, y);
    north = Math.max(north, y);
  }
  const [wide, high] = [Math.max(east - west, 1e-6), Math.max(north - south, 1e-6)];
  const side = Math.max(
    Math.sqrt((wide * high * usual) / Math.max(1, points.length)),
    Math.max(wide, high) / 1000,
  );
  const columns = Math.floor(wide / side) + 1;
  const rows = Math.floor(high / side) + 1;
  const buckets = new Map<number, Point[]>();
  const columnOf = (x: number) => Math.floor((x - west) / side);
  const rowOf = (y: number) => Math.floor((y - south) / side);
  for (const point of points) {
    const key = rowOf(point.y) * columns + columnOf(point.x);
    const bucket = buckets.get(key);
    if (bucket) bucket.push(point);
    else buckets.set(key, [point]);
  }
  return {
    near(x, y, reach, see) {
      if (points.length === 0) return;
      const right = Math.min(columns - 1, columnOf(x + reach));
      const top = Math.min(rows - 1, rowOf(y + reach));
      for (let row = Math.max(0, rowOf(y - reach)); row <= top; row++)
        for (let column = Math.max(0, columnOf(x - reach)); column <= right; column++)
          buckets.get(row * columns + column)?.forEach(see);
    },
  };
}
