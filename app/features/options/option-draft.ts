import type { Option } from '#contract/options.ts';
import { sameWork } from '#contract/work-changes.ts';
import type { Marks, Work } from '#contract/works.ts';
import type { Mound } from '#sim-core/spec/run-spec.ts';

/** One of the works while it is drawn: its key is its id, and stays, whatever is moved, undone or saved. */
export interface DraftWork {
  readonly key: string;
  readonly action: Work;
}
export type DraftMound = DraftWork & { readonly action: Mound & Marks };

/** What is drawn on an option and not saved yet, with the way back. */
export interface OptionDraft {
  readonly works: readonly DraftWork[];
  readonly past: readonly (readonly DraftWork[])[];
  readonly future: readonly (readonly DraftWork[])[];
  readonly selected: string | undefined;
  /** what the server has, as far as this page knows: the revision that the drawing was made on, and its works */
  readonly revision: number;
  readonly saved: readonly DraftWork[];
  /** the change made last, so that a mound pushed along by arrow keys is one step back */
  readonly lastChange: string | undefined;
}

export type MoundChange = Partial<Pick<Mound, 'x' | 'y' | 'year' | 'radius' | 'strength' | 'halo'>>;
export type DraftAction =
  | { type: 'place'; mound: Mound & Marks }
  | { type: 'change'; key: string; change: MoundChange }
  | { type: 'remove'; key: string }
  | { type: 'select'; key: string | undefined }
  | { type: 'undo' | 'redo' | 'discard' }
  /** the server took these works */
  | { type: 'saved'; revision: number; works: readonly DraftWork[] }
  /** what somebody else saved replaces the drawing; undo brings the drawing back */
  | { type: 'take'; option: Option };

/** Steps that can be taken back. */
const longestPast = 200;

const isMound = (work: DraftWork): work is DraftMound => work.action.kind === 'mound';
export const moundsOf = (works: readonly DraftWork[]): DraftMound[] => works.filter(isMound);

export const draftWorks = (works: readonly Work[]): DraftWork[] =>
  works.map((action) => ({ key: action.id, action }));

/** A draft of what the server has. */
export function draftOf(option: Pick<Option, 'works' | 'revision'>): OptionDraft {
  const works = draftWorks(option.works);
  return {
    works,
    past: [],
    future: [],
    selected: undefined,
    revision: option.revision,
    saved: works,
    lastChange: undefined,
  };
}

/** Whether the drawing differs from what the server has. */
export const isUnsaved = ({ works, saved }: OptionDraft): boolean =>
  works !== saved &&
  (works.length !== saved.length || works.some((work, i) => !sameWork(work.action, saved[i].action)));

/** The next state of a drawing; what cannot be (an unknown key, nothing to undo) changes nothing. */
export function optionDraft(draft: OptionDraft, action: DraftAction): OptionDraft {
  switch (action.type) {
    case 'place': {
      const works = [...draft.works, ...draftWorks([action.mound])];
      return { ...drawn(draft, works), selected: action.mound.id };
    }
    case 'change': {
      const found = draft.works.find((work) => work.key === action.key);
      if (!found || !isMound(found)) return draft;
      const changed = { ...found, action: { ...found.action, ...action.change } };
      if (sameWork(changed.action, found.action)) return draft;
      const works = draft.works.map((work) => (work === found ? changed : work));
      return drawn(draft, works, `${action.key}:${Object.keys(action.change).sort().join()}`);
    }
    case 'remove': {
      if (!draft.works.some((work) => work.key === action.key)) return draft;
      const works = draft.works.filter((work) => work.key !== action.key);
      const selected = draft.selected === action.key ? undefined : draft.selected;
      return { ...drawn(draft, works), selected };
    }
    case 'select':
      return { ...draft, selected: action.key, lastChange: undefined };
    case 'undo': {
      const works = draft.past.at(-1);
      if (!works) return draft;
      return turned(draft, works, draft.past.slice(0, -1), [draft.works, ...draft.future]);
    }
    case 'redo': {
      const [works, ...future] = draft.future;
      return works ? turned(draft, works, [...draft.past, draft.works], future) : draft;
    }
    case 'discard':
      return isUnsaved(draft) ? drawn(draft, draft.saved) : draft;
    case 'saved':
      return { ...draft, saved: action.works, revision: action.revision, lastChange: undefined };
    case 'take': {
      const theirs = draftWorks(action.option.works);
      return {
        ...drawn(draft, theirs),
        saved: theirs,
        selected: undefined,
        revision: action.option.revision,
      };
    }
  }
}

/** The same change to the same mound again is one step back, not many. */
function drawn(draft: OptionDraft, works: readonly DraftWork[], change?: string): OptionDraft {
  const again = change !== undefined && change === draft.lastChange;
  return {
    ...draft,
    works,
    past: again ? draft.past : [...draft.past, draft.works].slice(-longestPast),
    future: [],
    lastChange: change,
  };
}

function turned(
  draft: OptionDraft,
  works: readonly DraftWork[],
  past: OptionDraft['past'],
  future: OptionDraft['future'],
): OptionDraft {
  const selected = works.some((work) => work.key === draft.selected) ? draft.selected : undefined;
  return { ...draft, works, past, future, selected, lastChange: undefined };
}
