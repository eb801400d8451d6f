import fc from 'fast-check';
import { expect, test } from 'vitest';
import { measureCover } from './cover-measures.ts';

const map = (rows: string[]) => ({
  cover: Float32Array.from(rows.join(''), (c) => (c === '1' ? 0.05 : 0.0499)),
  width: rows[0].length,
  height: rows.length,
});
const measure = (rows: string[]) => {
  const { cover, width, height } = map(rows);
  return measureCover(cover, width, height);
};

test('a worked map: 13 cells, 5 patches of 8 neighbours, 27 inner sides', () => {
  // SciPy: scipy.ndimage.label(map, numpy.ones((3, 3))) gives 5 patches of 4, 4, 3, 1 and 1 cells.
  const found = measure(['110001', '100100', '001100', '010001', '000011', '100010']);
  expect(found).toMatchObject({ occupied: 13, patches: 5, largestPatch: 4, edges: 27 });
  expect(found.cover).toBeCloseTo(13 * 0.05 + 23 * 0.0499, 5);
});

test.each([
  ['a checkerboard', ['1010', '0101', '1010', '0101'], 1, 8],
  ['a diagonal', ['100', '010', '001'], 1, 3],
  ['the other diagonal', ['001', '010', '100'], 1, 3],
  ['a ring', ['111', '101', '111'], 1, 8],
  ['two arms that meet at the end', ['10001', '01010', '00100'], 1, 5],
  ['arms that meet thrice', ['1010101', '1010101', '1111111'], 1, 15],
  ['nothing', ['000', '000'], 0, 0],
  ['one column', ['1', '0', '1', '1'], 2, 2],
])('%s', (_, rows, patches, largestPatch) => {
  expect(measure(rows)).toMatchObject({ patches, largestPatch });
});

test('agrees with a flood fill on any map', () => {
  const flood = (cells: Uint8Array, width: number, height: number) => {
    const seen = cells.slice();
    const sizes: number[] = [];
    for (let start = 0; start < seen.length; start++) {
      if (!seen[start]) continue;
      const queue = [start];
      seen[start] = 0;
      let size = 0;
      for (let at = queue.pop(); at !== undefined; at = queue.pop()) {
        size++;
        for (let dy = -1; dy <= 1; dy++)
          for (let dx = -1; dx <= 1; dx++) {
            const x = (at % width) + dx;
            const y = Math.floor(at / width) + dy;
            if (x < 0 || y < 0 || x >= width || y >= height || !seen[y * width + x]) continue;
            seen[y * width + x] = 0;
            queue.push(y * width + x);
          }
      }
      sizes.push(size);
    }
    let edges = 0;
    cells.forEach((lives, at) => {
      if (at % width > 0 && lives !== cells[at - 1]) edges++;
      if (at >= width && lives !== cells[at - width]) edges++;
    });
    return { patches: sizes.length, largestPatch: Math.max(0, ...sizes), edges };
  };
  fc.assert(
    fc.property(
      fc
        .integer({ min: 1, max: 12 })
        .chain((width) =>
          fc
            .integer({ min: 1, max: 12 })
            .chain((height) =>
              fc
                .array(fc.constantFrom(0, 1), { minLength: width * height, maxLength: width * height })
                .map((cells) => ({ width, height, cells: Uint8Array.from(cells) })),
            ),
        ),
      ({ width, height, cells }) => {
        const found = measureCover(Float32Array.from(cells), width, height);
        expect(found).toMatchObject(flood(cells, width, height));
      },
    ),
    { seed: 5, numRuns: 500 },
  );
});
