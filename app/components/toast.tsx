import { useSyncExternalStore } from 'react';

interface Message {
  id: number;
  words: string;
}

const shownFor = 6000;
let messages: readonly Message[] = [];
let nextId = 1;
const listeners = new Set<() => void>();

function change(next: readonly Message[]): void {
  messages = next;
  listeners.forEach((listener) => listener());
}

/**
 * Says in passing that something was done ("Invite sent"). It also reads it out. What went wrong does not belong here:
 * it stays on the page where it happened (ProblemNotice).
 */
export function sayDone(words: string): void {
  const id = nextId++;
  change([...messages.slice(-2), { id, words }]);
  window.setTimeout(() => change(messages.filter((message) => message.id !== id)), shownFor);
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/**
 * Where passing messages stand: over the head of the page, where neither map, legend, yearline nor action lies below.
 * Once, at the root of the app: a live region must be there before it speaks.
 */
export function ToastRegion() {
  const shown = useSyncExternalStore(subscribe, () => messages);
  return (
    <div
      role="status"
      aria-live="polite"
      className="no-print pointer-events-none fixed top-2 left-1/2 z-50 grid w-max max-w-[calc(100vw-40px)] -translate-x-1/2 justify-items-center gap-2"
    >
      {shown.map(({ id, words }) => (
        <p
          key={id}
          className="rounded-edge border-[1.5px] border-l-[6px] border-ink bg-sheet py-2 pr-4 pl-3.5 font-semibold"
        >
          {words}
        </p>
      ))}
    </div>
  );
}
