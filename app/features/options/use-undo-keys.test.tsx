import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, expect, it } from 'vitest';
import { useUndoKeys } from './use-undo-keys.ts';

afterEach(cleanup);

function show(active = true) {
  const turns: string[] = [];
  function Page() {
    useUndoKeys(active, (turn) => turns.push(turn));
    return (
      <>
        <input aria-label="year" />
        <input type="radio" aria-label="tool" />
        <div role="dialog">
          <button>Add it</button>
        </div>
      </>
    );
  }
  render(<Page />);
  return turns;
}

it('turns back by Ctrl or Cmd and Z, and forth with Shift or by Ctrl and Y', () => {
  const turns = show();
  fireEvent.keyDown(document.body, { key: 'z', ctrlKey: true });
  fireEvent.keyDown(document.body, { key: 'z', metaKey: true });
  fireEvent.keyDown(screen.getByLabelText('tool'), { key: 'Z', ctrlKey: true, shiftKey: true });
  fireEvent.keyDown(document.body, { key: 'y', ctrlKey: true });
  expect(turns).toEqual(['undo', 'undo', 'redo', 'redo']);
});

it('leaves text fields, dialogs and other keys alone', () => {
  const turns = show();
  fireEvent.keyDown(screen.getByLabelText('year'), { key: 'z', ctrlKey: true });
  fireEvent.keyDown(screen.getByText('Add it'), { key: 'z', ctrlKey: true });
  fireEvent.keyDown(document.body, { key: 'z' });
  fireEvent.keyDown(document.body, { key: 'z', ctrlKey: true, altKey: true });
  expect(turns).toEqual([]);
});

it('does nothing where nothing can be drawn', () => {
  const turns = show(false);
  fireEvent.keyDown(document.body, { key: 'z', ctrlKey: true });
  expect(turns).toEqual([]);
});
