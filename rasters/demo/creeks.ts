import { randomStream, rough } from './noise.ts';

/** A point on a creek's centre line, m east and south of the site's north-western corner, and the creek's width there, m. */
type CreekPoint = readonly [x: number, y: number, width: number];

/** Drawn by hand for the invented site, each from its mouth upstream. */
const drawnCreeks: readonly (readonly CreekPoint[])[] = [
  // Sallow Creek, from the southern edge, and on to the eastern one
  [
    [412, 400, 34],
    [410, 345, 28],
    [407, 305, 17],
    [428, 272, 14],
    [452, 250, 13],
    [478, 222, 13],
    [508, 200, 12],
    [552, 186, 12],
    [592, 204, 14],
    [620, 196, 16],
    [660, 204, 18],
  ],
  // the western arm and its forks
  [
    [470, 230, 9],
    [436, 218, 8],
    [404, 212, 6.5],
    [372, 200, 5],
    [346, 182, 4],
    [332, 160, 2.8],
    [329, 138, 1.4],
  ],
  [
    [404, 212, 5],
    [420, 186, 4.2],
    [428, 160, 3.6],
    [412, 132, 3],
    [386, 112, 2.6],
    [362, 104, 2.2],
    [346, 78, 1.6],
    [338, 62, 1],
  ],
  [
    [436, 218, 4],
    [452, 192, 3.2],
    [452, 164, 2.4],
    [470, 142, 1.5],
  ],
  [
    [372, 200, 3.4],
    [382, 226, 2.6],
    [376, 252, 1.5],
  ],
  // a creek of its own in the south
  [
    [520, 400, 9],
    [514, 362, 6.5],
    [502, 334, 4.6],
    [508, 308, 3.2],
    [520, 286, 1.6],
  ],
  [
    [502, 334, 3.2],
    [484, 322, 2.2],
    [474, 304, 1.2],
  ],
  // and one in the south-west
  [
    [268, 400, 7],
    [262, 360, 5],
    [244, 334, 3.4],
    [250, 308, 2.2],
    [238, 288, 1.2],
  ],
];

/** What creeks mean for each cell. */
export interface CreekField {
  /** distance to the nearest creek's edge, m; negative in the water; `farAway` beyond reach */
  readonly edgeDistance: Float32Array;
  /** width of that creek, m */
  readonly width: Float32Array;
}

export const farAway = 60;

/** Draws all creeks onto width × height cells of 1 m. */
export function drawCreeks(width: number, height: number, seed: number): CreekField {
  const field = {
    edgeDistance: new Float32Array(width * height).fill(farAway),
    width: new Float32Array(width * height),
  };
  const random = randomStream(seed);
  const lines = drawnCreeks.map(refine);
  const drawn = lines.length;
  for (const line of lines.slice(0, drawn)) lines.push(...growTwigs(line, lines, random, 26, 30));
  for (const line of lines.slice(drawn)) lines.push(...growTwigs(line, lines, random, 15, 12));
  for (const [x, y, w] of lines.flat()) stamp(field, width, height, meander(seed, x, y), w);
  return field;
}

/** Points every half metre or so on the Catmull–Rom curve through the drawn ones. */
function refine(points: readonly CreekPoint[]): CreekPoint[] {
  const line: CreekPoint[] = [];
  for (let k = 0; k + 1 < points.length; k++) {
    const [p0, p1, p2, p3] = [
      points[Math.max(k - 1, 0)],
      points[k],
      points[k + 1],
      points[Math.min(k + 2, points.length - 1)],
    ];
    const length = Math.sqrt((p2[0] - p1[0]) ** 2 + (p2[1] - p1[1]) ** 2);
    const steps = Math.ceil(length * 2);
    const at = (axis: 0 | 1 | 2, t: number) =>
      p1[axis] +
      (t / 2) *
        (p2[axis] -
          p0[axis] +
          t *
            (2 * p0[axis] -
              5 * p1[axis] +
              4 * p2[axis] -
              p3[axis] +
              t * (3 * (p1[axis] - p2[axis]) + p3[axis] - p0[axis])));
    for (let s = 0; s < steps; s++) {
      const t = s / steps;
      line.push([at(0, t), at(1, t), p1[2] + t * (p2[2] - p1[2])]);
    }
  }
  return line;
}

/** Short side creeks, by turns left and right, that run out into the marsh and end before they would meet another creek. */
function growTwigs(
  line: readonly CreekPoint[],
  others: readonly (readonly CreekPoint[])[],
  random: () => number,
  spacing: number,
  length: number,
): CreekPoint[][] {
  const twigs: CreekPoint[][] = [];
  let side = random() < 0.5 ? -1 : 1;
  for (
    let k = Math.floor(2 * spacing * (0.4 + random()));
    k + 4 < line.length;
    k += Math.floor(2 * spacing * (0.5 + random()))
  ) {
    const [x, y, w] = line[k];
    const [nextX, nextY] = line[k + 4];
    let [dx, dy] = unit(nextX - x - side * (nextY - y), nextY - y + side * (nextX - x));
    const steps = Math.floor(2 * length * (0.5 + random()));
    const start = Math.min(2.4, Math.max(0.9, w * 0.5));
    const twig: CreekPoint[] = [];
    let [px, py] = [x, y];
    for (let s = 0; s < steps && !meets(px, py, line, others); s++) {
      twig.push([px, py, start * (1 - s / steps) + 0.7 * (s / steps)]);
      const turn = (random() - 0.5) * 0.22;
      [dx, dy] = unit(dx - turn * dy, dy + turn * dx);
      px += dx / 2;
      py += dy / 2;
    }
    twigs.push(twig);
    side = -side;
  }
  return twigs;
}

const meets = (
  x: number,
  y: number,
  own: readonly CreekPoint[],
  lines: readonly (readonly CreekPoint[])[],
): boolean =>
  lines.some((line) => line !== own && line.some(([px, py]) => (px - x) ** 2 + (py - y) ** 2 < 81));

const unit = (x: number, y: number): [number, number] => {
  const length = Math.sqrt(x * x + y * y) || 1;
  return [x / length, y / length];
};

/** Shifts a point by noise that depends on the place alone, so that creeks that meet still meet. */
const meander = (seed: number, x: number, y: number): [x: number, y: number] => [
  x + 17 * rough(seed + 11, x, y, 50, 3),
  y + 17 * rough(seed + 12, x, y, 50, 3),
];

function stamp(
  field: CreekField,
  width: number,
  height: number,
  [x, y]: [number, number],
  creekWidth: number,
): void {
  const reach = Math.min(farAway, creekWidth / 2 + 26);
  for (let row = Math.max(0, Math.floor(y - reach)); row < Math.min(height, y + reach); row++)
    for (let column = Math.max(0, Math.floor(x - reach)); column < Math.min(width, x + reach); column++) {
      const [dx, dy] = [column + 0.5 - x, row + 0.5 - y];
      const distance = Math.sqrt(dx * dx + dy * dy) - creekWidth / 2;
      const cell = row * width + column;
      if (distance < field.edgeDistance[cell]) {
        field.edgeDistance[cell] = distance;
        field.width[cell] = creekWidth;
      }
    }
}
