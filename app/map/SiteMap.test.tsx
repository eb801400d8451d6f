import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { useState } from 'react';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { MapFoothold } from './map-symbols.ts';
import { toScreen, type MapView } from './map-view.ts';
import type { MapPlace, SiteMapProps } from './site-map-props.ts';
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

function show(props: Partial<SiteMapProps> = {}) {
  const calls: unknown[][] = [];
  function Harness() {
    const [selectedId, setSelected] = useState<string | undefined>(props.selectedId);
    return (
      <SiteMap
        grid={grid}
        raster={{ kind: 'cover', values }}
        footholds={[mound, flag]}
        label="Sallow Reach, cover in 2043"
        summary="A fifth of the ground is covered."
        onPlace={(place: MapPlace) => calls.push(['place', place])}
        onSelect={(id) => {
          calls.push(['select', id]);
          setSelected(id);
        }}
        onMove={(id, place) => calls.push(['move', id, place])}
        onRemove={(id) => calls.push(['remove', id])}
        onKept={(id) => calls.push(['kept', id])}
        {...props}
        selectedId={selectedId}
      />
    );
  }
  render(<Harness />);
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
  it('places where it is clicked, to the centimetre, with its cell', () => {
    const { calls, map, at } = show({ tool: 'place' });
    fireEvent.pointerDown(map, at(403, 123.4));
    fireEvent.pointerUp(map, at(404, 123.4));
    expect(calls).toEqual([['place', { column: 40, row: 12, x: 1040.4, y: 2037.66 }]]);
  });
  it('selects what is clicked, also while placing, and lets go on bare ground', () => {
    const { calls, map, at } = show({ tool: 'place' });
    fireEvent.pointerDown(map, at(207, 200));
    fireEvent.pointerUp(map, at(207, 200));
    expect(calls).toEqual([['select', 'f']]);
    cleanup();
    const look = show();
    fireEvent.pointerDown(look.map, look.at(500, 400));
    fireEvent.pointerUp(look.map, look.at(500, 400));
    expect(look.calls).toEqual([['select', undefined]]);
  });
  it('drags a planned foothold to where it is dropped', () => {
    const { calls, map, at } = show();
    fireEvent.pointerDown(map, at(205, 203));
    fireEvent.pointerMove(map, at(260, 300));
    fireEvent.pointerMove(map, at(300, 300));
    fireEvent.pointerUp(map, at(300, 300));
    expect(calls).toEqual([['move', 'f', { column: 30, row: 30, x: 1030, y: 2020 }]]);
  });
  it('does not drag what was surveyed', () => {
    const { calls, map, at } = show();
    fireEvent.pointerDown(map, at(805, 405));
    fireEvent.pointerMove(map, at(700, 300));
    fireEvent.pointerUp(map, at(700, 300));
    expect(calls).toEqual([]);
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
  it('places at the crosshair', () => {
    const { calls, press } = show({ tool: 'place' });
    press('ArrowRight');
    press('ArrowRight', true);
    press('Enter');
    expect(calls).toEqual([['place', { column: 51, row: 25, x: 1051.5, y: 2024.5 }]]);
  });
  it('finds footholds one after the other, moves and removes planned ones, and surveyed ones not', () => {
    const { calls, press } = show();
    press('n');
    press('ArrowUp');
    press('ArrowLeft', true);
    press('Delete');
    expect(calls.splice(0)).toEqual([
      ['select', 'f'],
      ['move', 'f', { column: 20, row: 19, x: 1020.5, y: 2030.5 }],
      ['move', 'f', { column: 10, row: 20, x: 1010.5, y: 2029.5 }],
      ['remove', 'f'],
    ]);
    press('n');
    press('ArrowUp');
    press('Delete');
    expect(calls).toEqual([
      ['select', 'm'],
      ['kept', 'm'],
    ]);
  });
  it('brings into view what it finds', () => {
    const views: MapView[] = [];
    const { press } = show({ onView: (view) => views.push(view) });
    for (let i = 0; i < 4; i++) press('+');
    press('n');
    const view = views[views.length - 1];
    const { left, top } = toScreen(view, grid, { width: 1000, height: 500 }, flag.x, flag.y);
    expect(left).toBeGreaterThanOrEqual(59);
    expect(left).toBeLessThanOrEqual(941);
    expect(top).toBeGreaterThanOrEqual(59);
    expect(top).toBeLessThanOrEqual(441);
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
