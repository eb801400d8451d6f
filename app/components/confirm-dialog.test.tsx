import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { ConfirmDialog } from './confirm-dialog.tsx';

afterEach(cleanup);
const show = (more: { busy?: boolean; error?: unknown } = {}) => {
  const onConfirm = vi.fn();
  const onOpenChange = vi.fn();
  render(
    <ConfirmDialog
      open
      title="Remove 18 mounds?"
      description="Runs already made keep theirs."
      action="Remove 18 mounds"
      keep="Keep them"
      {...{ onConfirm, onOpenChange, ...more }}
    />,
  );
  return { onConfirm, onOpenChange };
};

describe('ConfirmDialog', () => {
  it('does the deed only when its button is pressed', () => {
    const { onConfirm, onOpenChange } = show();
    fireEvent.click(screen.getByRole('button', { name: 'Keep them' }));
    expect(onConfirm).not.toHaveBeenCalled();
    expect(onOpenChange).toHaveBeenCalledWith(false);
    fireEvent.click(screen.getByRole('button', { name: 'Remove 18 mounds' }));
    expect(onConfirm).toHaveBeenCalledOnce();
  });

  it('is described by what goes and what stays, and shows why it failed', () => {
    show({ error: new Error('The team keeps at least one admin.') });
    const dialog = screen.getByRole('alertdialog', { name: 'Remove 18 mounds?' });
    const description = document.getElementById(dialog.getAttribute('aria-describedby') ?? '');
    expect(description?.textContent).toBe('Runs already made keep theirs.');
    expect(screen.getByRole('alert').textContent).toBe('The team keeps at least one admin.');
  });
});
