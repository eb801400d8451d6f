import type { Grid } from '#sim-core/grid/grid.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import { runSpecSchema, type Action, type RunSpec } from '#sim-core/spec/run-spec.ts';

/** A strip of invented marsh for the sign-in page: cells of 1 m, a place that is nowhere. */
export const pictureGrid: Grid = {
  width: 164,
  height: 384,
  cellSize: 1,
  originX: 0,
  originY: 384,
  epsg: 32631,
};
export const pictureYears = { survey: 2026, last: 2060, shown: [2026, 2034, 2042] as const };

interface Spot {
  column: number;
  row: number;
}

/** A fixed number in 0..1 for a place: the same picture on every visit. */
function lattice(x: number, y: number, salt: number): number {
  let h = Math.imul(x, 0x27d4eb2f) ^ Math.imul(y, 0x165667b1) ^ Math.imul(salt, 0x9e3779b1);
  h = Math.imul(h ^ (h >>> 15), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return ((h ^ (h >>> 16)) >>> 0) / 4294967296;
}

/** Smooth noise in 0..1 whose lumps are `size` cells across. */
function lumps(column: number, row: number, size: number, salt: number): number {
  const x = column / size;
  const y = row / size;
  const [x0, y0] = [Math.floor(x), Math.floor(y)];
  const ease = (t: number) => t * t * (3 - 2 * t);
  const [u, v] = [ease(x - x0), ease(y - y0)];
  const at = (i: number, j: number) => lattice(x0 + i, y0 + j, salt);
  return (at(0, 0) * (1 - u) + at(1, 0) * u) * (1 - v) + (at(0, 1) * (1 - u) + at(1, 1) * u) * v;
}

/** How well the drought was survived, 0..1. */
const survived = (column: number, row: number) =>
  0.62 * lumps(column, row, 74, 3) + 0.28 * lumps(column, row, 31, 5) + 0.1 * lumps(column, row, 9, 8);
const stands = (column: number, row: number) => survived(column, row) > 0.55;

/** One spot in each square of `spacing` cells, shifted, on ground that died. */
function scattered(spacing: number, salt: number): Spot[] {
  const spots: Spot[] = [];
  for (let j = 0; j * spacing < pictureGrid.height; j++)
    for (let i = 0; i * spacing < pictureGrid.width; i++) {
      const column = Math.floor((i + 0.15 + 0.7 * lattice(i, j, salt)) * spacing);
      const row = Math.floor((j + 0.15 + 0.7 * lattice(j, i, salt + 1)) * spacing);
      const inside = column > 5 && row > 16 && column < pictureGrid.width - 9 && row < pictureGrid.height - 5;
      if (inside && !stands(column, row)) spots.push({ column, row });
    }
  return spots;
}

const apart = (a: Spot, b: Spot) => Math.hypot(a.column - b.column, a.row - b.row);

/** Where plants outlived the drought on old mounds, and where people plan new ones. */
export const survivors = scattered(37, 11);
export const planned = scattered(33, 23).filter((p) => survivors.every((s) => apart(s, p) > 13));

/** The spot that lies nearest to a place. */
export const nearest = (spots: readonly Spot[], place: Spot): Spot =>
  spots.reduce((best, spot) => (apart(spot, place) < apart(best, place) ? spot : best));

/** The ground as surveyed in the first year: stands, bare mud, survivors on mounds. */
export function pictureGround(): Ground {
  const { width, height } = pictureGrid;
  const cells = width * height;
  const cover = new Float32Array(cells);
  const refuge = new Uint8Array(cells);
  const share = (column: number, row: number) => 0.72 + 0.28 * lumps(column, row, 17, 40);
  for (let row = 0; row < height; row++)
    for (let column = 0; column < width; column++)
      if (stands(column, row)) cover[row * width + column] = share(column, row);
  for (const survivor of survivors)
    for (let row = survivor.row - 2; row <= survivor.row + 2; row++)
      for (let column = survivor.column - 2; column <= survivor.column + 2; column++)
        if (apart(survivor, { column, row }) <= 2) {
          refuge[row * width + column] = 255;
          cover[row * width + column] = share(column, row);
        }
  return {
    capacity: new Uint8Array(cells).fill(255),
    vigour: new Uint8Array(cells).fill(255),
    exposure: new Uint8Array(cells),
    fence: new Uint8Array(cells),
    refuge,
    cover,
  };
}

/** Ordinary years, and two of drought that kill what has no shelter. */
function droughtIndex(): number[] {
  return Array.from({ length: pictureYears.last - pictureYears.survey }, (_, i) => {
    const year = pictureYears.survey + 1 + i;
    if (year === 2049 || year === 2050) return -3.9;
    return Math.round((2.4 * lattice(year, 1, 71) - 1.2) * 10) / 10;
  });
}

/** Mounds with plants on them, half of them a year later. */
function works(): Action[] {
  return planned.flatMap(({ column, row }, i): Action[] => {
    const year = pictureYears.survey + 1 + (i % 2);
    const x = pictureGrid.originX + column + 0.5;
    const y = pictureGrid.originY - row - 0.5;
    return [
      { kind: 'mound', year, x, y, radius: 2.5, strength: 1, halo: 0 },
      { kind: 'planting', year, area: { shape: 'disc', x, y, radius: 2.5 }, cover: 0.8 },
    ];
  });
}

/** The run behind the picture; its layers are the ground above. */
export function pictureSpec(): RunSpec {
  const { survey, shown } = pictureYears;
  return runSpecSchema.parse({
    version: 1,
    seed: 'sign-in',
    surveyYear: pictureYears.survey,
    years: pictureYears.last - pictureYears.survey,
    rates: { lateralSpread: 1.5 },
    droughtIndex: droughtIndex(),
    actions: works(),
    // Every year up to the last moment, so that the picture grows as the run proceeds.
    reportYears: Array.from({ length: shown[2] - survey + 1 }, (_, i) => survey + i),
    layers: { cover: 0 },
  });
}
