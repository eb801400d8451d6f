import type { Action, Mound } from '#sim-core/spec/run-spec.ts';
import { cellAt, cellCentre } from '#sim-core/grid/grid.ts';
import { demoGrid, demoMounds } from '#rasters/demo/sallow-reach.ts';

export interface DemoOption {
  name: string;
  works: Action[];
}

type Point = { x: number; y: number };

/** A mound 3 m across that shelters a metre around it; the first half are laid in 2027, the others in 2028. */
const moundAt = ({ x, y }: Point, i: number, all: readonly Point[]): Mound => ({
  kind: 'mound',
  year: i < all.length / 2 ? 2027 : 2028,
  x,
  y,
  radius: 1.5,
  strength: 1,
  halo: 1,
});

/** Mounds with the plants that are set on each: a refuge shelters what stands on it, but nothing grows from bare shell. */
const plantedMounds = (places: readonly Point[]): Action[] => {
  const mounds = places.map(moundAt);
  const plants = mounds.map(({ year, x, y, radius }): Action => ({
    kind: 'planting',
    year,
    area: { shape: 'disc', x, y, radius },
    cover: 0.8,
  }));
  return [...mounds, ...plants];
};

/** Seven clumps close together, those of them that fall on the site. */
const clumpsAround = ({ x, y }: Point): Action[] =>
  [
    [0, 0],
    [-5, 3],
    [0, -7],
    [4, 5],
    [-6, -4],
    [6, -2],
    [-2, 7],
  ]
    .map(([dx, dy]) => ({ x: x + dx, y: y + dy }))
    .filter((place) => cellAt(demoGrid, place.x, place.y))
    .map((place) => ({
      kind: 'planting',
      year: 2027,
      area: { shape: 'disc', ...place, radius: 1.2 },
      cover: 0.6,
    }));

/**
 * The options of the demo beside Wait.
 * @param cover the surveyed cover as it was read, row-major on the demo's grid; water is below 0
 */
export function demoOptions(cover: ArrayLike<number>): DemoOption[] {
  const scattered = demoMounds();
  return [
    { name: '40 mounds, scattered', works: plantedMounds(scattered) },
    { name: '40 mounds, along the edge', works: plantedMounds(edgePlaces(cover, 40, 24)) },
    {
      name: 'Clumped planting',
      works: scattered.filter((_, i) => i % 4 === 0).flatMap(clumpsAround),
    },
  ];
}

/** Bare cells next to standing plants, at least `apart` metres from each other, spread over the whole edge. */
function edgePlaces(cover: ArrayLike<number>, count: number, apart: number): Point[] {
  const { width, height } = demoGrid;
  const edge: Point[] = [];
  for (let row = 2; row < height - 2; row++)
    for (let column = 2; column < width - 2; column++) {
      const cell = row * width + column;
      if (cover[cell] !== 0) continue;
      const beside = [cell - 2, cell + 2, cell - 2 * width, cell + 2 * width];
      if (beside.some((near) => cover[near] > 0.4)) edge.push(cellCentre(demoGrid, column, row));
    }
  const places: Point[] = [];
  // A stride that shares no factor with most lengths visits the edge all over rather than from the north down.
  for (let i = 0; i < edge.length && places.length < count; i++) {
    const place = edge[(i * 7919) % edge.length];
    if (places.every(({ x, y }) => Math.hypot(x - place.x, y - place.y) >= apart)) places.push(place);
  }
  return places;
}
