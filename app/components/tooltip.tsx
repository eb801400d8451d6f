import { Tooltip as Radix } from 'radix-ui';
import type { ReactNode } from 'react';

/** A few words more for what is hovered or focused. Never the only place where something is said. */
export function Tooltip(props: { words: string; children: ReactNode }) {
  return (
    <Radix.Provider delayDuration={300}>
      <Radix.Root>
        <Radix.Trigger asChild>{props.children}</Radix.Trigger>
        <Radix.Portal>
          <Radix.Content
            sideOffset={6}
            collisionPadding={8}
            className="z-50 max-w-[280px] rounded-edge border border-ink bg-sheet px-2 py-1 text-note text-ink"
          >
            {props.words}
          </Radix.Content>
        </Radix.Portal>
      </Radix.Root>
    </Radix.Provider>
  );
}
