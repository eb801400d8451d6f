import { useRef } from 'react';
import type { LayerPart } from '#contract/layers.ts';
import { WordButton } from '#app/components/word-button.tsx';

/** Takes another file for a part; the layer that is there stays in its history. */
export function ReplaceLayer({ part, onFile }: { part: LayerPart; onFile: (file: File) => void }) {
  const input = useRef<HTMLInputElement>(null);
  return (
    <>
      <WordButton onClick={() => input.current?.click()}>
        replace<span className="sr-only"> {part}</span>
      </WordButton>
      <input
        ref={input}
        type="file"
        hidden
        aria-label={`File to replace ${part}`}
        accept=".tif,.tiff,image/tiff"
        onChange={(event) => {
          const file = event.target.files?.[0];
          event.target.value = '';
          if (file) onFile(file);
        }}
      />
    </>
  );
}
