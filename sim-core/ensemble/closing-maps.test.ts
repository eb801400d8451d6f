import { describe, expect, test } from 'vitest';
import { cannotClose, stillOpen } from '#sim-core/measure/closing.ts';
import { stream } from '#sim-core/random/streams.ts';
import { wholeBelow } from '#sim-core/random/whole.ts';
import { closingMaps } from './closing-maps.ts';

const years = [2020, 2021, 2022, 2023];

test('four replicates of four cells, by hand', () => {
  const maps = closingMaps(4, years);
  // by cell: closed at the survey; closes in half; closes once; cannot hold the plant
  maps.add(Int16Array.of(2020, 2021, stillOpen, cannotClose));
  maps.add(Int16Array.of(2020, 2023, stillOpen, cannotClose));
  maps.add(Int16Array.of(2020, stillOpen, 2022, cannotClose));
  maps.add(Int16Array.of(2020, stillOpen, stillOpen, cannotClose));
  expect([...maps.chanceBy(2020)]).toEqual([1, 0, 0, NaN]);
  expect([...maps.chanceBy(2022)]).toEqual([1, 0.25, 0.25, NaN]);
  expect([...maps.chanceBy(2023)]).toEqual([1, 0.5, 0.25, NaN]);
  expect([...maps.medianYear()]).toEqual([2020, 2023, stillOpen, cannotClose]);
  expect([...maps.restrictedMeanYear()]).toEqual([2020, 2022.5, 2022.75, NaN]);
  expect(() => maps.chanceBy(2024)).toThrow('2024 is not kept; the years are 2020, 2021, 2022, 2023');
  expect(() => maps.add(new Int16Array(3))).toThrow('Found 3 closing years; expected 4');
  expect(maps.count).toBe(4);
});

test('a cell that only some replicates can close counts as open in the others', () => {
  const maps = closingMaps(1, years);
  maps.add(Int16Array.of(cannotClose));
  maps.add(Int16Array.of(2021));
  expect([...maps.chanceBy(2023)]).toEqual([0.5]);
  expect([...maps.restrictedMeanYear()]).toEqual([2022]);
});

describe('against sorting all replicates', () => {
  const cells = 30;
  const random = stream('maps', 'parameters');
  const drawn = Array.from({ length: 700 }, () =>
    Int16Array.from({ length: cells }, (_, cell) => {
      const year = 2020 + wholeBelow(2 + cell, random);
      return year > 2040 ? stillOpen : year;
    }),
  );
  // 255 and 256: bytes run full; 700: more closings of a cell and year than a byte holds.
  test.each([1, 2, 255, 256, 257, 700])('%i of them', (count) => {
    const all = Array.from({ length: 21 }, (_, i) => 2020 + i);
    const maps = closingMaps(cells, all);
    for (const closing of drawn.slice(0, count)) maps.add(closing);
    const chance = all.map((year) => maps.chanceBy(year));
    const median = maps.medianYear();
    const mean = maps.restrictedMeanYear();
    for (let cell = 0; cell < cells; cell++) {
      const sorted = drawn.slice(0, count).map((c) => c[cell] || Infinity);
      sorted.sort((a, b) => a - b);
      all.forEach((year, y) =>
        expect(chance[y][cell]).toBe(Math.fround(sorted.filter((t) => t <= year).length / count)),
      );
      const lowerMedian = sorted[Math.ceil(count / 2) - 1];
      expect(median[cell]).toBe(lowerMedian === Infinity ? stillOpen : lowerMedian);
      const restricted = sorted.reduce((sum, t) => sum + Math.min(t, 2040), 0) / count;
      expect(Math.abs(mean[cell] - restricted)).toBeLessThan(2e-4);
    }
  });
  test('kept years alone: the same chances, the median to the kept year after it', () => {
    const kept = [2024, 2030, 2040];
    const [coarse, fine] = [
      closingMaps(cells, kept),
      closingMaps(
        cells,
        Array.from({ length: 21 }, (_, i) => 2020 + i),
      ),
    ];
    for (const closing of drawn) {
      coarse.add(closing);
      fine.add(closing);
    }
    for (const year of kept) expect(coarse.chanceBy(year)).toEqual(fine.chanceBy(year));
    const exact = fine.medianYear();
    coarse
      .medianYear()
      .forEach((year, cell) =>
        expect(year).toBe(exact[cell] === stillOpen ? stillOpen : kept.find((k) => k >= exact[cell])),
      );
  });
});

test('years that are not in order are refused', () => {
  expect(() => closingMaps(1, [])).toThrow(RangeError);
  expect(() => closingMaps(1, [2021, 2020])).toThrow('ascending');
});

test('goes on from its counts as if it had never stopped', () => {
  const random = stream('stopped', 'parameters');
  const drawn = Array.from({ length: 300 }, () =>
    Int16Array.from({ length: 9 }, () => [cannotClose, stillOpen, 2020, 2021, 2023][wholeBelow(5, random)]),
  );
  const whole = closingMaps(9, years);
  drawn.forEach((closing) => whole.add(closing));
  for (const stop of [1, 200, 270]) {
    const first = closingMaps(9, years);
    drawn.slice(0, stop).forEach((closing) => first.add(closing));
    const second = closingMaps(9, years, structuredClone(first.counts()));
    drawn.slice(stop).forEach((closing) => second.add(closing));
    expect(second.count).toBe(300);
    expect(second.medianYear()).toEqual(whole.medianYear());
    expect(second.chanceBy(2022)).toEqual(whole.chanceBy(2022));
  }
  expect(() => closingMaps(8, years, whole.counts())).toThrow(/another map/);
  expect(() => closingMaps(9, [2020], whole.counts())).toThrow(/other years/);
});
