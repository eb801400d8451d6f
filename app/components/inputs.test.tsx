import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { Blank } from './blank.tsx';
import { NumberField, SelectField, TextField } from './inputs.tsx';

afterEach(cleanup);
const describedBy = (element: HTMLElement) =>
  document.getElementById(element.getAttribute('aria-describedby') ?? '')?.textContent;

describe('fields', () => {
  it('tie label and hint to the input', () => {
    render(<TextField label="E-mail" hint="As in the invite" />);
    const input = screen.getByLabelText('E-mail');
    expect(describedBy(input)).toBe('As in the invite');
    expect(input.getAttribute('aria-invalid')).toBeNull();
  });

  it('let the error take the place of the hint', () => {
    render(<NumberField label="Cell size" unit="m" hint="From the layer" error="Use 1 m or less" />);
    const input = screen.getByLabelText('Cell size');
    expect(describedBy(input)).toBe('Use 1 m or less');
    expect(input.getAttribute('aria-invalid')).toBe('true');
    expect(screen.queryByText('From the layer')).toBeNull();
  });

  it('hand the input to whoever registers it', () => {
    let element: HTMLSelectElement | null = null;
    render(
      <SelectField label="as" ref={(found) => void (element = found)}>
        <option>manager</option>
      </SelectField>,
    );
    expect(element).toBe(screen.getByLabelText('as'));
  });
});

describe('Blank', () => {
  it('has a name of its own and grows with its value', () => {
    const { rerender } = render(<Blank label="Mounds" value="4" readOnly />);
    const narrow = screen.getByLabelText('Mounds').style.width;
    rerender(<Blank label="Mounds" value="40000" readOnly error="At most 20,000" />);
    const input = screen.getByLabelText('Mounds');
    expect(input.style.width).not.toBe(narrow);
    expect(input.getAttribute('aria-invalid')).toBe('true');
  });
});
