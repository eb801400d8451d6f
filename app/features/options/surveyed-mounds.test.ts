// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { surveyedMounds } from './surveyed-mounds.ts';

const grid = { width: 6, height: 4, cellSize: 2, originX: 100, originY: 50, epsg: 32631 };
const drawn = (text: string, values: Record<string, number>) =>
  Uint8Array.from([...text.replace(/\s/g, '')].map((mark) => values[mark]));

describe('surveyedMounds', () => {
  const values = { '.': 0, w: 127, o: 128, X: 255 };
  it('finds each patch of strong refuge once, at the middle of its strongest cells', () => {
    const refuge = drawn(
      `.oo..X
       oXXo..
       .oo..w
       ......`,
      values,
    );
    expect(surveyedMounds(grid, refuge)).toEqual([
      { x: 104, y: 47, cells: 8 },
      { x: 111, y: 49, cells: 1 },
    ]);
  });
  it('joins cells that touch at a corner and leaves weak ones out', () => {
    expect(surveyedMounds(grid, drawn('X.....\n.X....\n......\n......', values))).toHaveLength(1);
    expect(surveyedMounds(grid, drawn('wwwwww\n......\n......\n......', values))).toEqual([]);
  });
  it('keeps the largest where there are too many', () => {
    const refuge = drawn('X.XX..\n......\n......\n......', values);
    expect(surveyedMounds(grid, refuge, 1)).toEqual([{ x: 106, y: 49, cells: 2 }]);
  });
});
