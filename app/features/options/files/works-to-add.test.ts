import { expect, it } from 'vitest';
import type { Work, WorkSet } from '#contract/works.ts';
import { worksToAdd } from './works-to-add.ts';

const mound = (id: string, x: number, set?: string): Work => ({
  ...{ kind: 'mound', id, set, year: 2027, x, y: 5, radius: 1, strength: 1, halo: 0 },
});
const set = (id: string): WorkSet => ({ id, laid: { pattern: 'grid', seed: '1', parameters: {} } });

it('adds what is not there yet, leaves out what stands just alike, and gives new ids to what was changed', () => {
  const { works, alike } = worksToAdd({ works: [mound('a', 1), mound('b', 2), mound('c', 3)], sets: [] }, [
    mound('a', 1),
    mound('b', 20),
  ]);
  expect(alike).toBe(1);
  expect(works.map((work) => work.kind === 'mound' && work.x)).toEqual([2, 3]);
  expect(works[0].id).not.toBe('b');
  expect(works[1].id).toBe('c');
});

it('keeps a set together under an id that the drawing does not use', () => {
  const { works, sets } = worksToAdd({ works: [mound('x', 1, 's'), mound('y', 2, 's')], sets: [set('s')] }, [
    mound('a', 9, 's'),
  ]);
  expect(sets[0].id).not.toBe('s');
  expect(works.map((work) => work.set)).toEqual([sets[0].id, sets[0].id]);
});
