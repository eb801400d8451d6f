/** Work that goes on outside of any page, as the pages watch it. */
export interface LiveList<Live> {
  readonly subscribe: (listener: () => void) => () => void;
  /** the same array until something changed */
  readonly list: () => readonly Live[];
  readonly get: (id: string) => Live | undefined;
  /** Puts one at the end, in the place of an older one of the same id. */
  readonly put: (live: Live) => void;
  /** Changes one; nothing where it is not there. */
  readonly change: (id: string, patch: Partial<Live>) => void;
  readonly remove: (id: string) => void;
}

/** @param onChange told after each change how many are at work */
export function createLiveList<Live>(parts: {
  idOf: (live: Live) => string;
  isAtWork: (live: Live) => boolean;
  onChange?: ((active: number) => void) | undefined;
}): LiveList<Live> {
  const { idOf, isAtWork } = parts;
  const listeners = new Set<() => void>();
  let lives: readonly Live[] = [];
  const publish = (next: readonly Live[]) => {
    lives = next;
    parts.onChange?.(lives.filter(isAtWork).length);
    listeners.forEach((listener) => listener());
  };
  const without = (id: string) => lives.filter((live) => idOf(live) !== id);
  return {
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    list: () => lives,
    get: (id) => lives.find((live) => idOf(live) === id),
    put: (live) => publish([...without(idOf(live)), live]),
    change: (id, patch) => publish(lives.map((live) => (idOf(live) === id ? { ...live, ...patch } : live))),
    remove: (id) => publish(without(id)),
  };
}
