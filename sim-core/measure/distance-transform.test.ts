import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { distanceTo } from './distance-transform.ts';

const drawn = (...rows: string[]) => Uint8Array.from(rows.join(''), (c) => (c === '#' ? 1 : 0));

describe('distance to the nearest marked cell', () => {
  test('scipy.ndimage.distance_transform_edt(marked == 0) (SciPy 1.17.1) of a small map', () => {
    const map = drawn('#....', '.....', '...#.', '.....');
    expect(Array.from(distanceTo(map, 5, 4), (d) => Number(d.toFixed(6)))).toEqual([
      0, 1, 2, 2, 2.236068, 1, 1.414214, 1.414214, 1, 1.414214, 2, 2, 1, 0, 1, 3, 2.236068, 1.414214, 1,
      1.414214,
    ]);
  });
  test('nothing marked is infinitely far', () => {
    expect([...distanceTo(new Uint8Array(6), 3, 2)]).toEqual(Array(6).fill(Infinity));
  });
  test('equals the search over all cells', () => {
    const maps = fc.integer({ min: 1, max: 9 }).chain((width) =>
      fc.integer({ min: 1, max: 9 }).chain((height) =>
        fc.record({
          width: fc.constant(width),
          height: fc.constant(height),
          map: fc.uint8Array({ min: 0, max: 1, minLength: width * height, maxLength: width * height }),
        }),
      ),
    );
    fc.assert(
      fc.property(maps, ({ map, width, height }) => {
        const found = distanceTo(map, width, height);
        map.forEach((_, cell) => {
          let nearest = Infinity;
          map.forEach((mark, other) => {
            if (!mark) return;
            const across = (cell % width) - (other % width);
            const down = Math.floor(cell / width) - Math.floor(other / width);
            nearest = Math.min(nearest, Math.hypot(across, down));
          });
          expect(found[cell]).toBeCloseTo(nearest, 5);
        });
      }),
    );
  });
});
