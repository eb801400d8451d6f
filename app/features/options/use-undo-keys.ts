import { useEffect, useEffectEvent } from 'react';

const inText =
  'textarea, select, [contenteditable], [role="dialog"], [role="alertdialog"], ' +
  'input:not([type="radio"], [type="checkbox"], [type="range"], [type="button"])';

/** What a key press asks of a drawing: Ctrl or Cmd with Z, with Shift and Z, or with Y. */
export function undoKey(
  event: Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'shiftKey' | 'altKey' | 'target'>,
): 'undo' | 'redo' | undefined {
  if (event.ctrlKey === event.metaKey || event.altKey) return undefined;
  // A text field takes its own words back, and a dialog hides the drawing.
  if (event.target instanceof Element && event.target.closest(inText)) return undefined;
  const key = event.key.toLowerCase();
  if (key === 'z') return event.shiftKey ? 'redo' : 'undo';
  return key === 'y' && !event.shiftKey && event.ctrlKey ? 'redo' : undefined;
}

/** Undo and redo by keys anywhere on the page, while `active`. */
export function useUndoKeys(active: boolean, onTurn: (turn: 'undo' | 'redo') => void): void {
  const turn = useEffectEvent(onTurn);
  useEffect(() => {
    if (!active) return;
    const press = (event: KeyboardEvent) => {
      const asked = event.defaultPrevented ? undefined : undoKey(event);
      if (!asked) return;
      event.preventDefault();
      turn(asked);
    };
    window.addEventListener('keydown', press);
    return () => window.removeEventListener('keydown', press);
  }, [active]);
}
