import type { APIRequestContext } from '@playwright/test';
import type { WorkInput } from '#contract/works.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { inventedSite } from '../e2e/invented-site.ts';

export const side = 500;
export const years = 40;
export const optionsBesideWait = 2;

/** Places every so many metres, from the upper left corner on. */
const lattice = ({ originX, originY, width, height }: Grid, every: number): [number, number][] => {
  const points: [number, number][] = [];
  for (let y = every / 2; y < height; y += every)
    for (let x = every / 2; x < width; x += every) points.push([originX + x, originY - y]);
  return points;
};

/** An invented site of 500 × 500 cells: remnants of 8 m every 60 m, and two options that plant between them. */
export const largeSite = (request: APIRequestContext, teamId: string) =>
  inventedSite(request, teamId, {
    name: 'Measured Marsh',
    side,
    years,
    cover: (column, row) => (column % 60 < 8 && row % 60 < 8 ? 0.8 : 0),
    options: [
      ['Some clumps', 50],
      ['Many clumps', 25],
    ].map(([name, every]) => ({
      name: String(name),
      works: (grid): WorkInput[] => [
        { kind: 'clumps', year: 2027, points: lattice(grid, Number(every)), each: 6 },
      ],
    })),
  });
