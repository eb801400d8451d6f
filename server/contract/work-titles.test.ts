import { expect, it } from 'vitest';
import { copyName, freeName, workTitles } from './work-titles.ts';
import type { Work } from './works.ts';

const mound = (id: string, x: number, name?: string): Work => ({
  ...{ kind: 'mound', id, name, year: 2027, x, y: 5, radius: 1, strength: 1, halo: 0 },
});
const clumps = (id: string, x: number): Work => ({
  ...{ kind: 'clumps', id, year: 2027, points: [[x, 5]], each: 9 },
});

it('numbers each kind by itself, and names what is planted on a mound after it', () => {
  const works = [mound('a', 1), clumps('b', 1), mound('c', 2), clumps('d', 2), clumps('e', 9), mound('f', 3)];
  expect([...workTitles(works).entries()].sort().map(([, title]) => title)).toEqual([
    'Mound 1',
    'Clumps on Mound 1',
    'Mound 2',
    'Clumps on Mound 2',
    'Clumps 1',
    'Mound 3',
  ]);
});

it('takes the smallest number that is free, past those that are given as names', () => {
  const titles = workTitles([
    mound('a', 1, 'Mound 1'),
    mound('b', 2),
    mound('c', 3, 'Corner'),
    mound('d', 4),
  ]);
  expect([...titles.values()]).toEqual(['Mound 1', 'Mound 2', 'Corner', 'Mound 3']);
});

it('finds free names for options and their copies', () => {
  expect(freeName('Option', ['Option 1', 'Option 3'])).toBe('Option 2');
  expect(copyName('Reed', [])).toBe('Reed (copy)');
  expect(copyName('Reed (copy)', ['Reed (copy)'])).toBe('Reed (copy 2)');
  expect(copyName('x'.repeat(100), [])).toHaveLength(100);
});
