import fc from 'fast-check';
import { expect, it } from 'vitest';
import { cover, newCoverage } from './coverage.ts';

const corners = (x: number[], y: number[]) => {
  const out = newCoverage();
  cover(Float64Array.from(x), Float64Array.from(y), out);
  return out;
};
const shares = (c: ReturnType<typeof newCoverage>) => [...c.shares.subarray(0, c.width * c.height)];
const shoelace = (x: number[], y: number[]) =>
  Math.abs(x.reduce((sum, xi, i) => sum + xi * y[(i + 1) & 3] - x[(i + 1) & 3] * y[i], 0) / 2);

it('a rectangle covers whole cells wholly and others by their share', () => {
  const c = corners([0.5, 2.5, 2.5, 0.5], [0.25, 0.25, 1.5, 1.5]);
  expect([c.left, c.top, c.width, c.height]).toEqual([0, 0, 3, 2]);
  expect(shares(c)).toEqual([0.375, 0.75, 0.375, 0.25, 0.5, 0.25]);
});

it('a slanting piece, by hand', () => {
  const c = corners([0, 2, 3, -1], [0, 1, 3, 2]);
  expect([c.left, c.top, c.width, c.height]).toEqual([-1, 0, 4, 3]);
  expect(shares(c)).toEqual([0.25, 0.75, 0.25, 0, 0.75, 1, 1, 0.25, 0.125, 0.375, 0.625, 0.625]);
});

it('turning the other way round changes nothing', () => {
  const there = shares(corners([0.3, 2.2, 2.9, 0.1], [0.4, 0.2, 2.7, 2.2]));
  const back = shares(corners([0.1, 2.9, 2.2, 0.3], [2.2, 2.7, 0.2, 0.4]));
  expect(back.map((v) => v.toFixed(12))).toEqual(there.map((v) => v.toFixed(12)));
});

/** A piece of ground: a cell of the grid, turned, stretched and shifted as a projection might. */
const piece = fc
  .record({
    angle: fc.double({ min: -3.2, max: 3.2, noNaN: true }),
    width: fc.double({ min: 0.05, max: 12, noNaN: true }),
    height: fc.double({ min: 0.05, max: 12, noNaN: true }),
    x: fc.double({ min: -20, max: 20, noNaN: true }),
    y: fc.double({ min: -20, max: 20, noNaN: true }),
    bend: fc.double({ min: -0.2, max: 0.2, noNaN: true }),
  })
  .map(({ angle, width, height, x, y, bend }) => {
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    const at = (u: number, v: number) => [
      x + c * u * width - s * v * (height + bend * u * Math.min(width, height)),
      y + s * u * width + c * v * height,
    ];
    const points = [at(0, 0), at(1, 0), at(1, 1), at(0, 1)];
    return { x: points.map(([px]) => px), y: points.map(([, py]) => py) };
  });

it('covers its area, and no cell by less than nothing or more than wholly', () => {
  fc.assert(
    fc.property(piece, ({ x, y }) => {
      const c = corners(x, y);
      expect(Math.abs(c.area - shoelace(x, y))).toBeLessThan(1e-7);
      for (const share of shares(c)) {
        expect(share).toBeGreaterThanOrEqual(0);
        expect(share).toBeLessThan(1 + 1e-7);
      }
    }),
    { numRuns: 300 },
  );
});

it('counts as many of a cell’s points as lie in the piece', () => {
  fc.assert(
    fc.property(piece, ({ x, y }) => {
      const c = corners(x, y);
      const inside = (px: number, py: number) => {
        let turns = false;
        for (let i = 0, j = 3; i < 4; j = i++)
          if (y[i] > py !== y[j] > py && px < ((x[j] - x[i]) * (py - y[i])) / (y[j] - y[i]) + x[i])
            turns = !turns;
        return turns;
      };
      const n = 24;
      for (let row = 0; row < c.height; row++)
        for (let column = 0; column < c.width; column++) {
          let hits = 0;
          for (let i = 0; i < n * n; i++)
            if (inside(c.left + column + ((i % n) + 0.5) / n, c.top + row + (Math.floor(i / n) + 0.5) / n))
              hits++;
          // A line through a cell of n × n points misses it by about a point for every one it passes.
          expect(Math.abs(hits / n ** 2 - c.shares[row * c.width + column])).toBeLessThan(3 / n);
        }
    }),
    { numRuns: 25 },
  );
});
