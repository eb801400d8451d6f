import { hash, randomStream, rough } from './noise.ts';

/** A low mound that was there at the survey, m east and south of the north-western corner. */
export interface SurveyedMound {
  readonly x: number;
  readonly y: number;
  readonly radius: number;
  readonly strength: number;
  /** whether plants on it outlived the die-off */
  readonly alive: boolean;
}

/**
 * About `count` mounds at least `apart` metres from each other, more of them on bare ground, where they are found.
 * @param bare whether the ground at a point is bare; `dry` whether it is no creek
 */
export function scatterSurveyedMounds(
  width: number,
  height: number,
  seed: number,
  { count, apart, bare, dry }: { count: number; apart: number; bare: PointTest; dry: PointTest },
): SurveyedMound[] {
  const random = randomStream(seed);
  const mounds: SurveyedMound[] = [];
  for (let tries = 0; tries < 20_000 && mounds.length < count; tries++) {
    const x = random() * width;
    const y = random() * height;
    const keep = random();
    const [size, strength, luck] = [random(), random(), random()];
    if (!dry(x, y) || (!bare(x, y) && keep > 0.25)) continue;
    if (mounds.some((m) => near(m, x, y, apart))) continue;
    mounds.push({ x, y, radius: 1.5 + 1.5 * size, strength: 0.75 + 0.25 * strength, alive: luck < 0.9 });
  }
  return mounds;
}

export type PointTest = (x: number, y: number) => boolean;

const near = (m: { x: number; y: number }, x: number, y: number, apart: number): boolean =>
  (m.x - x) ** 2 + (m.y - y) ** 2 < apart * apart;

/** Strength of the refuge 0..1 in each cell: a dome on every mound, gone at its foot. */
export function refugeField(
  width: number,
  height: number,
  mounds: readonly SurveyedMound[],
  seed: number,
): Float32Array {
  const refuge = new Float32Array(width * height);
  for (const { x, y, radius, strength } of mounds)
    for (let row = Math.max(0, Math.floor(y - 5)); row < Math.min(height, y + 5); row++)
      for (let column = Math.max(0, Math.floor(x - 5)); column < Math.min(width, x + 5); column++) {
        const distance = Math.sqrt((column + 0.5 - x) ** 2 + (row + 0.5 - y) ** 2);
        const foot = radius * (1 + 0.25 * rough(seed, column, row, 3, 2)) + 0.5;
        const slope = Math.min(1, Math.max(0, (foot - distance) / (0.6 * foot)));
        const cell = row * width + column;
        refuge[cell] = Math.max(refuge[cell], strength * slope * slope * (3 - 2 * slope));
      }
  return refuge;
}

/**
 * About `count` points on ground that passes `allowed`, at least `apart` metres from each other and as evenly spread as
 * a hundred throws a point make them.
 */
export function scatterPoints(
  width: number,
  height: number,
  seed: number,
  { count, apart, allowed }: { count: number; apart: number; allowed: PointTest },
): { x: number; y: number }[] {
  const points: { x: number; y: number }[] = [];
  for (let k = 0; k < count; k++) {
    let best: { x: number; y: number } | undefined;
    let bestRoom = apart * apart;
    for (let tries = 0; tries < 100; tries++) {
      const x = Math.floor(hash(seed, k * 100 + tries, 1) * width) + 0.5;
      const y = Math.floor(hash(seed, k * 100 + tries, 2) * height) + 0.5;
      if (!allowed(x, y)) continue;
      const room = points.reduce((least, p) => Math.min(least, (p.x - x) ** 2 + (p.y - y) ** 2), Infinity);
      if (room >= bestRoom) [best, bestRoom] = [{ x, y }, room];
      if (points.length === 0) break;
    }
    if (best) points.push(best);
  }
  return points;
}
