import { demoClasses, habitatValue } from './classes.ts';
import { drawCreeks, farAway, type CreekField } from './creeks.ts';
import { heightField } from './heights.ts';
import { refugeField, scatterSurveyedMounds, type SurveyedMound } from './mounds.ts';
import { hash, randomStream, rough } from './noise.ts';

/** Value of `cover` where the survey saw water. */
export const coverNoData = -9999;

export interface Landscape {
  /** one class a cell, see `habitatValue` */
  readonly habitat: Uint8Array;
  /** share of the cell that is covered, 0..1, or `coverNoData` */
  readonly cover: Float32Array;
  /** strength of the refuge, 0..1 */
  readonly refuge: Float32Array;
  /** m above an invented datum */
  readonly elevation: Float32Array;
  readonly mounds: readonly SurveyedMound[];
  /** whether the ground at a point was laid bare by the die-off */
  readonly bareAt: (x: number, y: number) => boolean;
}

/** Where plants died, as soft blobs: centre, radii along x and y, m. North, west and east pan, and a lobe in the south-east. */
const blobs: readonly (readonly [x: number, y: number, radiusX: number, radiusY: number])[] = [
  [110, 6, 80, 36],
  [230, 30, 96, 56],
  [296, 84, 52, 52],
  [374, 22, 46, 38],
  [20, 150, 52, 40],
  [62, 236, 98, 66],
  [124, 146, 44, 34],
  [36, 330, 74, 52],
  [120, 300, 46, 30],
  [560, 40, 86, 60],
  [604, 104, 62, 72],
  [536, 132, 44, 46],
  [616, 312, 62, 66],
];

/**
 * The invented landscape on width × height cells of 1 m: creeks, their banks and levees, the platform, three pans where
 * plants died, and what outlived it on mounds and in patches.
 */
export function makeLandscape(width: number, height: number, seed: number): Landscape {
  const creeks = drawCreeks(width, height, seed);
  const dieOff = dieOffField(width, height, creeks, seed);
  const habitat = classify(width, height, creeks, dieOff, seed);
  const cellOf = (x: number, y: number) =>
    Math.min(height - 1, Math.floor(y)) * width + Math.min(width - 1, Math.floor(x));
  const bareAt = (x: number, y: number) => dieOff[cellOf(x, y)] > 0.04;
  const mounds = scatterSurveyedMounds(width, height, seed + 31, {
    count: 78,
    apart: 17,
    bare: bareAt,
    dry: (x, y) => creeks.edgeDistance[cellOf(x, y)] > 4,
  });
  const refuge = refugeField(width, height, mounds, seed + 32);
  const cover = growCover(width, height, { creeks, dieOff, habitat, mounds, seed });
  const elevation = heightField(width, height, creeks, habitat, seed + 81);
  return { habitat, cover, refuge, elevation, mounds, bareAt };
}

/** Above 0 where plants died; about 0.1 deeper every 6 m. Creeks drained their surroundings, and plants there lived. */
function dieOffField(width: number, height: number, creeks: CreekField, seed: number): Float32Array {
  const field = new Float32Array(width * height);
  for (let row = 0, cell = 0; row < height; row++)
    for (let column = 0; column < width; column++, cell++) {
      const x = column + 14 * rough(seed + 21, column, row, 64, 2);
      const y = row + 14 * rough(seed + 22, column, row, 64, 2);
      let depth = -1;
      for (const [cx, cy, rx, ry] of blobs) {
        const d = 1 - Math.sqrt(((x - cx) / rx) ** 2 + ((y - cy) / ry) ** 2);
        // A soft maximum, so that neighbouring blobs flow together.
        const k = Math.max(0, 0.3 - Math.abs(depth - d)) / 0.3;
        depth = Math.max(depth, d) + k * k * 0.075;
      }
      const reach =
        (6 + 10 * Math.min(1, creeks.width[cell] / 5)) * (1 + 0.7 * rough(seed + 25, column, row, 9, 2));
      const drained = Math.max(0, reach - creeks.edgeDistance[cell]) / reach;
      const texture =
        0.22 * rough(seed + 23, column, row, 42, 4) + 0.1 * rough(seed + 24, column, row, 15, 3);
      field[cell] = depth + texture - 0.9 * drained - 0.02;
    }
  return field;
}

function classify(
  width: number,
  height: number,
  { edgeDistance, width: creekWidth }: CreekField,
  dieOff: Float32Array,
  seed: number,
): Uint8Array {
  const habitat = new Uint8Array(width * height);
  for (let row = 0, cell = 0; row < height; row++)
    for (let column = 0; column < width; column++, cell++) {
      const wobble = rough(seed + 41, column, row, 6, 2);
      const distance = edgeDistance[cell] + 0.7 * wobble;
      const big = Math.min(1, creekWidth[cell] / 9);
      const islet = distance < -6.5 && rough(seed + 42, column, row, 22, 3) > 0.2;
      habitat[cell] =
        distance < 0 && !islet
          ? habitatValue.creek
          : islet || distance < 0.8 + 1.6 * big
            ? habitatValue.bank
            : distance < farAway &&
                distance < 1 + 8.5 * big + 2.5 * rough(seed + 43, column, row, 15, 2) &&
                big > 0.25
              ? habitatValue.levee
              : dieOff[cell] > -0.12 + 0.08 * rough(seed + 44, column, row, 12, 3)
                ? habitatValue.high
                : habitatValue.low;
    }
  return habitat;
}

interface GrowthInput {
  readonly creeks: CreekField;
  readonly dieOff: Float32Array;
  readonly habitat: Uint8Array;
  readonly mounds: readonly SurveyedMound[];
  readonly seed: number;
}

/** Standing marsh about 0.5 to 0.9, thinning towards the pans; nothing on the pans but remnants and stray tufts. */
function growCover(
  width: number,
  height: number,
  { creeks, dieOff, habitat, mounds, seed }: GrowthInput,
): Float32Array {
  const cover = new Float32Array(width * height);
  const capacity = new Map(demoClasses.map((c) => [c.value, c.capacity]));
  const remnants = remnantField(width, height, mounds, dieOff, seed);
  for (let row = 0, cell = 0; row < height; row++)
    for (let column = 0; column < width; column++, cell++) {
      if (habitat[cell] === habitatValue.creek) {
        cover[cell] = coverNoData;
        continue;
      }
      const grain = hash(seed + 51, column, row) - 0.5;
      const sward =
        0.72 +
        0.17 * rough(seed + 52, column, row, 34, 3) +
        0.1 * rough(seed + 53, column, row, 5, 2) +
        0.16 * grain;
      const byCreek = 0.1 * Math.max(0, 1 - creeks.edgeDistance[cell] / 14);
      const edge = Math.min(1, Math.max(0, -(dieOff[cell] + 0.06 * grain) / 0.1));
      let share = edge * (sward + byCreek) * (habitat[cell] === habitatValue.bank ? 0.75 : 1);
      share = Math.max(share, remnants[cell] * (sward - 0.05));
      // A stray tuft now and then, more of them near what stands.
      if (
        dieOff[cell] > 0 &&
        hash(seed + 54, column, row) < 0.0006 + 0.004 * Math.max(0, 1 - dieOff[cell] / 0.1)
      )
        share = Math.max(share, 0.1 + 0.3 * hash(seed + 55, column, row));
      // Below 2 % nothing is seen from the air.
      cover[cell] = share < 0.02 ? 0 : Math.min(share, 0.97 * (capacity.get(habitat[cell]) ?? 0));
    }
  return cover;
}

/** 0..1 where plants outlived the die-off on the pans: on living mounds and in a few irregular patches. */
function remnantField(
  width: number,
  height: number,
  mounds: readonly SurveyedMound[],
  dieOff: Float32Array,
  seed: number,
): Float32Array {
  const field = new Float32Array(width * height);
  const random = randomStream(seed + 61);
  const patches = mounds.filter((m) => m.alive).map(({ x, y, radius }) => ({ x, y, radius: radius * 0.95 }));
  for (let tries = 0, made = 0; tries < 4000 && made < 9; tries++) {
    const [x, y, size] = [random() * width, random() * height, random()];
    const depth = dieOff[Math.floor(y) * width + Math.floor(x)];
    if (depth < 0.16 || patches.some((p) => p.radius > 4 && (p.x - x) ** 2 + (p.y - y) ** 2 < 60 ** 2))
      continue;
    patches.push({ x, y, radius: 5 + 8 * size * size });
    made++;
  }
  for (const { x, y, radius } of patches)
    for (let row = Math.max(0, Math.floor(y - 2 * radius)); row < Math.min(height, y + 2 * radius); row++)
      for (
        let column = Math.max(0, Math.floor(x - 2 * radius));
        column < Math.min(width, x + 2 * radius);
        column++
      ) {
        const distance = Math.sqrt((column + 0.5 - x) ** 2 + (row + 0.5 - y) ** 2);
        const reach = radius * (1 + 0.55 * rough(seed + 62, column, row, Math.max(4, radius), 3));
        const cell = row * width + column;
        field[cell] = Math.max(field[cell], Math.min(1, Math.max(0, (reach - distance) / 1.5)));
      }
  return field;
}
