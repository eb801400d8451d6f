import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, expect, it, vi } from 'vitest';
import { startRows } from './class-draft.ts';
import { ClassTable } from './class-table.tsx';

afterEach(cleanup);

const layer = { classCounts: [{ value: 7, cells: 30_000 }], classes: null };

it('says what each class covers, and tells of what is typed', () => {
  const onChange = vi.fn();
  render(<ClassTable layer={layer} rows={startRows(layer)} cellSize={2} onChange={onChange} />);
  expect(screen.getByText('class 7, 12 ha')).toBeTruthy();
  fireEvent.change(screen.getByLabelText('Capacity of class 7'), { target: { value: '0,5' } });
  expect(onChange).toHaveBeenCalledWith(7, { capacity: '0,5' });
});

it('shows what is wrong at the field, in words that belong to it', () => {
  const rows = startRows(layer).map((row) => ({ ...row, vigour: '3' }));
  render(<ClassTable layer={layer} rows={rows} cellSize={2} onChange={() => undefined} />);
  const field = screen.getByLabelText('Vigour of class 7');
  expect(field.getAttribute('aria-invalid')).toBe('true');
  const note = document.getElementById(field.getAttribute('aria-describedby') ?? '');
  expect(note?.textContent).toBe('Vigour: found “3”, expected a share from 0 to 1');
  expect(screen.getByLabelText('Capacity of class 7').getAttribute('aria-invalid')).toBeNull();
});
