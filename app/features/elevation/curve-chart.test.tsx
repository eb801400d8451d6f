import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { CurveChart } from './curve-chart.tsx';
import { editElevation, startEditing, type ElevationEvent } from './curve-draft.ts';
import { CurveTable } from './curve-table.tsx';

afterEach(cleanup);

const heights = { minimum: 0, maximum: 4, histogram: [5, 10, 5, 1] };
const draft = {
  elevationCurves: {
    capacity: [
      [1, 0],
      [2, 0.5],
      [3, 1],
    ] as [number, number][],
    vigour: null,
    exposure: null,
  },
  tidalDatums: [{ name: 'mean sea level', height: 1.5 }],
};

function show(more: { editable?: boolean; chosen?: 'capacity' | 'vigour' } = {}) {
  const tell = vi.fn<(event: ElevationEvent) => void>();
  render(<CurveChart {...{ heights, draft, tell }} chosen="capacity" editable {...more} />);
  return tell;
}
const point = (n: number) => screen.getByRole('slider', { name: `Point ${n} of capacity` });

describe('CurveChart', () => {
  it('says every point, and moves one by keys, ten times as far with Shift', () => {
    const tell = show();
    expect(point(2).getAttribute('aria-valuetext')).toBe('2 m, 50 %');
    fireEvent.keyDown(point(2), { key: 'ArrowRight' });
    fireEvent.keyDown(point(2), { key: 'ArrowDown', shiftKey: true });
    expect(tell.mock.calls.map(([event]) => event)).toEqual([
      { type: 'moved', curve: 'capacity', point: 1, height: 2.01, share: 0.5 },
      { type: 'moved', curve: 'capacity', point: 1, height: 2, share: 0.4 },
    ]);
  });

  it('takes a point off with Delete, and adds one half way to the next with Enter', () => {
    const tell = show();
    fireEvent.keyDown(point(1), { key: 'Delete' });
    fireEvent.keyDown(point(1), { key: 'Enter' });
    fireEvent.keyDown(point(1), { key: 'x' });
    expect(tell.mock.calls.map(([event]) => event)).toEqual([
      { type: 'removed', curve: 'capacity', point: 0 },
      { type: 'added', curve: 'capacity', height: 1.5, share: 0.25 },
    ]);
  });

  it('drags a point as one deed, and adds one where the chart is pressed', () => {
    const tell = show();
    const chart = screen.getByRole('group');
    // As wide as its own units: 312 px for heights from −0.24 to 4.24.
    chart.getBoundingClientRect = () => ({ left: 0, top: 0, width: 312, height: 214 }) as DOMRect;
    const handle = point(2);
    handle.setPointerCapture = () => undefined;
    fireEvent.pointerDown(handle, { pointerId: 1, button: 0 });
    fireEvent.pointerMove(handle, { pointerId: 1, clientX: 156, clientY: 109 });
    fireEvent.pointerMove(handle, { pointerId: 1, clientX: 160, clientY: 109 });
    fireEvent.pointerUp(handle, { pointerId: 1 });
    const [first, second] = tell.mock.calls.map(([event]) => event);
    expect(first).toMatchObject({ type: 'moved', point: 1 });
    const moved = tell.mock.calls.map(([event]) => event).reduce(editElevation, startEditing(draft));
    expect(moved.past).toHaveLength(1);
    expect(moved.draft.elevationCurves.capacity?.[1][0]).toBeCloseTo(2.06, 1);
    expect(second.type === 'moved' && second.gesture).toBe(first.type === 'moved' && first.gesture);
    tell.mockClear();
    fireEvent.pointerDown(chart, { button: 0, clientX: 156, clientY: 109 });
    expect(tell.mock.calls[0][0]).toMatchObject({ type: 'added', curve: 'capacity' });
  });

  it('keeps the names of tide levels apart from each other and above the plot, however many there are', () => {
    const tidalDatums = [
      'low water',
      'mean low water neaps',
      'mean sea level',
      'mean high water',
      'springs',
    ].map((name, i) => ({ name, height: 1.4 + i * 0.12 }));
    const { container } = render(
      <CurveChart
        {...{ heights }}
        draft={{ ...draft, tidalDatums }}
        tell={vi.fn()}
        chosen="capacity"
        editable
      />,
    );
    const names = [...container.querySelectorAll('text')]
      .filter((text) => tidalDatums.some(({ name }) => name === text.textContent))
      .map((text) => ({
        row: Number(text.getAttribute('y')),
        from: Number(text.getAttribute('x')),
        to: Number(text.getAttribute('x')) + text.textContent.length * 6,
      }));
    expect(names).toHaveLength(5);
    for (const one of names)
      for (const other of names)
        if (one !== other && Math.abs(one.row - other.row) < 11)
          expect(one.to <= other.from || other.to <= one.from).toBe(true);
    const full = [...container.querySelectorAll('text')].find((text) => text.textContent === '100 %')!;
    expect(Number(full.getAttribute('y'))).toBeGreaterThan(Math.max(...names.map(({ row }) => row)) + 11);
  });

  it('has no handles for those who may not change it, nor for a curve that is not there', () => {
    show({ editable: false });
    expect(screen.queryAllByRole('slider')).toHaveLength(0);
    cleanup();
    const tell = show({ chosen: 'vigour' });
    fireEvent.pointerDown(screen.getByRole('group'), { button: 0, clientX: 1, clientY: 1 });
    expect(tell).not.toHaveBeenCalled();
  });
});

it('the table takes a number between the neighbours, and shows again what stands when left with another', () => {
  const tell = vi.fn();
  render(<CurveTable name="capacity" curve={draft.elevationCurves.capacity} editable tell={tell} />);
  const field = screen.getByLabelText<HTMLInputElement>('Height of point 2 of capacity, m');
  fireEvent.change(field, { target: { value: '3,5' } });
  expect(field.getAttribute('aria-invalid')).toBe('true');
  expect(tell).not.toHaveBeenCalled();
  fireEvent.blur(field);
  expect(field.value).toBe('2');
  fireEvent.change(field, { target: { value: '2,5' } });
  expect(tell).toHaveBeenCalledWith(
    expect.objectContaining({ type: 'moved', point: 1, height: 2.5, share: 0.5 }),
  );
});
