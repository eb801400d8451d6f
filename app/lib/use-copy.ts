import { useState } from 'react';

/**
 * Copies a text. `refused` turns true where the browser does not let the page: then say how to copy it by hand.
 * @param onCopied once it is on the clipboard
 */
export function useCopy(onCopied: () => void): { copy: (text: string) => void; refused: boolean } {
  const [refused, setRefused] = useState(false);
  const copy = (text: string) => {
    // There is no clipboard on plain http beyond this machine.
    const clipboard = navigator.clipboard as Clipboard | undefined;
    if (!clipboard) {
      setRefused(true);
      return;
    }
    clipboard.writeText(text).then(onCopied, () => setRefused(true));
  };
  return { copy, refused };
}
