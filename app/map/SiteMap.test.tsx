import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { MapFoothold } from './map-symbols.ts';
import type { MapPoint, MapTool } from './map-tool.ts';
import { toScreen, type MapView } from './map-view.ts';
import type { SiteMapProps } from './site-map-props.ts';
import { SiteMap } from './SiteMap.tsx';

/** 100 × 50 cells of 1 m on 1000 × 500 px: ten px a cell. */
const grid: Grid = { width: 100, height: 50, cellSize: 1, originX: 1000, originY: 2050, epsg: 32630 };
const values = new Uint8Array(5000).fill(51);
const flag: MapFoothold = { id: 'f', x: 1020.5, y: 2029.5, kind: 'planned', year: 2027 };
const mound: MapFoothold = { id: 'm', x: 1080.5, y: 2009.5, kind: 'surveyed' };

beforeEach(() => {
  vi.spyOn(HTMLElement.prototype, 'clientWidth', 'get').mockReturnValue(1000);
  vi.spyOn(HTMLElement.prototype, 'clientHeight', 'get').mockReturnValue(500);
  vi.spyOn(HTMLElement.prototype, 'setPointerCapture').mockImplementation(() => undefined);
});
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

/** What a tool is told, as words: `press 12 34 f` */
const told = (what: string, at: MapPoint | undefined) =>
  at ? `${what} ${at.x} ${at.y}${at.id ? ` ${at.id}` : ''}${at.shift ? ' shift' : ''}` : what;

function show(props: Partial<SiteMapProps> = {}, more: Partial<MapTool> = {}) {
  const calls: string[] = [];
  const tell = (what: string) => (at: MapPoint | undefined) => void calls.push(told(what, at));
  const tool: MapTool = {
    cursor: 'crosshair',
    help: 'Enter places a foothold.',
    press: tell('press'),
    grab: (at) => at.id === 'f',
    drag: tell('drag'),
    drop: tell('drop'),
    ...more,
  };
  render(
    <SiteMap
      grid={grid}
      raster={{ kind: 'cover', values }}
      footholds={[mound, flag]}
      label="Sallow Reach, cover in 2043"
      summary="A fifth of the ground is covered."
      tool={tool}
      clear={{ left: 0, top: 0, right: 0, bottom: 0 }}
      {...props}
    />,
  );
  const map = screen.getByRole('application');
  const press = (key: string, shiftKey = false) => fireEvent.keyDown(map, { key, shiftKey });
  const at = (clientX: number, clientY: number) => ({ clientX, clientY, pointerId: 1, button: 0 });
  return { calls, map, press, at };
}

describe('SiteMap where there is no WebGL', () => {
  it('says so, and says what it would show', () => {
    show();
    const said = screen.getByRole('alert').textContent;
    expect(said).toContain('This browser cannot draw the map');
    expect(said).toContain('A fifth of the ground is covered.');
  });
});

describe('SiteMap by pointer', () => {
  it('tells its tool where it is pressed, to the centimetre, and what stands there', () => {
    const { calls, map, at } = show();
    fireEvent.pointerDown(map, at(403, 123.4));
    fireEvent.pointerUp(map, { ...at(404, 123.4), shiftKey: true });
    fireEvent.pointerDown(map, at(207, 200));
    fireEvent.pointerUp(map, at(207, 200));
    expect(calls).toEqual(['press 1040.4 2037.66 shift', 'press 1020.7 2030 f']);
  });
  it('finds an outline where no symbol stands', () => {
    const { calls, map, at } = show({
      areas: [
        {
          id: 'a',
          kind: 'fence',
          ring: [
            [1040, 2040],
            [1060, 2040],
            [1050, 2020],
          ],
        },
      ],
    });
    fireEvent.pointerDown(map, at(500, 200));
    fireEvent.pointerUp(map, at(500, 200));
    expect(calls).toEqual(['press 1050 2030 a']);
  });
  it('gives its tool the drags that it grabs, and moves the map by the others', () => {
    const views: MapView[] = [];
    const whole = show({ onView: (view) => views.push(view) });
    const { at } = whole;
    fireEvent.pointerDown(whole.map, at(205, 203));
    fireEvent.pointerMove(whole.map, at(260, 300));
    fireEvent.pointerUp(whole.map, at(300, 300));
    expect(whole.calls).toEqual(['drag 1026 2020', 'drop 1030 2020']);
    expect(views).toEqual([]);
    fireEvent.pointerDown(whole.map, at(805, 405));
    fireEvent.pointerMove(whole.map, at(700, 300));
    fireEvent.pointerUp(whole.map, at(700, 300));
    expect(views).toHaveLength(1);
    expect(whole.calls).toHaveLength(2);
  });
  it('breaks a drag off where the browser takes the pointer away', () => {
    const { calls, map, at } = show();
    fireEvent.pointerDown(map, at(205, 203));
    fireEvent.pointerMove(map, at(260, 300));
    fireEvent.pointerCancel(map, at(260, 300));
    expect(calls.at(-1)).toBe('drop');
  });
});

describe('SiteMap by keyboard', () => {
  it('reads the ground under a crosshair', () => {
    const seen: unknown[] = [];
    const { press } = show({ onHover: (cell) => seen.push(cell) });
    press('ArrowRight');
    press('ArrowRight', true);
    press('ArrowDown', true);
    expect(seen).toEqual([
      undefined,
      { column: 50, row: 25 },
      { column: 51, row: 25 },
      { column: 51, row: 26 },
    ]);
    expect(screen.getByText('cover 20 %').parentElement?.textContent).toContain('E 1\u00a0052 N 2\u00a0024');
    expect(screen.getByText('cover 20 %').parentElement?.getAttribute('aria-live')).toBe('polite');
    press('Escape');
    expect(screen.queryByText('cover 20 %')).toBeNull();
  });
  it('presses at the crosshair by Enter and by Space', () => {
    const { calls, press } = show();
    press('ArrowRight');
    press('ArrowRight', true);
    press('Enter');
    press(' ');
    expect(calls).toEqual(['press 1051.5 2024.5', 'press 1051.5 2024.5']);
  });
  it('lets its tool take keys first, and brings into view what that names', () => {
    const views: MapView[] = [];
    const { press } = show(
      { onView: (view) => views.push(view) },
      { key: (event) => (event.key === 'n' ? flag : event.key === '0') },
    );
    for (let i = 0; i < 4; i++) press('+');
    press('n');
    const view = views[views.length - 1];
    const { left, top } = toScreen(view, grid, { width: 1000, height: 500 }, flag.x, flag.y);
    expect(left).toBeGreaterThanOrEqual(59);
    expect(left).toBeLessThanOrEqual(941);
    expect(top).toBeGreaterThanOrEqual(59);
    expect(top).toBeLessThanOrEqual(441);
    const before = views.length;
    press('0');
    expect(views).toHaveLength(before);
  });
  it('zooms by keys and by buttons, and comes back to the whole', () => {
    const scales: number[] = [];
    const { press } = show({ onView: (v) => scales.push(v.scale) });
    press('+');
    fireEvent.click(screen.getByRole('button', { name: 'Zoom in' }));
    press('0');
    press('-');
    expect(scales.map((s) => Math.round(s * 10) / 10)).toEqual([16, 25.6, 10, 10]);
  });
});
