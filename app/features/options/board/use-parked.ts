import { useMemo, useState } from 'react';
import type { Work, WorkSet } from '#contract/works.ts';
import type { BoardTool, PatternTool } from './board-tools.ts';
import { drawsOutline } from './sketch.ts';

/** A pattern whose tool was left before it was placed. */
export interface ParkedPattern {
  readonly tool: PatternTool;
  readonly works: readonly Work[];
  readonly set: WorkSet;
  /** set whose place it takes */
  readonly instead: string | undefined;
}

export interface Parking {
  readonly works: readonly Work[];
  readonly sets: readonly WorkSet[];
  readonly instead: readonly (string | undefined)[];
  readonly park: (pattern: ParkedPattern) => void;
  /** Takes out the one that was parked last, where the outline or the line that it rests on serves a tool. */
  readonly take: (tool: BoardTool) => ParkedPattern | undefined;
  readonly drop: () => void;
}

const nothing: readonly ParkedPattern[] = [];

/** Patterns that wait, shown faint, until they are placed or dropped: no tool is left at the cost of one. */
export function useParked(): Parking {
  const [parked, setParked] = useState(nothing);
  const lists = useMemo(
    () => ({
      works: parked.flatMap(({ works }) => works),
      sets: parked.map(({ set }) => set),
      instead: parked.map(({ instead }) => instead),
    }),
    [parked],
  );
  return {
    ...lists,
    park: (pattern) => setParked([...parked, pattern]),
    take(tool) {
      const last = parked.at(-1);
      if (!last || drawsOutline(last.tool) !== drawsOutline(tool)) return undefined;
      setParked(parked.slice(0, -1));
      return last;
    },
    drop: () => setParked(nothing),
  };
}
