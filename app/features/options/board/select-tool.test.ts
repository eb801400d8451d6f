// @vitest-environment node
import type { KeyboardEvent } from 'react';
import { expect, it } from 'vitest';
import type { Work } from '#contract/works.ts';
import type { MapPoint } from '#app/map/map-tool.ts';
import { selectTool, type Grip, type SelectContext } from './select-tool.ts';

const grid = { width: 100, height: 100, cellSize: 2, originX: 0, originY: 200, epsg: 32631 };
const mound = (id: string, x: number, y: number): Work => ({
  kind: 'mound',
  id,
  year: 2028,
  x,
  y,
  radius: 1,
  strength: 1,
  halo: 0,
});
const clumps: Work = { kind: 'clumps', id: 'c', year: 2028, each: 9, points: [[11, 11]] };
const fence: Work = {
  kind: 'fence',
  id: 'f',
  year: 2028,
  strength: 1,
  area: {
    shape: 'polygon',
    ring: [
      [50, 50],
      [80, 50],
      [80, 80],
      [50, 80],
    ],
  },
};
const works = [mound('a', 11, 11), clumps, mound('b', 31, 31), fence];

/** A tool whose context keeps what it is told; `tool()` is the tool as it is after that. */
function begin(more: Partial<SelectContext> = {}) {
  const said: string[] = [];
  const changed: Work[][] = [];
  const state: Record<string, unknown> & { selected: ReadonlySet<string>; grip?: Grip; corner?: number } = {
    selected: new Set<string>(),
  };
  const tool = () =>
    selectTool({
      ...{ grid, works, surveyed: [{ id: 's0', x: 5, y: 5, kind: 'surveyed' }], shown: undefined },
      ...{ editable: true, snap: false, boxes: false },
      selected: state.selected,
      grip: state.grip,
      corner: state.corner,
      setGrip: (grip) => (state.grip = grip),
      setCorner: (corner) => (state.corner = corner),
      select: (ids) => (state.selected = new Set(ids)),
      selectBox: (from, to, added) => said.push(`box ${from.join()} ${to.join()} ${added}`),
      onSurveyed: (id, kept) => said.push(`surveyed ${id} ${kept}`),
      change: (next, step) => {
        changed.push([...next]);
        if (step) said.push(step);
        return true;
      },
      remove: () => said.push('remove'),
      copy: () => said.push('copy'),
      ...more,
    });
  const at = (x: number, y: number, id?: string, shift = false): MapPoint => ({
    ...{ x, y, id, shift },
    cell: { column: 0, row: 0 },
    metresPerPixel: 0.1,
  });
  const key = (name: string, modifiers: Partial<KeyboardEvent> = {}) =>
    tool().key?.({ key: name, ...modifiers } as KeyboardEvent, undefined);
  return { tool, at, key, state, said, changed };
}

it('selects what is pressed, with Shift several, and a mound with what is planted on it as one', () => {
  const { tool, at, state } = begin();
  tool().press?.(at(11, 11, 'a'));
  tool().press?.(at(31, 31, 'b', true));
  expect([...state.selected]).toEqual(['a', 'b']);
  state.selected = new Set(['a', 'c', 'b']);
  tool().press?.(at(11, 11, 'c', true));
  expect([...state.selected]).toEqual(['b']);
  tool().press?.(at(1, 1));
  expect(state.selected.size).toBe(0);
});

it('drags what is held, with what belongs to it, and lets the map move elsewhere', () => {
  const { tool, at, state, changed } = begin();
  expect(tool().grab?.(at(1, 1))).toBe(false);
  expect(tool().grab?.(at(11, 11, 'a'))).toBe(true);
  tool().drag?.(at(14, 12, 'a'));
  expect(state.grip).toMatchObject({ kind: 'works', by: [3, 1] });
  state.selected = new Set();
  tool().drop?.(at(15, 13));
  expect(changed[0]).toMatchObject([
    { id: 'a', x: 15, y: 13 },
    { id: 'c', points: [[15, 13]] },
  ]);
  expect(state.grip).toBeUndefined();
});

it('puts a mound into the middle of a cell where it snaps', () => {
  const { tool, at, changed } = begin({ snap: true });
  tool().grab?.(at(11, 11, 'a'));
  tool().drop?.(at(14.3, 12.2));
  expect(changed[0][0]).toMatchObject({ x: 15, y: 13 });
});

it('moves nothing for those who only look', () => {
  const { tool, at, key, state, said } = begin({ editable: false });
  expect(tool().grab?.(at(11, 11, 'a'))).toBe(false);
  state.selected = new Set(['a']);
  expect([key('ArrowRight'), key('Delete'), key('d', { ctrlKey: true })]).toEqual([false, false, false]);
  expect(said).toEqual([]);
});

it('spans a box by a drag with Shift, and by two presses where every press spans one', () => {
  const shifted = begin();
  shifted.tool().grab?.(shifted.at(1, 1, undefined, true));
  shifted.tool().drop?.(shifted.at(40, 40, undefined, true));
  expect(shifted.said).toEqual(['box 1,1 40,40 true']);
  const boxes = begin({ boxes: true });
  boxes.tool().press?.(boxes.at(2, 2));
  boxes.tool().point?.(boxes.at(9, 9));
  expect(boxes.state.grip).toMatchObject({ kind: 'box', to: [9, 9] });
  boxes.tool().press?.(boxes.at(30, 30));
  expect(boxes.said).toEqual(['box 2,2 30,30 false']);
});

it('reshapes an outline by its corners: pulled, added in a side, walked by keys and taken away', () => {
  const { tool, at, key, state, changed, said } = begin();
  state.selected = new Set(['f']);
  expect(tool().grab?.(at(50.2, 50.2))).toBe(true);
  tool().drop?.(at(45, 45));
  expect(changed[0]).toMatchObject([
    {
      area: {
        ring: [
          [45, 45],
          [80, 50],
          [80, 80],
          [50, 80],
        ],
      },
    },
  ]);
  tool().grab?.(at(65, 50));
  tool().drop?.(at(65, 40));
  expect(changed[1][0]).toMatchObject({ area: { ring: { length: 5 } } });
  expect(key('v')).toEqual({ x: 50, y: 50 });
  expect(key('v')).toEqual({ x: 80, y: 50 });
  key('ArrowDown');
  expect(changed[2][0]).toMatchObject({
    area: {
      ring: [
        [50, 50],
        [80, 48],
        [80, 80],
        [50, 80],
      ],
    },
  });
  expect(said).toEqual(['corner f/1']);
  key('Delete');
  expect(changed[3][0]).toMatchObject({ area: { ring: { length: 3 } } });
  expect(state.corner).toBeUndefined();
});

it('finds works and surveyed footholds one after the other by N, a planted mound once', () => {
  const { key, state, said } = begin();
  const walk = ['n', 'n', 'n'].map((name) => {
    key(name);
    return [...state.selected].join();
  });
  expect(walk).toEqual(['a', 'b', 'f']);
  key('n');
  expect(said).toEqual(['surveyed s0 false']);
  key('n', { shiftKey: true });
  expect([...state.selected]).toEqual(['b']);
});

it('pushes by cells, removes, copies, selects all and lets go by keys', () => {
  const { key, state, changed, said } = begin();
  key('a', { ctrlKey: true });
  expect(state.selected.size).toBe(4);
  state.selected = new Set(['b']);
  expect(key('ArrowLeft', { shiftKey: true })).toEqual(expect.objectContaining({ x: 11, y: 31 }));
  expect(changed[0]).toMatchObject([{ id: 'b', x: 11, y: 31 }]);
  key('d', { ctrlKey: true });
  key('Delete');
  expect(said).toEqual(['push b', 'copy', 'remove']);
  key('Escape');
  expect(state.selected.size).toBe(0);
  expect(key('Escape')).toBe(false);
});

it('says of a surveyed foothold that it stays', () => {
  const { key, said } = begin({ shown: 's0' });
  key('Delete');
  expect(said).toEqual(['surveyed s0 true']);
});
