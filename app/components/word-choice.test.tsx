import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { WordChoice } from './word-choice.tsx';

afterEach(cleanup);

describe('WordChoice', () => {
  it('is one group of radios and tells which was chosen', () => {
    const onChange = vi.fn();
    render(
      <WordChoice
        label="Show"
        options={[
          { key: 'cover', label: 'cover' },
          { key: 'closing', label: 'closing year' },
        ]}
        value="cover"
        onChange={onChange}
      />,
    );
    expect(screen.getByRole('radiogroup', { name: 'Show' })).toBeTruthy();
    const [cover, closing] = screen.getAllByRole<HTMLInputElement>('radio');
    expect([cover.checked, closing.checked]).toEqual([true, false]);
    expect(cover.name).toBe(closing.name);
    fireEvent.click(closing);
    expect(onChange).toHaveBeenCalledWith('closing');
  });
});
