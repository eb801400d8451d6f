import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import type { Option } from '#contract/options.ts';
import type { Work } from '#contract/works.ts';
import { OptionGrid } from './option-grid.tsx';

const mound = (id: string): Work => ({
  id,
  kind: 'mound',
  year: 2027,
  x: 1,
  y: 2,
  radius: 1.5,
  strength: 1,
  halo: 0,
});
const option = (id: string, works: Work[] = []) =>
  ({ id, name: `Option ${id}`, wait: id === 'wait', archived: false, works }) as unknown as Option;
const options = [
  option('wait'),
  option('a', [mound('1')]),
  option('b', [mound('1'), mound('2')]),
  option('c'),
];
const grid = { width: 10, height: 5, cellSize: 1, originX: 0, originY: 5, epsg: 32631 };
const onMove = vi.fn();

beforeEach(() => {
  onMove.mockReset();
});
afterEach(cleanup);

function show(mayDraw = true) {
  render(
    <OptionGrid
      options={options}
      chosen="b"
      drawn={[mound('1'), mound('2'), mound('3')]}
      base={{ grid, ground: undefined }}
      costOf={(works) => ({ total: 1000 * works.length, budget: 2500, currency: 'EUR' })}
      unsaved={({ id }) => id === 'b'}
      onChoose={() => undefined}
      onMove={mayDraw ? onMove : undefined}
    />,
  );
  return screen.getAllByRole('button');
}

it('says of each what it holds and costs, of the chosen one as it is drawn', () => {
  expect(show().map((entry) => entry.textContent)).toEqual([
    'Option waitno works€0',
    'Option a1 mound€1,000',
    'Option b3 mounds; changes not saved€3,000, €500 over',
    'Option cno works€0',
  ]);
  expect(screen.getByRole('button', { current: true }).textContent).toContain('Option b');
});

it('moves an option by Alt and the arrow keys, but neither Wait nor without Alt', () => {
  const [wait, , b] = show();
  fireEvent.keyDown(b, { key: 'ArrowLeft', altKey: true });
  fireEvent.keyDown(b, { key: 'ArrowDown', altKey: true });
  fireEvent.keyDown(b, { key: 'ArrowRight' });
  fireEvent.keyDown(wait, { key: 'ArrowRight', altKey: true });
  expect(onMove.mock.calls).toEqual([
    ['b', 0],
    ['b', 2],
  ]);
});

it('moves an option that is dragged onto another to its place, onto Wait to the first', () => {
  const places = show().map((entry) => entry.closest('li')!);
  const drag = (from: number, to: number) => {
    fireEvent.dragStart(places[from], { dataTransfer: {} });
    fireEvent.dragOver(places[to]);
    fireEvent.drop(places[to]);
  };
  drag(1, 3);
  drag(3, 0);
  drag(2, 2);
  expect(onMove.mock.calls).toEqual([
    ['a', 2],
    ['c', 0],
  ]);
});

it('stays as it is for those who only read', () => {
  const [, a] = show(false);
  fireEvent.keyDown(a, { key: 'ArrowRight', altKey: true });
  expect([onMove.mock.calls, a.closest('li')!.getAttribute('draggable')]).toEqual([[], 'false']);
});
