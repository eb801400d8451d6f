import { expect, it } from 'vitest';
import type { Feature } from './features.ts';
import { featureCautions, moundCaution } from './grid-cautions.ts';

const grid = (cellSize: number) => ({
  width: 120 / cellSize,
  height: 120 / cellSize,
  cellSize,
  originX: 412_200,
  originY: 5_301_900,
  epsg: 32631,
});
const refuges = (edges: Feature['edges']) =>
  Array.from({ length: 18 }, (_, i) => ({
    kind: 'refuge' as const,
    edges,
    shape: {
      shape: 'disc' as const,
      x: 412_208.3 + 17.37 * (i % 6),
      y: 5_301_888.1 - 23.71 * Math.floor(i / 6),
      radius: 2,
    },
  }));

it('says where places are narrower than two cells, and what their area becomes where edges go by the centre', () => {
  expect(featureCautions(refuges('centre'), grid(1))).toEqual([]);
  const [narrow, area, ...more] = featureCautions(refuges('centre'), grid(4));
  expect(narrow).toContain('18 of 18 surveyed refuges are narrower than two cells of 4 m');
  expect(area).toMatch(/take [\d,]+ m² on cells of 4 m, \d+ % (more|less) than the 226 m² that are drawn/);
  expect(more).toEqual([]);
  expect(featureCautions(refuges('shared'), grid(4))).toEqual([
    expect.stringContaining('the area holds but the outline does not show'),
  ]);
});

it('says it of a mound before it is placed, and where it stands with its area', () => {
  expect(moundCaution({ radius: 1.5 }, grid(1))).toBeUndefined();
  expect(moundCaution({ radius: 1.5 }, grid(4))).toBe(
    'A mound 3 m across is narrower than two cells of 4 m: what it takes hangs on how it falls on the cells.',
  );
  // Right on a centre it takes the whole cell.
  expect(moundCaution({ radius: 1.5, x: 412_210, y: 5_301_890 }, grid(4))).toMatch(
    /it takes 16 m² there, 126 % more than its 7(\.\d+)? m²\.$/,
  );
});
