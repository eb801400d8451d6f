import type { Option } from '#contract/options.ts';
import { sameWork } from '#contract/work-changes.ts';
import type { Work, WorkSet } from '#contract/works.ts';

/** What is drawn at one time: the works, and how those were laid that a pattern laid. */
export interface DraftState {
  readonly works: readonly Work[];
  readonly sets: readonly WorkSet[];
}

/** What is drawn on an option and not saved yet, with the way back. */
export interface OptionDraft extends DraftState {
  readonly past: readonly DraftState[];
  readonly future: readonly DraftState[];
  /** ids of the works that are selected */
  readonly selected: ReadonlySet<string>;
  /** what the server has, as far as this page knows: the revision that the drawing was made on, and what it held */
  readonly revision: number;
  readonly saved: DraftState;
  /** the change made last, so that works pushed along by arrow keys are one step back */
  readonly lastChange: string | undefined;
}

export type DraftAction =
  /** new works, selected from now on; `instead` takes others away in the same step, `sets` say how they were laid */
  | {
      type: 'add';
      works: readonly Work[];
      sets?: readonly WorkSet[];
      instead?: ReadonlySet<string> | undefined;
    }
  /** these in place of those with their ids; the same `step` again is one step back */
  | { type: 'change'; works: readonly Work[]; step?: string }
  | { type: 'remove'; ids: ReadonlySet<string> }
  | { type: 'select'; ids: Iterable<string> }
  | { type: 'undo' | 'redo' | 'discard' }
  /** the server took this */
  | { type: 'saved'; revision: number; state: DraftState }
  /** what somebody else saved replaces the drawing; undo brings the drawing back */
  | { type: 'take'; option: Pick<Option, 'works' | 'sets' | 'revision'> }
  /** the drawing and what somebody else saved, put together on what they saved; undo brings the drawing back */
  | { type: 'merge'; option: Pick<Option, 'works' | 'sets' | 'revision'>; state: DraftState };

/** Steps that can be taken back. */
const longestPast = 200;
export const noneSelected: ReadonlySet<string> = new Set();

/** A draft of what the server has. */
export function draftOf({ works, sets, revision }: Pick<Option, 'works' | 'sets' | 'revision'>): OptionDraft {
  const saved = { works, sets };
  return {
    ...saved,
    past: [],
    future: [],
    selected: noneSelected,
    revision,
    saved,
    lastChange: undefined,
  };
}

/** Whether the drawing differs from what the server has. */
export const isUnsaved = ({ works, sets, saved }: OptionDraft): boolean =>
  (works !== saved.works && !sameWork(works, saved.works)) ||
  (sets !== saved.sets && !sameWork(sets, saved.sets));

/** The next state of a drawing; what cannot be (an unknown id, nothing to undo) changes nothing. */
export function optionDraft(draft: OptionDraft, action: DraftAction): OptionDraft {
  switch (action.type) {
    case 'add': {
      if (action.works.length === 0) return draft;
      const kept = action.instead ? draft.works.filter((work) => !action.instead?.has(work.id)) : draft.works;
      const { sets: laid = [] } = action;
      const sets = laid.length > 0 ? withSets(draft.sets, laid) : draft.sets;
      return {
        ...drawn(draft, usedSets({ works: [...kept, ...action.works], sets })),
        selected: new Set(action.works.map((work) => work.id)),
      };
    }
    case 'change': {
      const given = new Map(action.works.map((work) => [work.id, work]));
      let changed = false;
      const works = draft.works.map((work) => {
        const next = given.get(work.id);
        if (!next || sameWork(next, work)) return work;
        changed = true;
        return next;
      });
      return changed ? drawn(draft, usedSets({ works, sets: draft.sets }), action.step) : draft;
    }
    case 'remove': {
      const works = draft.works.filter((work) => !action.ids.has(work.id));
      if (works.length === draft.works.length) return draft;
      return stillThere(drawn(draft, usedSets({ works, sets: draft.sets })));
    }
    case 'select': {
      const selected = new Set(action.ids);
      return { ...draft, selected: selected.size > 0 ? selected : noneSelected, lastChange: undefined };
    }
    case 'undo': {
      const before = draft.past.at(-1);
      if (!before) return draft;
      return turned(draft, before, draft.past.slice(0, -1), [stateOf(draft), ...draft.future]);
    }
    case 'redo': {
      const [next, ...future] = draft.future;
      return next ? turned(draft, next, [...draft.past, stateOf(draft)], future) : draft;
    }
    case 'discard':
      return isUnsaved(draft) ? stillThere(drawn(draft, draft.saved)) : draft;
    case 'saved':
      return { ...draft, saved: action.state, revision: action.revision, lastChange: undefined };
    case 'take': {
      const { works, sets, revision } = action.option;
      const theirs = { works, sets };
      return stillThere({ ...drawn(draft, theirs), saved: theirs, revision });
    }
    case 'merge': {
      const { works, sets, revision } = action.option;
      return stillThere({ ...drawn(draft, action.state), saved: { works, sets }, revision });
    }
  }
}

export const stateOf = ({ works, sets }: DraftState): DraftState => ({ works, sets });

const withSets = (sets: readonly WorkSet[], more: readonly WorkSet[]): WorkSet[] => [
  ...sets.filter(({ id }) => more.every((set) => set.id !== id)),
  ...more,
];

/** A set goes with the last of its works. */
function usedSets({ works, sets }: DraftState): DraftState {
  if (sets.length === 0) return { works, sets };
  const used = new Set(works.map((work) => work.set));
  const kept = sets.filter(({ id }) => used.has(id));
  return { works, sets: kept.length === sets.length ? sets : kept };
}

/** The same change to the same works again is one step back, not many. */
function drawn(draft: OptionDraft, state: DraftState, step?: string): OptionDraft {
  const again = step !== undefined && step === draft.lastChange;
  return {
    ...draft,
    ...stateOf(state),
    past: again ? draft.past : [...draft.past, stateOf(draft)].slice(-longestPast),
    future: [],
    lastChange: step,
  };
}

const turned = (
  draft: OptionDraft,
  state: DraftState,
  past: OptionDraft['past'],
  future: OptionDraft['future'],
): OptionDraft => stillThere({ ...draft, ...stateOf(state), past, future, lastChange: undefined });

/** Nothing is selected that is not there. */
function stillThere(draft: OptionDraft): OptionDraft {
  if (draft.selected.size === 0) return draft;
  const ids = new Set(draft.works.map((work) => work.id));
  const kept = [...draft.selected].filter((id) => ids.has(id));
  if (kept.length === draft.selected.size) return draft;
  return { ...draft, selected: kept.length > 0 ? new Set(kept) : noneSelected };
}
