import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { Button } from './button.tsx';

afterEach(cleanup);

describe('Button', () => {
  it('does what it says when pressed', () => {
    const press = vi.fn();
    render(<Button onClick={press}>Run</Button>);
    fireEvent.click(screen.getByRole('button', { name: 'Run' }));
    expect(press).toHaveBeenCalledOnce();
  });

  it('takes no press while busy, keeps its focus and says that it works', () => {
    const press = vi.fn();
    const { rerender } = render(<Button onClick={press}>Run</Button>);
    screen.getByRole('button').focus();
    rerender(
      <Button onClick={press} busy busyLabel="Starting">
        Run
      </Button>,
    );
    const button = screen.getByRole('button', { name: 'Starting' });
    fireEvent.click(button);
    expect(press).not.toHaveBeenCalled();
    expect(document.activeElement).toBe(button);
    expect(button.getAttribute('aria-busy')).toBe('true');
  });

  it('sends its form no second time while busy', () => {
    const submit = vi.fn((event: React.FormEvent) => event.preventDefault());
    render(
      <form onSubmit={submit}>
        <Button type="submit" busy>
          Save
        </Button>
      </form>,
    );
    fireEvent.click(screen.getByRole('button'));
    expect(submit).not.toHaveBeenCalled();
  });
});
