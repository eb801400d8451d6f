import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { MapSceneProps } from './MapScene.tsx';
import { SiteMap } from './SiteMap.tsx';

/** A scene that paints when it is pressed: there is no WebGL here. */
vi.mock('./MapScene.tsx', () => ({
  MapScene: ({ raster, onPainted, onLost }: MapSceneProps) => (
    <>
      <button onClick={() => onPainted(raster !== undefined)}>paint</button>
      <button onClick={onLost}>lose</button>
    </>
  ),
}));

const grid: Grid = { width: 2, height: 1, cellSize: 1, originX: 0, originY: 1, epsg: 32630 };
const raster = { kind: 'cover', values: Uint8Array.of(1, 2) } as const;

beforeEach(() => {
  vi.spyOn(HTMLElement.prototype, 'clientWidth', 'get').mockReturnValue(1000);
  vi.spyOn(HTMLElement.prototype, 'clientHeight', 'get').mockReturnValue(500);
  vi.spyOn(HTMLCanvasElement.prototype, 'getContext').mockReturnValue({ getExtension: () => null } as never);
});
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

it('says that the map is being drawn until what it was given is painted', async () => {
  const { container, rerender } = render(<SiteMap grid={grid} label="Invented Reach" />);
  const painted = () => container.querySelector('[data-painted]')?.getAttribute('data-painted');
  const words = () => screen.queryByText('Drawing the map') !== null;
  const press = (name: string) => fireEvent.click(screen.getByText(name));
  await screen.findByText('paint');
  expect([painted(), words()]).toEqual(['false', true]);
  press('paint');
  expect([painted(), words()]).toEqual(['true', false]);
  rerender(<SiteMap grid={grid} label="Invented Reach" raster={raster} />);
  expect([painted(), words()]).toEqual(['false', true]);
  press('paint');
  expect([painted(), words()]).toEqual(['true', false]);
  press('lose');
  fireEvent.click(screen.getByRole('button', { name: /again/i }));
  expect([painted(), words()]).toEqual(['false', true]);
});
