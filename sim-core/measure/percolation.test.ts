import { describe, expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import { measureCover } from './cover-measures.ts';

/**
 * The patch labelling, which joins 8 neighbours, against what is known of random maps. On a square grid 4-neighbour
 * patches of habitat and 8-neighbour patches of gap decide each other, so one labelling is tested by the laws of both.
 */

interface Map2 {
  readonly width: number;
  readonly height: number;
  readonly habitat: Uint8Array;
}
const draw = (size: number, share: number, random: () => number): Map2 => ({
  width: size,
  height: size,
  habitat: Uint8Array.from({ length: size * size }, () => (random() < share ? 1 : 0)),
});
const gapOf = ({ habitat, ...size }: Map2): Map2 => ({ ...size, habitat: habitat.map((h) => 1 - h) });
const patches8 = ({ width, height, habitat }: Map2) =>
  measureCover(Float32Array.from(habitat), width, height).patches;

/** A map with room around it, filled with 0 or 1. */
function framed({ width, height, habitat }: Map2, { sides = 0, rows = 0, sideFill = 0 }): Map2 {
  const framedWidth = width + 2 * sides;
  const cells = new Uint8Array(framedWidth * (height + 2 * rows));
  for (let y = 0; y < height + 2 * rows; y++) {
    for (let s = 0; s < sides; s++)
      cells[y * framedWidth + s] = cells[(y + 1) * framedWidth - 1 - s] = sideFill;
    if (y >= rows && y < height + rows)
      cells.set(habitat.subarray((y - rows) * width, (y - rows + 1) * width), y * framedWidth + sides);
  }
  return { width: framedWidth, height: height + 2 * rows, habitat: cells };
}

/** N − joins + full 2 × 2 blocks = 4-neighbour patches − their holes (Euler). */
function euler({ width, height, habitat }: Map2): number {
  let sum = 0;
  for (let y = 0; y < height; y++)
    for (let x = 0; x < width; x++) {
      const i = y * width + x;
      if (!habitat[i]) continue;
      const [right, below] = [x + 1 < width && habitat[i + 1], y + 1 < height && habitat[i + width]];
      sum += 1 - (right ? 1 : 0) - (below ? 1 : 0) + (right && below && habitat[i + width + 1] ? 1 : 0);
    }
  return sum;
}

/** 4-neighbour patches, from the 8-neighbour patches of the gap: all but the outer one are holes. */
const patches4 = (map: Map2) => euler(map) + patches8(gapOf(framed(map, { sides: 1, rows: 1 }))) - 1;

/** Whether 8-neighbour habitat joins the left side to the right: then a bar between the sides joins nothing new. */
function spans8(map: Map2): boolean {
  const sided = framed(map, { sides: 1, rows: 2, sideFill: 1 });
  const barred = { ...sided, habitat: sided.habitat.slice() };
  barred.habitat.fill(1, 0, sided.width);
  return patches8(sided) === patches8(barred);
}
/** Whether 4-neighbour habitat joins the top to the bottom: unless 8-neighbour gap joins the sides. */
const spans4 = (map: Map2) => !spans8(gapOf(map));

describe('expected patches with free edges, by running through every map', () => {
  // Computed by enumeration with scipy.ndimage.label.
  test.each([
    [2, 2, 0.5, 1.0625, 0.9375],
    [3, 3, 0.5, 1.751953125, 1.28125],
    [3, 3, 0.3, 1.652445927, 1.30527],
    [4, 3, 0.5, 2.1291503906, 1.44140625],
  ])('%i × %i at %f', (width, height, p, of4, of8) => {
    const cells = width * height;
    let sum4 = 0;
    let sum8 = 0;
    for (let code = 0; code < 2 ** cells; code++) {
      const habitat = Uint8Array.from({ length: cells }, (_, i) => (code >> i) & 1);
      const held = habitat.reduce((a, b) => a + b, 0);
      const chance = p ** held * (1 - p) ** (cells - held);
      sum4 += chance * patches4({ width, height, habitat });
      sum8 += chance * patches8({ width, height, habitat });
    }
    expect(sum4).toBeCloseTo(of4, 9);
    expect(sum8).toBeCloseTo(of8, 9);
  });
});

test('the matching law, p − 2p² + p⁴ a cell: 4-neighbour patches less the gap’s 8-neighbour patches', () => {
  // Sykes & Essam 1964, J. Math. Phys. 5:1117. On the torus it is exact in the mean; here each map, and the gap around
  // it, has free edges, over which p is once, joins twice 2 L (L − 1) and blocks (L − 1)² times.
  const random = stream('matching', 'parameters');
  const size = 200;
  for (const [p, law] of [
    [0.1, 0.0801],
    [0.3, 0.1281],
    [0.5, 0.0625],
    [0.7, -0.0399],
    [0.8, -0.0704],
  ]) {
    const map = draw(size, p, random);
    // The 8-neighbour patches of the gap that the frame does not touch are the holes.
    const holes = patches8(gapOf(framed(map, { sides: 1, rows: 1 }))) - 1;
    const found = patches4By(map) - holes;
    const free = size ** 2 * p - 2 * size * (size - 1) * p ** 2 + (size - 1) ** 2 * p ** 4;
    expect(p - 2 * p ** 2 + p ** 4).toBeCloseTo(law, 10);
    expect(found).toBe(euler(map));
    expect(Math.abs(found - free) / size ** 2).toBeLessThan(0.006);
  }
});

/** 4-neighbour patches by flooding each, which knows nothing of the labelling or of Euler. */
function patches4By({ width, height, habitat }: Map2): number {
  const left = habitat.slice();
  let patches = 0;
  for (let start = 0; start < left.length; start++) {
    if (!left[start]) continue;
    patches++;
    const queue = [start];
    left[start] = 0;
    for (let i = queue.pop(); i !== undefined; i = queue.pop()) {
      const x = i % width;
      for (const [next, within] of [
        [i - 1, x > 0],
        [i + 1, x < width - 1],
        [i - width, i >= width],
        [i + width, i < width * (height - 1)],
      ] as const)
        if (within && left[next]) {
          left[next] = 0;
          queue.push(next);
        }
    }
  }
  return patches;
}

test('single cells that stand alone: p q⁸ a cell', () => {
  // Stauffer & Aharony, Introduction to Percolation Theory. A lone cell is one patch less when it is taken out.
  const random = stream('lone', 'parameters');
  const map = draw(300, 0.3, random);
  let lone = 0;
  for (let y = 1; y < 299; y++)
    for (let x = 1; x < 299; x++) {
      const i = y * 300 + x;
      const around = [-301, -300, -299, -1, 1, 299, 300, 301].every((d) => !map.habitat[i + d]);
      if (map.habitat[i] && around) {
        lone++;
        map.habitat[i] = 0;
      }
    }
  expect(Math.abs(lone / 298 ** 2 - 0.017294)).toBeLessThan(0.002);
  const before = patches8(map);
  expect(before).toBeGreaterThan(1000);
  expect(patches8(draw(300, 0.3, stream('lone', 'parameters')))).toBe(before + lone);
});

describe('random habitat spans from about 0.5927 on, with 4 neighbours; from 0.4073 on, with 8', () => {
  // Newman & Ziff 2000, Phys. Rev. Lett. 85:4104; half the maps span at the threshold (Cardy 1992, J. Phys. A 25:L201).
  const threshold = 0.59274605;
  const maps = 400;
  const size = 64;
  const frequency = (p: number, spans: (map: Map2) => boolean, seed: string) => {
    const random = stream(seed, 'parameters');
    let spanning = 0;
    for (let i = 0; i < maps; i++) if (spans(draw(size, p, random))) spanning++;
    return spanning / maps;
  };
  test.each([
    ['4 neighbours', spans4, threshold],
    ['8 neighbours', spans8, 1 - threshold],
  ] as const)('%s', (name, spans, p) => {
    // Four standard errors of a half are 0.1; maps of this size are within 0.03 of a half.
    expect(Math.abs(frequency(p, spans, name) - 0.5)).toBeLessThan(0.12);
    expect(frequency(p - 0.05, spans, name)).toBeLessThan(0.1);
    expect(frequency(p + 0.05, spans, name)).toBeGreaterThan(0.9);
  });
});
