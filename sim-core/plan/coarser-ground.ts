import type { Grid } from '#sim-core/grid/grid.ts';
import type { QuickLookInput } from './quick-look.ts';

/** Most cells that many looks are taken at, one after the other. */
const mostCells = 250_000;

/**
 * The same site on cells so much larger that there are at most 250,000: a block of cells becomes one, which holds the
 * mean of their capacity and cover, and the mean of the vigour and refuge of those that can hold the plant. Obstacles
 * thinner than a block let growth through. Speeds stay those on the site's own cells.
 */
export function coarserGround<Input extends QuickLookInput>(input: Input): Input {
  const { grid, ground } = input;
  const side = Math.ceil(Math.sqrt((grid.width * grid.height) / mostCells));
  if (side <= 1) return input;
  const [width, height] = [Math.ceil(grid.width / side), Math.ceil(grid.height / side)];
  const coarse: Grid = { ...grid, width, height, cellSize: grid.cellSize * side };
  const cells = width * height;
  const sums = {
    capacity: new Float64Array(cells),
    cover: new Float64Array(cells),
    vigour: new Float64Array(cells),
    refuge: new Float64Array(cells),
  };
  const growing = new Uint32Array(cells);
  for (let row = 0; row < grid.height; row++)
    for (let column = 0; column < grid.width; column++) {
      const cell = row * grid.width + column;
      if (ground.capacity[cell] === 0) continue;
      const block = Math.floor(row / side) * width + Math.floor(column / side);
      growing[block]++;
      sums.capacity[block] += ground.capacity[cell];
      sums.cover[block] += ground.cover[cell];
      sums.vigour[block] += ground.vigour[cell];
      sums.refuge[block] += ground.refuge[cell];
    }
  const all = side * side;
  const bytes = (sum: Float64Array, of: (block: number) => number) =>
    Uint8Array.from(sum, (value, block) => (value > 0 ? Math.max(1, Math.round(value / of(block))) : 0));
  return {
    ...input,
    grid: coarse,
    growthCellSize: grid.cellSize,
    ground: {
      capacity: bytes(sums.capacity, () => all),
      vigour: bytes(sums.vigour, (block) => growing[block]),
      refuge: bytes(sums.refuge, (block) => growing[block]),
      cover: Float32Array.from(sums.cover, (value) => value / all),
    },
  };
}
